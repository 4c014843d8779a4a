/**
 * Dispute a handover: the receiver weighed it and something else is there. Nothing moves; until a second weighing
 * before both the giver answers for it.
 */
import { accept, refuse } from '../book/draft.ts';
import { printGrams } from '../mass/micrograms.ts';
import { sumMass } from '../mass/vector.ts';
import { id, optionalNote } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { netOf, weighingSchema } from '../weighing/weighing.ts';
import type { EventDefinition } from './definition.ts';
import { recordsOnly } from './definition.ts';
import { answerAct, answerFields, findHandover } from './handover-answer.ts';
import { weighingRows } from './make-voucher.ts';

const disputeSchema = z.strictObject({
  ...answerFields,
  voucher_id: id,
  /** What the receiver's balance shows for all that was handed over. */
  weighing: weighingSchema,
  note: optionalNote,
});
export type DisputeHandoverInput = z.output<typeof disputeSchema>;

export const disputeHandover: EventDefinition<DisputeHandoverInput> = {
  name: 'dispute-handover',
  schema: disputeSchema,
  action: 'handover.acknowledge',
  summary: 'Disputes metal that was handed over, with the weight that is really there.',
  needs: (input) => ({ voucher_ids: [input.voucher_id] }),
  draft(input, facts, actor) {
    const handover = findHandover(input, facts, actor, ['waiting']);
    if (!handover.ok) return handover;
    const net = netOf(input.weighing, 'weighing');
    if (!net.ok) return net;
    const entries = facts.vouchers.get(input.voucher_id)?.entries ?? [];
    const there = entries.filter(
      (entry) => entry.account_id === handover.value.place_id && entry.mass.gross > 0n,
    );
    const booked = sumMass(there.map((entry) => entry.mass)).gross;
    if (booked === net.value) {
      const sentence = `The book says ${printGrams(booked, 3)} g too, so there is nothing to dispute. Acknowledge it.`;
      return refuse({ code: 'invalid', field: 'weighing.gross_g', sentence });
    }
    const detail = {
      gross_g: printGrams(net.value),
      booked_gross_g: printGrams(booked),
      note: input.note,
      weighings: weighingRows([{ weighing: input.weighing, line: 1 }], facts, actor),
    };
    const act = answerAct('handover_disputed', handover.value, input.how, facts, detail);
    return accept(recordsOnly([{ ...act, note: input.note }]));
  },
};
