/**
 * Acknowledge: the receiver of a handover says that the metal is there, in the own session or by PIN at the counter.
 * The server checks the PIN before this is asked; it never stands in a record.
 */
import { accept } from '../book/draft.ts';
import { id } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import type { EventDefinition } from './definition.ts';
import { recordsOnly } from './definition.ts';
import { answerAct, answerFields, findHandover } from './handover-answer.ts';

const acknowledgeSchema = z.strictObject({ ...answerFields, voucher_id: id });
export type AcknowledgeInput = z.output<typeof acknowledgeSchema>;

export const acknowledge: EventDefinition<AcknowledgeInput> = {
  name: 'acknowledge',
  schema: acknowledgeSchema,
  action: 'handover.acknowledge',
  summary: 'Acknowledges metal that was handed over.',
  needs: (input) => ({ voucher_ids: [input.voucher_id] }),
  draft(input, facts, actor) {
    const handover = findHandover(input, facts, actor, ['waiting']);
    if (!handover.ok) return handover;
    return accept(recordsOnly([answerAct('handover_acknowledged', handover.value, input.how, facts, {})]));
  },
};
