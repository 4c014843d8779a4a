/**
 * Ownership: metal changes its owner and stays where it is: a lot that the house buys or sells, or house metal that
 * makes good what an owner lost. Two sign it; inside a repair it stands before the voucher that needs it.
 */
import type { Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts } from '../book/facts.ts';
import type { Lot } from '../book/lot.ts';
import { id, shortText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { drawAmount, statedAmountSchema } from './amount.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { findJob, findLot, findParty, findPlace } from './lookup.ts';
import { ownershipRecords } from './ownership-records.ts';

const ownershipSchema = z.strictObject({
  ...commonFields,
  place_id: id,
  lot_id: id,
  amount: statedAmountSchema,
  /** None: the house. */
  new_owner_id: id.nullable(),
  what_for: shortText,
  job_id: id.nullable().default(null),
});
export type OwnershipInput = z.output<typeof ownershipSchema>;

export const ownership: EventDefinition<OwnershipInput> = {
  name: 'ownership',
  schema: ownershipSchema,
  action: 'book.ownership',
  summary: 'Changes the owner of metal that stays where it is.',
  needs: (input) => ({
    place_ids: [input.place_id],
    lot_ids: [input.lot_id],
    party_ids: input.new_owner_id === null ? [] : [input.new_owner_id],
    job_ids: input.job_id === null ? [] : [input.job_id],
    document_ids: input.document_ids,
  }),
  draft(input, facts, actor) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const place = findPlace(facts, input.place_id, 'place_id');
    if (!place.ok) return place;
    const lot = lotOfAnother(input, facts);
    if (!lot.ok) return lot;
    const job = findJob(facts, input.job_id, 'job_id');
    if (!job.ok) return job;
    const source = { account: place.value, lot: lot.value, job_id: input.job_id };
    const drawn = drawAmount(facts, source, input.amount, 'amount');
    if (!drawn.ok) return drawn;
    if (drawn.value.last !== null) {
      const sentence =
        'Nothing leaves the place, so no container is empty now. Enter what the balance shows.';
      return refuse({ code: 'invalid', field: 'amount.emptied', sentence });
    }
    const { records } = ownershipRecords(facts, common.value, actor, {
      ...drawn.value,
      place: place.value,
      new_owner_id: input.new_owner_id,
      what_for: input.what_for,
      job_id: input.job_id,
    });
    const second_signature = `Lot ${lot.value.code} changes its owner only when a second person signs.`;
    return accept({ records, handovers: [], second_signature });
  },
};

function lotOfAnother(input: OwnershipInput, facts: Facts): Outcome<Lot> {
  const owner =
    input.new_owner_id === null ? accept(null) : findParty(facts, input.new_owner_id, 'new_owner_id');
  if (!owner.ok) return owner;
  const lot = findLot(facts, input.lot_id, 'lot_id');
  if (!lot.ok) return lot;
  if (lot.value.owner_id !== input.new_owner_id) return lot;
  const sentence = `Lot ${lot.value.code} belongs to ${owner.value?.name ?? 'the house'} already. Choose another owner.`;
  return refuse({ code: 'wrong_owner', field: 'new_owner_id', sentence });
}
