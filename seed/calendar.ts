/** The demo's calendar: the working days of about six months, up to today in the workshop's zone. */

/** Dates from Monday to Friday, `weeks` weeks back and up to a day, the day itself included. */
export function workingDays(today: string, weeks: number): readonly string[] {
  const end = Date.parse(`${today}T12:00:00Z`);
  const days: string[] = [];
  for (let back = weeks * 7; back >= 0; back -= 1) {
    const day = new Date(end - back * 86_400_000);
    if (day.getUTCDay() !== 0 && day.getUTCDay() !== 6) days.push(day.toISOString().slice(0, 10));
  }
  return days;
}

/** Whether a day is the first working day of its month among the days. */
export function isFirstOfMonth(days: readonly string[], index: number): boolean {
  return index === 0 || days[index]?.slice(0, 7) !== days[index - 1]?.slice(0, 7);
}
