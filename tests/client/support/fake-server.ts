/** A server for tests of the client: answers by method and path, keeps what was asked. Anything else fails the test. */
import { vi } from 'vitest';

export interface Asked {
  readonly method: string;
  readonly path: string;
  readonly key: string | null;
  readonly body: unknown;
  readonly own_header: string | null;
}

/** JSON with 200, nothing with 204, a problem with its status, or a line that breaks. */
export type Reply = () => Response | Promise<Response>;

export const json =
  (body: unknown, status = 200): Reply =>
  () =>
    new Response(JSON.stringify(body), { status });
export const nothing: Reply = () => new Response(null, { status: 204 });
export const broken: Reply = () => Promise.reject(new TypeError('Failed to fetch'));
export const problem = (
  status: number,
  code: string,
  detail: string,
  errors: readonly object[] = [],
): Reply => json({ type: `/problems/${code}`, title: code, status, detail, errors }, status);

/** Puts the server in place of fetch. A list of replies is given one after the other, the last one stays. */
export function fakeServer(replies: Readonly<Record<string, Reply | readonly Reply[]>>): readonly Asked[] {
  const asked: Asked[] = [];
  const given = new Map<string, number>();
  vi.stubGlobal('fetch', async (address: string, init: RequestInit = {}) => {
    const method = init.method ?? 'GET';
    const path = address.replace('/api/v1', '');
    const headers = new Headers(init.headers);
    asked.push({
      method,
      path,
      key: headers.get('Idempotency-Key'),
      own_header: headers.get('X-Grainward'),
      body: typeof init.body === 'string' ? JSON.parse(init.body) : null,
    });
    const name = `${method} ${path}`;
    const found = replies[name];
    if (found === undefined) throw new Error(`the test has no answer for ${name}`);
    if (typeof found === 'function') return found();
    const at = given.get(name) ?? 0;
    given.set(name, at + 1);
    const reply = found[Math.min(at, found.length - 1)];
    if (reply === undefined) throw new Error(`no replies for ${name}`);
    return reply();
  });
  return asked;
}
