/** Release: a lot on hold may be used again, once its checks are in or its date has come. */
import { accept, refuse } from '../book/draft.ts';
import { id, shortText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { recordsOnly } from './definition.ts';
import { findLot } from './lookup.ts';

const releaseSchema = z.strictObject({ ...commonFields, lot_id: id, reason: shortText });
export type ReleaseInput = z.output<typeof releaseSchema>;

export const release: EventDefinition<ReleaseInput> = {
  name: 'release',
  schema: releaseSchema,
  action: 'book.hold',
  summary: 'Releases a lot that was on hold.',
  needs: (input) => ({ lot_ids: [input.lot_id], document_ids: input.document_ids }),
  draft(input, facts) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const lot = findLot(facts, input.lot_id, 'lot_id');
    if (!lot.ok) return lot;
    const { code, standing, hold_until } = lot.value;
    if (standing !== 'on_hold') {
      const sentence = `Lot ${code} is not on hold, so there is nothing to release. Look at the label again.`;
      return refuse({ code: 'lot_not_on_hold', field: 'lot_id', sentence });
    }
    if (hold_until !== null && facts.today < hold_until) {
      const sentence = `Lot ${code} is on hold until ${hold_until}. It can be released from that day on.`;
      return refuse({ code: 'lot_on_hold', field: 'lot_id', sentence });
    }
    const detail = { lot_id: lot.value.id, reason: input.reason };
    return accept(
      recordsOnly([{ type: 'act', id: facts.ids.id(), kind: 'lot_released', ...common.value, detail }]),
    );
  },
};
