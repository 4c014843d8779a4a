/** What was worked and lost at a job, against the allowance and the limit of error of the weighings. */
import type { Facts } from '../../book/facts.ts';
import { Decimal } from '../../decimal.ts';
import { allowanceOn, allowedLoss } from '../../loss/allowance.ts';
import type { Finding } from '../../loss/judgement.ts';
import { judgeLoss } from '../../loss/judgement.ts';
import type { Micrograms } from '../../mass/micrograms.ts';
import { printGrams } from '../../mass/micrograms.ts';
import type { MassVector, Metal } from '../../mass/vector.ts';
import { METALS, ZERO_MASS, addMass, subtractMass, sumMass } from '../../mass/vector.ts';
import type { OutLot } from './out.ts';
import type { Shares } from './shares.ts';

export interface Judged {
  /** Fine metal worked, per metal: what came in and was not counted before, less what came back unused. */
  readonly worked: MassVector;
  /** The metal by which the loss is judged: the one most of which was worked. */
  readonly metal: Metal;
  /** Null where the workshop has set none. */
  readonly allowed_ug: Micrograms | null;
  /** All that was lost, less what was found beyond the lots. */
  readonly loss: MassVector;
  /** Two standard uncertainties of the weighings, in the judged metal. */
  readonly limit_ug: Micrograms;
  readonly finding: Finding;
}

/** Judges the loss of a job. `limit_gross_ug` is the limit of error of the weighings that it rests on. */
export function judge(
  lots: readonly OutLot[],
  shares: Shares,
  by: {
    readonly operation: string;
    readonly alloy: string | null;
    readonly date: string;
    readonly limit_gross_ug: Micrograms;
  },
  facts: Facts,
): Judged {
  const cameIn = lots
    .filter((out) => !out.counted_before)
    .reduce((sum, out) => addMass(sum, out.mass), ZERO_MASS);
  const worked = nothingBelow(subtractMass(cameIn, sumMass(shares.unused)));
  const metal = METALS.reduce((best, next) => (worked[next] > worked[best] ? next : best), 'gold');
  const allowance = allowanceOn(facts.allowances, by);
  const allowed_ug = allowance === null ? null : allowedLoss(allowance, worked[metal]);
  const limit_ug = fineShare(by.limit_gross_ug, shares.blend, metal);
  const loss = subtractMass(shares.loss, sumMass(shares.more.map(({ mass }) => mass)));
  const finding = judgeLoss(loss[metal], allowed_ug, limit_ug);
  return { worked, metal, allowed_ug, loss, limit_ug, finding };
}

/** What came back unused may weigh a trifle more than what came in: nothing was worked then, not less. */
function nothingBelow(mass: MassVector): MassVector {
  const cut = (ug: Micrograms) => (ug < 0n ? 0n : ug);
  const { gross, gold, silver, platinum, palladium } = mass;
  return {
    gross: cut(gross),
    gold: cut(gold),
    silver: cut(silver),
    platinum: cut(platinum),
    palladium: cut(palladium),
  };
}

function fineShare(gross: Micrograms, blend: MassVector, metal: Metal): Micrograms {
  if (blend.gross <= 0n) return gross;
  return BigInt(new Decimal((gross * blend[metal]).toString()).div(blend.gross.toString()).ceil().toFixed(0));
}

/** The judgement as it stands in the voucher's detail. */
export function judgedDetail(judged: Judged) {
  return {
    worked_gold_g: printGrams(judged.worked.gold),
    worked_silver_g: printGrams(judged.worked.silver),
    worked_platinum_g: printGrams(judged.worked.platinum),
    worked_palladium_g: printGrams(judged.worked.palladium),
    judged_metal: judged.metal,
    allowance_g: judged.allowed_ug === null ? null : printGrams(judged.allowed_ug),
    limit_of_error_g: printGrams(judged.limit_ug),
    finding: judged.finding,
    to_explain: judged.finding === 'over_allowance' || judged.finding === 'more_back' ? 'yes' : null,
  };
}
