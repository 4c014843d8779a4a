/**
 * Handover between persons (DESIGN section 3): metal that changes hands waits until the receiver acknowledges it or
 * disputes it. Until then the giver answers for it.
 */
import type { Account } from '../book/account.ts';
import type { Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts } from '../book/facts.ts';
import type { HandoverDraft } from './definition.ts';

/** Who receives at a place: the person named, else its custodian, else nobody. Refuses a person who has left. */
export function receiverAt(
  facts: Facts,
  place: Account,
  person_id: string | null,
  field: string,
): Outcome<string | null> {
  if (person_id === null) return accept(place.custodian_id);
  const person = facts.people.get(person_id);
  if (person === undefined) {
    const sentence = 'That person is not in the workshop. Choose one from the list.';
    return refuse({ code: 'not_found', field, sentence });
  }
  if (!person.active || person.role === 'auditor') {
    const sentence = `${person.name} can’t take metal any more. Choose who really receives it.`;
    return refuse({ code: 'not_permitted', field, sentence });
  }
  return accept(person_id);
}

/** The handover of a voucher, or none where nobody else receives. */
export function handoverOf(
  facts: Facts,
  of: {
    readonly voucher_id: string;
    readonly place_id: string;
    readonly giver_id: string;
    readonly receiver_id: string | null;
  },
): readonly HandoverDraft[] {
  const { voucher_id, place_id, giver_id, receiver_id } = of;
  if (receiver_id === null || receiver_id === giver_id) return [];
  return [{ id: facts.ids.id(), voucher_id, place_id, from_person_id: giver_id, to_person_id: receiver_id }];
}
