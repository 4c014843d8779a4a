/** Zero sums of every voucher in all five masses, and no place below nothing at any record or at the end of any day. */
import { isPlace } from '../../book/account.ts';
import { isVoucherKind } from '../../book/kinds.ts';
import type { ChainRecord } from '../../chain/record-line.ts';
import type { MassVector } from '../../mass/vector.ts';
import { ZERO_MASS, addMass, hasNegative, isPossibleMass, isZeroMass } from '../../mass/vector.ts';
import type { Finding } from '../finding.ts';
import type { AccountState } from '../replay.ts';
import { accountsOf, entryMass, entryPieces } from '../replay.ts';

/** Vouchers that don't sum to nothing, or have fewer than two entries; acts that have any. */
export function zeroSums(records: readonly ChainRecord[]): readonly Finding[] {
  return records.flatMap((record) => {
    const sum = record.entries.reduce((total, entry) => addMass(total, entryMass(entry)), ZERO_MASS);
    if (!isVoucherKind(record.kind)) {
      return record.entries.length === 0
        ? []
        : [{ at: record.sequence, sentence: `Record ${record.sequence} is an act and has entries.` }];
    }
    if (record.entries.length < 2)
      return [{ at: record.sequence, sentence: `Voucher ${record.sequence} has fewer than two entries.` }];
    return isZeroMass(sum)
      ? []
      : [{ at: record.sequence, sentence: `Voucher ${record.sequence} does not sum to nothing.` }];
  });
}

/** Places that hold less than nothing of a lot after a record, or more precious metal than gross. */
export function neverBelow(records: readonly ChainRecord[]): readonly Finding[] {
  const accounts = accountsOf(records);
  const held = new Map<string, { mass: MassVector; pieces: bigint }>();
  const findings: Finding[] = [];
  for (const record of records) {
    const touched = new Set<string>();
    for (const entry of record.entries) {
      const account = accounts.get(entry.account_id);
      if (account === undefined || !isPlace(account.kind)) continue;
      const key = `${entry.account_id} ${entry.lot_id}`;
      const known = held.get(key) ?? { mass: ZERO_MASS, pieces: 0n };
      held.set(key, {
        mass: addMass(known.mass, entryMass(entry)),
        pieces: known.pieces + entryPieces(entry),
      });
      touched.add(key);
    }
    for (const key of touched) {
      const now = held.get(key);
      if (now === undefined || (isPossibleMass(now.mass) && now.pieces >= 0n)) continue;
      const [account_id = ''] = key.split(' ');
      findings.push({
        at: record.sequence,
        sentence: `After voucher ${record.sequence} ${accounts.get(account_id)?.name ?? 'a place'} holds less than nothing of a lot, or more fine metal than gross.`,
      });
    }
  }
  return [...findings, ...dayEnds(records, accounts)];
}

/** The same at the end of each business day, in the order of the days. */
function dayEnds(
  records: readonly ChainRecord[],
  accounts: ReadonlyMap<string, AccountState>,
): readonly Finding[] {
  const moves = new Map<string, Map<string, { mass: MassVector; last: string }>>();
  for (const record of records) {
    for (const entry of record.entries) {
      const account = accounts.get(entry.account_id);
      if (account === undefined || !isPlace(account.kind)) continue;
      const key = `${entry.account_id} ${entry.lot_id}`;
      const days = moves.get(key) ?? new Map<string, { mass: MassVector; last: string }>();
      const day = days.get(record.business_date);
      days.set(record.business_date, {
        mass: addMass(day?.mass ?? ZERO_MASS, entryMass(entry)),
        last: record.sequence,
      });
      moves.set(key, days);
    }
  }
  const findings: Finding[] = [];
  for (const [key, days] of moves) {
    let sum = ZERO_MASS;
    for (const [date, { mass, last }] of [...days].sort(([a], [b]) => a.localeCompare(b))) {
      sum = addMass(sum, mass);
      if (!hasNegative(sum)) continue;
      const [account_id = ''] = key.split(' ');
      findings.push({
        at: last,
        sentence: `${date} ends with less than nothing of a lot at ${accounts.get(account_id)?.name ?? 'a place'}.`,
      });
    }
  }
  return findings;
}
