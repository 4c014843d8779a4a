/** Days as the reports use them: today and the bounds of months, as text of year, month and day. */

/** Today of the reader's clock; the server decides what today is in the workshop. */
export function today(): string {
  const now = new Date();
  const two = (n: number) => String(n).padStart(2, '0');
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`;
}

/** The first day of the month that lies so many months before a day. */
export function firstOfMonth(day: string, months_before = 0): string {
  const [year = 0, month = 1] = day.split('-').map((part) => Number.parseInt(part, 10));
  return new Date(Date.UTC(year, month - 1 - months_before, 1)).toISOString().slice(0, 10);
}

const MONTH = new Intl.DateTimeFormat('en-GB', { month: 'short', year: '2-digit', timeZone: 'UTC' });

/** "May 26" of "2026-05". */
export const monthText = (month: string): string => MONTH.format(new Date(`${month}-01T12:00:00Z`));

const SPAN = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  timeZone: 'UTC',
});

/** "1 January 2026". */
export const dateText = (day: string): string => SPAN.format(new Date(`${day}T12:00:00Z`));
