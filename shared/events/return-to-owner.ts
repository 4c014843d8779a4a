/** Return to owner: a customer's or supplier's own metal goes back to the owner, from any place where it lies. */
import type { Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts, Party } from '../book/facts.ts';
import type { Lot } from '../book/lot.ts';
import { id } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { amountSchema, drawAmount, drawnEntries, remainderToSign } from './amount.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { findJob, findLot, findPlace, partyAccount, theAccount } from './lookup.ts';
import { makeVoucher, weighingRows } from './make-voucher.ts';

const returnToOwnerSchema = z.strictObject({
  ...commonFields,
  place_id: id,
  lot_id: id,
  amount: amountSchema,
  job_id: id.nullable().default(null),
});
export type ReturnToOwnerInput = z.output<typeof returnToOwnerSchema>;

export const returnToOwner: EventDefinition<ReturnToOwnerInput> = {
  name: 'return-to-owner',
  schema: returnToOwnerSchema,
  action: 'book.ownership',
  summary: 'Gives a customer’s or supplier’s own metal back.',
  needs: (input) => ({
    place_ids: [input.place_id],
    lot_ids: [input.lot_id],
    job_ids: input.job_id === null ? [] : [input.job_id],
    document_ids: input.document_ids,
  }),
  draft(input, facts, actor) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const place = findPlace(facts, input.place_id, 'place_id');
    if (!place.ok) return place;
    const job = findJob(facts, input.job_id, 'job_id');
    if (!job.ok) return job;
    const owned = ownedLot(input.lot_id, facts);
    if (!owned.ok) return owned;
    const { lot, owner } = owned.value;
    const kind = owner.kind === 'supplier' ? 'supplier' : 'customer';
    const account = partyAccount(facts, owner, kind, 'lot_id');
    if (!account.ok) return account;
    const drawn = drawAmount(
      facts,
      { account: place.value, lot, job_id: input.job_id },
      input.amount,
      'amount',
    );
    if (!drawn.ok) return drawn;
    const voucher = makeVoucher(facts, common.value, {
      kind: 'return_to_owner',
      detail: {
        counterparty_id: owner.id,
        owner_id: owner.id,
        job_id: input.job_id,
        weighings: weighingRows([{ weighing: drawn.value.weighing, line: 1 }], facts, actor),
      },
      entries: drawnEntries(
        drawn.value,
        place.value.id,
        account.value.id,
        theAccount(facts, 'count_variance').id,
      ),
    });
    return accept({
      records: [voucher],
      handovers: [],
      second_signature: remainderToSign(drawn.value, place.value),
    });
  },
};

/** A lot of somebody else's and whose it is. Refuses the house's own. */
function ownedLot(lot_id: string, facts: Facts): Outcome<{ readonly lot: Lot; readonly owner: Party }> {
  const lot = findLot(facts, lot_id, 'lot_id');
  if (!lot.ok) return lot;
  const owner = lot.value.owner_id === null ? undefined : facts.parties.get(lot.value.owner_id);
  if (owner !== undefined) return accept({ lot: lot.value, owner });
  const sentence = `Lot ${lot.value.code} is the house’s own, so nobody gets it back. Deliver it, or change the owner first.`;
  return refuse({ code: 'wrong_owner', field: 'lot_id', sentence });
}
