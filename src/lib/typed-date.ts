/** Dates as people type them, day first: "14 May 2026", "14.5.2026", "14/5/2026", "2026-05-14". */

const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];

const LONG = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  timeZone: 'UTC',
});

/** The ISO date, or null where it is none: no month 13, no 31 June. */
export function readTypedDate(text: string): string | null {
  const typed = text.trim().toLowerCase().replace(',', '');
  const iso = /^(\d{4})-(\d{2})-(\d{2})$/.exec(typed);
  if (iso !== null) return existing(iso[1], iso[2], iso[3]);
  const figures = /^(\d{1,2})[./ -](\d{1,2})[./ -](\d{4})$/.exec(typed);
  if (figures !== null) return existing(figures[3], figures[2], figures[1]);
  const words = /^(?:[a-z]+ )?(\d{1,2}) ([a-z]{3,9}) (\d{4})$/.exec(typed);
  if (words === null) return null;
  const month = MONTHS.indexOf(words[2]?.slice(0, 3) ?? '') + 1;
  return month === 0 ? null : existing(words[3], month.toString(), words[1]);
}

function existing(year = '', month = '', day = ''): string | null {
  const iso = `${year}-${month.padStart(2, '0')}-${day.padStart(2, '0')}`;
  const date = new Date(`${iso}T00:00:00Z`);
  return !Number.isNaN(date.getTime()) && date.toISOString().startsWith(iso) ? iso : null;
}

/** "14 May 2026" of an ISO date; anything else as it is. */
export function writtenDate(iso: string): string {
  return readTypedDate(iso) === iso ? LONG.format(new Date(`${iso}T00:00:00Z`)) : iso;
}
