/** A draft as JSON: masses in grams, so that a queue or a form can show what would be posted. */
import type { RecordDraft } from '../../shared/book/draft.ts';
import { massToJson } from '../../shared/mass/vector.ts';
import type { DraftPreview } from '../../shared/schemas/signature-request.ts';

export function presentDrafts(records: readonly RecordDraft[]): DraftPreview {
  return records.map((record) => ({
    kind: record.kind,
    business_date: record.business_date,
    note: record.note,
    detail: { ...record.detail },
    entries:
      record.type === 'act'
        ? []
        : record.entries.map((entry) => ({
            account_id: entry.account_id,
            lot_id: entry.lot_id,
            ...massToJson(entry.mass),
            pieces: entry.pieces?.toString() ?? null,
          })),
  }));
}
