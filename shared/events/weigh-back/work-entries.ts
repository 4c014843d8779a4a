/** The entries of one job's voucher beside its parts: what leaves the place, the loss, the dirt in the filings. */
import type { Account } from '../../book/account.ts';
import type { EntryDraft } from '../../book/draft.ts';
import type { Lot } from '../../book/lot.ts';
import type { MassVector } from '../../mass/vector.ts';
import { massVector, negateMass, subtractMass } from '../../mass/vector.ts';
import { theAccount } from '../lookup.ts';
import type { MadeLot } from './lots-made.ts';
import type { AllMade } from './made-parts.ts';
import type { OutLot, ReOwned } from './out.ts';
import type { Shares } from './shares.ts';
import type { Counter } from './weigh-back.ts';

/** What leaves the place: each lot that was out, the consumed part in the lot that it stands in now. */
export function outEntries(
  before: readonly OutLot[],
  owned: ReOwned,
  shares: Shares,
  counter: Counter,
): readonly EntryDraft[] {
  const out = (lot_id: string, mass: MassVector, pieces: bigint | null): EntryDraft => ({
    account_id: counter.place.id,
    lot_id,
    mass: negateMass(mass),
    pieces: pieces === null ? null : -pieces,
  });
  return before.flatMap((lot, index) => {
    const now = owned.lots[index] ?? lot;
    if (now.lot.id === lot.lot.id) return [out(lot.lot.id, lot.mass, lot.pieces)];
    const consumed = shares.consumed[index] ?? lot.mass;
    return [out(lot.lot.id, subtractMass(lot.mass, consumed), lot.pieces), out(now.lot.id, consumed, null)];
  });
}

/** The dirt in filings is no metal of the house: its gross comes from foreign matter, in the filings' name. */
export function dirtEntries(
  filings: readonly MadeLot[],
  shares: Shares,
  counter: Counter,
): readonly EntryDraft[] {
  const account_id = theAccount(counter.facts, 'foreign_matter').id;
  return filings.map((part, index) => ({
    account_id,
    lot_id: part.entry.lot_id,
    mass: massVector({ gross: -(shares.filings[index]?.dirt_ug ?? 0n) }),
    pieces: null,
  }));
}

/** The loss stands in the name of the work, or of the chief input; what a lot is heavier by, in its own name. */
export function lossEntries(
  made: AllMade,
  chief: Lot,
  shares: Shares,
  account: Account,
): readonly EntryDraft[] {
  const entry = (lot_id: string, mass: MassVector) => ({
    account_id: account.id,
    lot_id,
    mass,
    pieces: null,
  });
  return [
    entry(made.work[0]?.entry.lot_id ?? chief.id, shares.loss),
    ...shares.more.map((more) => entry(more.lot_id, negateMass(more.mass))),
  ];
}
