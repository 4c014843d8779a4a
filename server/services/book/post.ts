/**
 * The one way into the book: drafts become lines, and the database's own function numbers, times, hashes and stores
 * them. Nothing else in the program writes a record.
 */
import type { RecordDraft } from '../../../shared/book/draft.ts';
import type { HandoverDraft } from '../../../shared/events/definition.ts';
import { recordLineParts } from '../../../shared/chain/record-line.ts';
import type { UnchainedRecord } from '../../../shared/chain/record-line.ts';
import { printGrams } from '../../../shared/mass/micrograms.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';

export const postedRecord = z.object({
  id: z.string(),
  kind: z.string(),
  sequence: z.string(),
  recorded_at: z.string(),
  hash: z.string(),
});
export type PostedRecord = z.output<typeof postedRecord>;

export interface Signatories {
  /** Who records. */
  readonly person_id: string;
  /** Who approved, where a second signature was asked for. */
  readonly approved_by: string | null;
}

/**
 * Posts drafts in their order, in the open transaction; gives sequence, time and hash of each.
 * Throws the database's refusal where a rule of the book is broken (see `db/database-problem.ts`).
 * `at` is a seed's own time and is taken from the owner's role only.
 */
export async function postRecords(
  tx: Tx,
  drafts: readonly RecordDraft[],
  by: Signatories,
  options: {
    readonly handovers?: readonly HandoverDraft[];
    readonly at?: Date | null;
  } = {},
): Promise<PostedRecord[]> {
  const parts = drafts.map((draft) => {
    const { head, middle } = recordLineParts(unchained(draft, by));
    return { head, middle };
  });
  const { posted } = await tx.one(
    z.object({ posted: z.array(postedRecord) }),
    'SELECT post_records($1::jsonb, $2::jsonb, $3::timestamptz) AS posted',
    [JSON.stringify(parts), JSON.stringify(options.handovers ?? []), options.at ?? null],
  );
  return posted;
}

/** A draft as the chain writes it, but for what only the database gives. */
export function unchained(draft: RecordDraft, by: Signatories): UnchainedRecord {
  return {
    id: draft.id,
    kind: draft.kind,
    business_date: draft.business_date,
    note: draft.note,
    detail: draft.detail,
    documents: draft.documents.map(({ id, sha256 }) => ({ id, sha256 })),
    recorded_by: by.person_id,
    approved_by: by.approved_by,
    reverses: draft.type === 'voucher' ? draft.reverses : null,
    entries:
      draft.type === 'act'
        ? []
        : draft.entries.map((entry, index) => ({
            account_id: entry.account_id,
            lot_id: entry.lot_id,
            line: String(index + 1),
            gross_g: printGrams(entry.mass.gross),
            gold_g: printGrams(entry.mass.gold),
            silver_g: printGrams(entry.mass.silver),
            platinum_g: printGrams(entry.mass.platinum),
            palladium_g: printGrams(entry.mass.palladium),
            pieces: entry.pieces === null ? null : entry.pieces.toString(),
          })),
  };
}
