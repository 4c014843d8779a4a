/** Makes the draft of an act without entries, dated today. */
import type { ActDraft, Detail } from '../../book/draft.ts';
import type { Facts } from '../../book/facts.ts';
import type { ActKind } from '../../book/kinds.ts';

export function act(kind: ActKind, detail: Detail, facts: Facts): ActDraft {
  return {
    type: 'act',
    id: facts.ids.id(),
    kind,
    business_date: facts.today,
    note: null,
    detail,
    documents: [],
  };
}
