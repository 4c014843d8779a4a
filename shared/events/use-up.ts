/**
 * Use: metal that is used up for good: a sample that the assay takes, plating that is laid on pieces. It names the
 * test or the job that it was used for.
 */
import { accept, refuse } from '../book/draft.ts';
import { id, shortText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { drawAmount, drawnEntries, remainderToSign, statedAmountSchema } from './amount.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { findJob, findLot, findPlace, theAccount, usableLot } from './lookup.ts';
import { makeVoucher, weighingRows } from './make-voucher.ts';

const useUpSchema = z.strictObject({
  ...commonFields,
  place_id: id,
  lot_id: id,
  amount: statedAmountSchema,
  what_for: z.enum(['assay_sample', 'plating', 'other'], 'Say what it was used for.'),
  /** The laboratory's number of the test, or what else it was used for. */
  reference: shortText.nullable().default(null),
  job_id: id.nullable().default(null),
});
export type UseUpInput = z.output<typeof useUpSchema>;

export const useUp: EventDefinition<UseUpInput> = {
  name: 'use-up',
  schema: useUpSchema,
  action: 'book.use_up',
  summary: 'Books metal that is used up: an assay sample, plating laid on pieces.',
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
    const lot = findLot(facts, input.lot_id, 'lot_id');
    if (!lot.ok) return lot;
    const usable = input.what_for === 'assay_sample' ? lot : usableLot(lot.value, 'lot_id');
    if (!usable.ok) return usable;
    if (input.reference === null && input.job_id === null) {
      const sentence = 'It is not said what the metal was used for. Name the test, or choose the job.';
      return refuse({ code: 'invalid', field: 'reference', sentence });
    }
    const source = { account: place.value, lot: lot.value, job_id: input.job_id };
    const drawn = drawAmount(facts, source, input.amount, 'amount');
    if (!drawn.ok) return drawn;
    const variance = theAccount(facts, 'count_variance').id;
    const voucher = makeVoucher(facts, common.value, {
      kind: 'use_up',
      detail: {
        what_for: input.what_for,
        reference: input.reference,
        job_id: input.job_id,
        weighed: drawn.value.weighing === null ? null : 'yes',
        weighings: weighingRows([{ weighing: drawn.value.weighing, line: 1 }], facts, actor),
      },
      entries: drawnEntries(drawn.value, place.value.id, theAccount(facts, 'used_up').id, variance),
    });
    return accept({
      records: [voucher],
      handovers: [],
      second_signature: remainderToSign(drawn.value, place.value),
    });
  },
};
