/** Explaining a loss over the allowance: it stays "to be explained" until a second person signs a cause. */
import { accept, refuse } from '../../book/draft.ts';
import { detailLeaf } from '../../book/facts.ts';
import { id, longText } from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import type { EventDefinition } from '../definition.ts';
import { act } from './act.ts';

const schema = z.strictObject({ voucher_id: id, cause: longText });

/** Signs the cause of a loss over the allowance. Whoever recorded the loss needs a second person to sign it. */
export const explainLoss: EventDefinition<z.output<typeof schema>> = {
  name: 'explain-loss',
  schema,
  action: 'loss.explain',
  summary: 'Signs the cause of a loss that passed its allowance.',
  needs: (input) => ({ voucher_ids: [input.voucher_id] }),
  draft(input, facts, actor) {
    const voucher = facts.vouchers.get(input.voucher_id);
    if (voucher === undefined || detailLeaf(voucher.detail, 'to_explain') !== 'yes') {
      const sentence = 'No loss of that voucher waits for an explanation. Look at the list again.';
      return refuse({ code: 'not_found', field: 'voucher_id', sentence });
    }
    const detail = { voucher_id: voucher.id, what: 'loss_over_allowance', cause: input.cause };
    return accept({
      records: [act('dispute_closed', detail, facts)],
      handovers: [],
      second_signature:
        voucher.recorded_by === actor.person_id ? 'Whoever recorded a loss does not explain it alone.' : null,
    });
  },
};
