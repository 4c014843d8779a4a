/** Closing and re-opening a period: two signatures each. Nothing enters a closed period; the database holds that too. */
import { accept, refuse } from '../../book/draft.ts';
import { businessDate, id, longText } from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import type { EventDefinition } from '../definition.ts';
import { act } from './act.ts';

const closeSchema = z.strictObject({ from: businessDate, to: businessDate });

/** Closes the days from one date to another. Refuses today and later, and days that are closed already. */
export const closePeriod: EventDefinition<z.output<typeof closeSchema>> = {
  name: 'close-period',
  schema: closeSchema,
  action: 'period.close',
  summary: 'Closes a period, so that nothing enters it any more.',
  needs: () => ({}),
  draft(input, facts) {
    if (input.to < input.from) {
      return refuse({
        code: 'invalid',
        field: 'to',
        sentence: 'The last day is before the first. Look at both dates again.',
      });
    }
    if (input.to >= facts.today) {
      return refuse({
        code: 'date_ahead',
        field: 'to',
        sentence: 'A period is closed after its last day. Choose yesterday or an earlier day.',
      });
    }
    if (facts.closed_through !== null && input.from <= facts.closed_through) {
      const sentence = `The book is closed through ${facts.closed_through} already. Begin with the day after.`;
      return refuse({ code: 'closed_period', field: 'from', sentence });
    }
    const records = [
      act('period_closed', { period_id: facts.ids.id(), from: input.from, to: input.to }, facts),
    ];
    return accept({ records, handovers: [], second_signature: 'Closing a period needs two people.' });
  },
};

const reopenSchema = z.strictObject({ period_id: id, reason: longText });

/** Opens a closed period again, with a reason. */
export const reopenPeriod: EventDefinition<z.output<typeof reopenSchema>> = {
  name: 'reopen-period',
  schema: reopenSchema,
  action: 'period.close',
  summary: 'Opens a closed period again.',
  needs: () => ({}),
  draft(input, facts) {
    if (!facts.periods.some((period) => period.id === input.period_id && period.closed)) {
      return refuse({
        code: 'not_found',
        field: 'period_id',
        sentence: 'No such period is closed. Look at the list of periods again.',
      });
    }
    const records = [act('period_reopened', { period_id: input.period_id, reason: input.reason }, facts)];
    return accept({ records, handovers: [], second_signature: 'Opening a closed period needs two people.' });
  },
};
