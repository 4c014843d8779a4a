/** The date that a voucher belongs to. Today unless it is dated back; never ahead, never into a closed period. */
import type { Facts } from '../book/facts.ts';
import type { Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';

/** The business date of an event. Refuses a date after today, and one in a closed period. */
export function businessDateOf(wanted: string | null, facts: Facts): Outcome<string> {
  const date = wanted ?? facts.today;
  if (date > facts.today) {
    const sentence = `${date} has not come yet. Enter today's date or an earlier one.`;
    return refuse({ code: 'date_ahead', field: 'business_date', sentence });
  }
  if (facts.closed_through !== null && date <= facts.closed_through) {
    const sentence = `The book is closed through ${facts.closed_through}. Enter it with today's date, or have the period opened by two people.`;
    return refuse({ code: 'closed_period', field: 'business_date', sentence });
  }
  return accept(date);
}
