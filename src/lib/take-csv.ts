/** Takes a report as CSV from the server: whole, and not only the rows that are shown. */
import { send } from './api-client.ts';

/** Starts the download; the session is refreshed first, since a download can't be asked for twice. */
export async function takeCsv(path: string, filter: Readonly<Record<string, string>>): Promise<void> {
  await send('GET', '/session');
  const query = new URLSearchParams({ ...filter, format: 'csv' }).toString();
  window.location.assign(`/api/v1${path}?${query}`);
}
