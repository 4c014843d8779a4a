/** What every event may be told beside its own entries: business date, remark and files. */
import type { DocumentRef, Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts } from '../book/facts.ts';
import { businessDate, documentIds, optionalNote } from '../schemas/primitives.ts';
import { businessDateOf } from './business-date.ts';

export const commonFields = {
  business_date: businessDate.nullable().default(null),
  note: optionalNote,
  document_ids: documentIds,
};

export interface CommonInput {
  readonly business_date: string | null;
  readonly note: string | null;
  readonly document_ids: readonly string[];
}

/** The same, checked: what each record of the event carries. */
export interface Common {
  readonly business_date: string;
  readonly note: string | null;
  readonly documents: readonly DocumentRef[];
}

/** Files by id. Refuses one that was never uploaded. */
export function documentsOf(
  ids: readonly string[],
  facts: Facts,
  field: string,
): Outcome<readonly DocumentRef[]> {
  const found: DocumentRef[] = [];
  for (const id of new Set(ids)) {
    const known = facts.documents.get(id);
    if (known === undefined) {
      const sentence = 'A file of this voucher was not received. Add it again.';
      return refuse({ code: 'not_found', field, sentence });
    }
    found.push(known);
  }
  return accept(found);
}

/** Date, remark and files of an event. Refuses a date ahead or in a closed period, and an unknown file. */
export function readCommon(input: CommonInput, facts: Facts): Outcome<Common> {
  const date = businessDateOf(input.business_date, facts);
  if (!date.ok) return date;
  const documents = documentsOf(input.document_ids, facts, 'document_ids');
  if (!documents.ok) return documents;
  return accept({ business_date: date.value, note: input.note, documents: documents.value });
}
