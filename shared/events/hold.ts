/** Hold: a lot is set aside, perhaps until a date. It can't be issued or melted until it is released. */
import { accept, refuse } from '../book/draft.ts';
import { businessDate, id, shortText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { recordsOnly } from './definition.ts';
import { findLot } from './lookup.ts';

const holdSchema = z.strictObject({
  ...commonFields,
  lot_id: id,
  reason: shortText,
  until: businessDate.nullable().default(null),
});
export type HoldInput = z.output<typeof holdSchema>;

export const hold: EventDefinition<HoldInput> = {
  name: 'hold',
  schema: holdSchema,
  action: 'book.hold',
  summary: 'Sets a lot aside with a reason, perhaps until a date.',
  needs: (input) => ({ lot_ids: [input.lot_id], document_ids: input.document_ids }),
  draft(input, facts) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const lot = findLot(facts, input.lot_id, 'lot_id');
    if (!lot.ok) return lot;
    const { code, standing, hold_reason } = lot.value;
    if (standing === 'spent') {
      const sentence = `Lot ${code} is spent: nothing of it is left to hold. Look at the label again.`;
      return refuse({ code: 'lot_spent', field: 'lot_id', sentence });
    }
    if (standing === 'on_hold') {
      const sentence = `Lot ${code} is on hold already: ${hold_reason ?? 'no reason given'}. Release it first if the reason has changed.`;
      return refuse({ code: 'lot_on_hold', field: 'lot_id', sentence });
    }
    if (input.until !== null && input.until < common.value.business_date) {
      const sentence = `${input.until} is past. Enter a later date, or leave it empty.`;
      return refuse({ code: 'invalid', field: 'until', sentence });
    }
    const detail = { lot_id: lot.value.id, reason: input.reason, until: input.until };
    return accept(
      recordsOnly([{ type: 'act', id: facts.ids.id(), kind: 'lot_held', ...common.value, detail }]),
    );
  },
};
