/**
 * The accounts that every workshop begins with: a safe, the results, opening stock, sold metal, and the usual
 * operations (common practice, no source; the workshop opens more). All by acts of the chain.
 */
import { randomUUID } from 'node:crypto';
import type { AccountKind } from '../../../shared/book/account.ts';
import type { ActDraft } from '../../../shared/book/draft.ts';
import type { Tx } from '../../db/rows.ts';
import { postRecords } from '../book/post.ts';

const PLAIN: readonly (readonly [AccountKind, string])[] = [
  ['opening_stock', 'Opening stock'],
  ['sold', 'Sold'],
  ['count_variance', 'Count variance'],
  ['assay_variance', 'Assay variance'],
  ['processors_deduction', 'Processor’s deduction'],
  ['used_up', 'Used up'],
  ['written_off', 'Written off'],
  ['foreign_matter', 'Foreign matter'],
];

const OPERATIONS: readonly (readonly [string, string])[] = [
  ['sheet_work', 'Sheet work'],
  ['filing', 'Filing'],
  ['soldering', 'Soldering'],
  ['setting', 'Setting'],
  ['polishing', 'Polishing'],
  ['casting', 'Casting'],
  ['melting', 'Melting'],
  ['rolling', 'Rolling'],
  ['drawing', 'Drawing'],
  ['plating', 'Plating'],
  ['stripping', 'Stripping'],
  ['repair', 'Repair'],
];

/** Opens them in the workshop of the open transaction; `person_id` records, and answers for the safe. */
export async function openStartingAccounts(
  tx: Tx,
  person_id: string,
  business_date: string,
  at: Date | null = null,
): Promise<void> {
  const acts = [
    opened('safe', 'Safe', { custodian_id: person_id, operation: null }, business_date),
    ...PLAIN.map(([kind, name]) =>
      opened(kind, name, { custodian_id: null, operation: null }, business_date),
    ),
    ...OPERATIONS.map(([operation, name]) =>
      opened('working_loss', name, { custodian_id: null, operation }, business_date),
    ),
  ];
  await postRecords(tx, acts, { person_id, approved_by: null }, { at });
}

function opened(
  kind: AccountKind,
  name: string,
  of: { readonly custodian_id: string | null; readonly operation: string | null },
  business_date: string,
): ActDraft {
  return {
    type: 'act',
    id: randomUUID(),
    kind: 'account_opened',
    business_date,
    note: null,
    documents: [],
    detail: { account_id: randomUUID(), kind, name, party_id: null, ...of },
  };
}
