/**
 * One lot of an outturn. What was sent and what is credited differ by four things, each in its own line: the assay
 * difference (for sweeps it goes back to the losses that the estimate came from), the refiner's deduction, charges
 * taken in metal, and the gross that is no settled metal. Foreign matter gets back exactly the gross that it gave.
 */
import type { Account } from '../../book/account.ts';
import { isPlace } from '../../book/account.ts';
import type { EntryDraft, Outcome } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import type { Facts, RecordedEntry } from '../../book/facts.ts';
import { heldOf } from '../../book/holding.ts';
import type { Lot } from '../../book/lot.ts';
import { apportion, takeGross } from '../../mass/apportion.ts';
import type { Micrograms } from '../../mass/micrograms.ts';
import { printGrams } from '../../mass/micrograms.ts';
import type { MassVector, Metal } from '../../mass/vector.ts';
import {
  METALS,
  ZERO_MASS,
  addMass,
  fineTotal,
  isZeroMass,
  massVector,
  negateMass,
} from '../../mass/vector.ts';
import { findLot, theAccount } from '../lookup.ts';
import type { OutturnLine } from './outturn-schema.ts';
import { fineMetal } from './standing-lot.ts';

export interface SettledLine {
  readonly lot: Lot;
  /** What leaves the refiner's place by this outturn, as the book had it. */
  readonly settled: MassVector;
  readonly credited: Readonly<Record<Metal, Micrograms>>;
  readonly deduction: MassVector;
  /** Book less assay, per metal. */
  readonly assay_difference: MassVector;
  /** Sent less arrived, told by the lot's first outturn and by no later one. */
  readonly weighing_difference: MassVector;
  readonly entries: readonly EntryDraft[];
}

/** Settles one lot; the credited metal itself is paid by the caller. Refuses what the paper can't say. */
export function settleLine(
  line: OutturnLine,
  refiner: Account,
  field: string,
  facts: Facts,
): Outcome<SettledLine> {
  const found = findSettled(line, refiner, field, facts);
  if (!found.ok) return found;
  const { lot, settled } = found.value;
  const metals = metalsOf(line, settled, field);
  if (!metals.ok) return metals;
  const { assayed, credited, charged } = metals.value;
  const each = (of: (metal: Metal) => Micrograms): MassVector => {
    const vector = {
      gold: of('gold'),
      silver: of('silver'),
      platinum: of('platinum'),
      palladium: of('palladium'),
    };
    return massVector({ ...vector, gross: METALS.reduce((sum, metal) => sum + vector[metal], 0n) });
  };
  const assay_difference = each((metal) => settled[metal] - assayed[metal]);
  const deduction = each((metal) => assayed[metal] - credited[metal]);
  const history = facts.lot_entries.filter((entry) => entry.lot_id === lot.id);
  const dirt = dirtOf(history, settled, lot, facts);
  const difference = differenceEntries(assay_difference, history, lot, facts);
  const gone = difference.reduce((sum, { mass }) => sum + mass.gross, dirt);
  const rest =
    settled.gross - gone - fineTotal(deduction) - METALS.reduce((sum, key) => sum + credited[key], 0n);
  const account = (kind: 'foreign_matter' | 'processors_deduction') => theAccount(facts, kind).id;
  const entries: EntryDraft[] = [
    entry(refiner.id, lot, negateMass(settled)),
    ...difference,
    entry(account('processors_deduction'), lot, addMass(deduction, massVector({ gross: rest }))),
    entry(account('foreign_matter'), lot, massVector({ gross: dirt })),
  ];
  const kept = each((metal) => charged[metal]);
  if (METALS.some((metal) => kept[metal] > deduction[metal])) {
    const sentence = 'More metal is charged than lies between assay and credit. Look at the statement again.';
    return refuse({ code: 'invalid', field: `${field}.metals`, sentence });
  }
  return accept({
    lot,
    settled,
    credited,
    deduction,
    assay_difference,
    weighing_difference: lostOnTheWay(history, facts),
    entries: entries.filter((e) => !isZeroMass(e.mass)),
  });
}

function entry(account_id: string, lot: Lot, mass: MassVector): EntryDraft {
  return { account_id, lot_id: lot.id, mass, pieces: null };
}

function findSettled(line: OutturnLine, refiner: Account, field: string, facts: Facts) {
  const lot = findLot(facts, line.lot_id, `${field}.lot_id`);
  if (!lot.ok) return lot;
  if (lot.value.owner_id !== null) {
    const sentence = `${lot.value.code} is not the house’s. Change its owner first, or have the refiner settle with the owner.`;
    return refuse({ code: 'wrong_owner', field: `${field}.lot_id`, sentence });
  }
  const held = heldOf(facts.holdings, refiner.id, line.lot_id).mass;
  if (isZeroMass(held)) {
    const sentence = `${refiner.name} holds nothing of ${lot.value.code}. Confirm its arrival first, or look at the earlier outturn.`;
    return refuse({ code: 'not_enough', field: `${field}.lot_id`, sentence });
  }
  if (line.settle.how === 'all') return accept({ lot: lot.value, settled: held });
  if (line.settle.gross_g > held.gross) {
    const sentence = `${refiner.name} holds ${printGrams(held.gross, 3)} g of ${lot.value.code}. No more than that can be settled.`;
    return refuse({ code: 'not_enough', field: `${field}.settle.gross_g`, sentence });
  }
  return accept({ lot: lot.value, settled: takeGross(held, line.settle.gross_g) });
}

