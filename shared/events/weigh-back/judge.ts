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
import { limitOfReadings } from '../last-of-it.ts';
import type { OutLot } from './out.ts';
import type { Shares } from './shares.ts';

export interface Judged {
  /** Fine metal worked, per metal: what came in and was not counted before, less what came back unused. */
  readonly worked: MassVector;
  /** The metal by which the loss is judged: the one most of which was worked. */
  readonly metal: Metal;
  /** Null where the workshop has set none. */
  readonly allowed_ug: Micrograms | null;
  /** Two standard uncertainties of the weighings, gross. */
  readonly limit_gross_ug: Micrograms;
  /** The same of the judged metal. */
  readonly limit_ug: Micrograms;
  readonly finding: Finding;
}

/** Judges the loss of a job. `readings` is the number of weighings it rests on. */
export function judge(
  lots: readonly OutLot[],
  shares: Shares,
  by: {
    readonly operation: string;
    readonly alloy: string | null;
    readonly date: string;
    readonly readings: bigint;
  },
  facts: Facts,
): Judged {
  const cameIn = lots
    .filter((out) => !out.counted_before)
    .reduce((sum, out) => addMass(sum, out.mass), ZERO_MASS);
  const worked = subtractMass(cameIn, sumMass(shares.unused));
  const metal = METALS.reduce((best, next) => (worked[next] > worked[best] ? next : best), 'gold');
  const allowance = allowanceOn(facts.allowances, by);
  const base = worked[metal] > 0n ? worked[metal] : 0n;
  const allowed_ug = allowance === null ? null : allowedLoss(allowance, base);
  const limit_gross_ug = limitOfReadings(by.readings, facts.settings.weighing_u_ug);
  const limit_ug = fineShare(limit_gross_ug, shares.blend, metal);
  const finding = judgeLoss(shares.loss[metal], allowed_ug, limit_ug);
  return { worked, metal, allowed_ug, limit_gross_ug, limit_ug, finding };
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
