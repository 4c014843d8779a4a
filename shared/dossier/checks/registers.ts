/**
 * The registers that vouchers rest on: an account is opened once and before it is used, a lot is described once and
 * before it is moved, so that neither can be relabelled; and every head that the book itself names is a true one.
 */
import type { ChainRecord } from '../../chain/record-line.ts';
import type { Finding } from '../finding.ts';
import type { HashedRecord } from '../replay.ts';
import { leafOf } from '../replay.ts';

/** Accounts and lots that are opened twice, of an unknown kind, or used before they stand in the book. */
export function registersStand(records: readonly ChainRecord[]): readonly Finding[] {
  const accounts = new Set<string>();
  const lots = new Set<string>();
  return records.flatMap((record) => {
    const at = record.sequence;
    const findings: Finding[] = [];
    if (record.kind === 'account_opened' && !takeNew(accounts, leafOf(record, 'account_id')))
      findings.push({ at, sentence: `Record ${at} opens an account that is open already.` });
    if (record.kind === 'lot_described' && !takeNew(lots, leafOf(record, 'lot_id')))
      findings.push({ at, sentence: `Record ${at} describes a lot that is described already.` });
    if (record.entries.some(({ account_id }) => !accounts.has(account_id)))
      findings.push({ at, sentence: `Voucher ${at} names an account that was not opened before it.` });
    if (record.entries.some(({ lot_id }) => !lots.has(lot_id)))
      findings.push({ at, sentence: `Voucher ${at} names a lot that was not described before it.` });
    return findings;
  });
}

function takeNew(known: Set<string>, id: string | null): boolean {
  if (id === null || known.has(id)) return false;
  known.add(id);
  return true;
}

/** Acts that say a dossier was made up to a head, where the chain has another record there. */
export function namedHeads(chain: readonly HashedRecord[]): readonly Finding[] {
  const hashes = new Map<string, string>();
  return chain.flatMap(({ record, hash }) => {
    const at = record.sequence;
    const sequence = leafOf(record, 'sequence');
    const isTrue =
      record.kind !== 'dossier_made' ||
      (sequence !== null && hashes.get(sequence) === leafOf(record, 'hash'));
    hashes.set(at, hash);
    return isTrue
      ? []
      : [
          {
            at,
            sentence: `Record ${at} says that a dossier ended at record ${sequence ?? 'none'}, which had another hash then: what came before was rewritten.`,
          },
        ];
  });
}