type PerMetal = Readonly<Record<Metal, Micrograms>>;

/** A metal that the statement does not name was not paid for: it is taken as found, and kept by the refiner. */
function metalsOf(
  line: OutturnLine,
  settled: MassVector,
  field: string,
): Outcome<{ assayed: PerMetal; credited: PerMetal; charged: PerMetal }> {
  const seen = new Set<Metal>();
  for (const [index, row] of line.metals.entries()) {
    const at = `${field}.metals.${index}`;
    if (seen.has(row.metal)) {
      return refuse({
        code: 'invalid',
        field: `${at}.metal`,
        sentence: `The ${row.metal} of this lot stands here twice. Put it together.`,
      });
    }
    seen.add(row.metal);
    if (row.credited_g > row.assayed_g) {
      const sentence = `More ${row.metal} is credited than was found. Look at the statement again.`;
      return refuse({ code: 'invalid', field: `${at}.credited_g`, sentence });
    }
  }
  const of = (key: 'assayed_g' | 'credited_g' | 'charge_g'): PerMetal => {
    const value = (metal: Metal) =>
      line.metals.find((row) => row.metal === metal)?.[key] ?? (key === 'assayed_g' ? settled[metal] : 0n);
    return {
      gold: value('gold'),
      silver: value('silver'),
      platinum: value('platinum'),
      palladium: value('palladium'),
    };
  };
  return accept({ assayed: of('assayed_g'), credited: of('credited_g'), charged: of('charge_g') });
}

/**
 * Gross that the lot drew from foreign matter and that has not gone back yet: all of it with the last of the lot, so
 * that nothing of a settled lot stays there; before that the share of this part.
 */
function dirtOf(history: readonly RecordedEntry[], settled: MassVector, lot: Lot, facts: Facts): Micrograms {
  const account_id = theAccount(facts, 'foreign_matter').id;
  const drawn = history.filter((e) => e.account_id === account_id).reduce((sum, e) => sum - e.mass.gross, 0n);
  if (drawn <= 0n) return 0n;
  const lying = facts.holdings
    .filter((h) => h.lot_id === lot.id && isPlace(facts.accounts.get(h.account_id)?.kind ?? 'sold'))
    .reduce((sum, h) => sum + h.mass.gross, 0n);
  if (lying <= settled.gross) return drawn;
  const [share = 0n] = apportion(drawn, [settled.gross, lying - settled.gross]);
  return share;
}

function lostOnTheWay(history: readonly RecordedEntry[], facts: Facts): MassVector {
  if (history.some((e) => e.voucher_kind === 'outturn' && e.reversed_by === null)) return ZERO_MASS;
  const off = history.filter(
    (e) =>
      e.voucher_kind === 'arrive' &&
      e.reversed_by === null &&
      facts.accounts.get(e.account_id)?.kind === 'count_variance',
  );
  return off.reduce((sum, e) => addMass(sum, e.mass), ZERO_MASS);
}

/**
 * Who gave the estimate gets the difference, with its weight: the losses, by what each gave of a metal. Else it is assay
 * variance, fine metal only: what was no gold weighed as much all the same.
 */
function differenceEntries(
  difference: MassVector,
  history: readonly RecordedEntry[],
  lot: Lot,
  facts: Facts,
): readonly EntryDraft[] {
  const given = new Map<string, MassVector>();
  for (const e of history) {
    if (e.voucher_kind !== 'sweep_up' || e.reversed_by !== null) continue;
    if (facts.accounts.get(e.account_id)?.kind !== 'working_loss') continue;
    given.set(e.account_id, addMass(given.get(e.account_id) ?? ZERO_MASS, negateMass(e.mass)));
  }
  if (given.size === 0)
    return [entry(theAccount(facts, 'assay_variance').id, lot, { ...difference, gross: 0n })];
  const accounts = [...given.keys()];
  return METALS.flatMap((metal) => {
    const weights = accounts.map((id) => given.get(id)?.[metal] ?? 0n);
    const all = accounts.map((id) => given.get(id)?.gross ?? 0n);
    const size = difference[metal] < 0n ? -difference[metal] : difference[metal];
    const byMetal = weights.some((weight) => weight > 0n) ? weights : all;
    const shares = byMetal.some((weight) => weight > 0n) ? apportion(size, byMetal) : [size];
    return shares.map((share, index) =>
      entry(accounts[index] ?? '', lot, fineMetal(metal, difference[metal] < 0n ? -share : share)),
    );
  }).filter((e) => !isZeroMass(e.mass));
}
