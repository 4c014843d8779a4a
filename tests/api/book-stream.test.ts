/** Open screens are told that the book has moved on: by every process, of one's own workshop only, and no figure. */
import type { Server } from 'node:http';
import { createServer } from 'node:http';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Person, TestServer } from '../support/server.ts';
import { signUp, startTestServer } from '../support/server.ts';

let server: TestServer;
let http: Server;
let ours: Person;
let theirs: Person;
beforeAll(async () => {
  server = await startTestServer();
  ours = await signUp(server);
  theirs = await signUp(server, 'Second Street');
  http = createServer(server.app);
  await new Promise<void>((resolve) => http.listen(0, '127.0.0.1', resolve));
});
afterAll(async () => {
  http.closeAllConnections();
  await new Promise((resolve) => http.close(resolve));
  await server.close();
});

/** Opens the stream as somebody, and reads it to its end. */
async function open(by: Person | null) {
  const address = http.address();
  const port = typeof address === 'object' ? (address?.port ?? 0) : 0;
  const stop = new AbortController();
  const response = await fetch(`http://127.0.0.1:${port}/api/v1/stream`, {
    headers: by === null ? {} : { Cookie: by.cookies.join('; ') },
    signal: stop.signal,
  });
  let text = '';
  const reading = (async () => {
    const decoder = new TextDecoder();
    for await (const chunk of response.body ?? []) text += decoder.decode(chunk, { stream: true });
  })().catch(() => undefined);
  return {
    response,
    text: () => text,
    close: async () => {
      stop.abort();
      await reading;
    },
  };
}

describe('the stream of changes', () => {
  it('tells the number that the book has reached, to the own workshop alone', async () => {
    const [mine, other] = [await open(ours), await open(theirs)];
    expect(mine.response.headers.get('content-type')).toContain('text/event-stream');
    expect(mine.response.headers.get('cache-control')).toContain('no-store');
    const { records } = await ours.record('set-party', { kind: 'supplier', name: 'Brenholt Fine Metals' });
    const sequence = records.at(-1)?.sequence ?? '';
    await expect
      .poll(mine.text, { timeout: 10_000 })
      .toContain(`event: book\ndata: {"sequence":"${sequence}"}\n\n`);
    expect(mine.text()).not.toContain('Brenholt');
    expect(other.text()).not.toContain('event: book');
    await mine.close();
    await other.close();
  });

  it('is for those who have signed in', async () => {
    const nobody = await open(null);
    expect(nobody.response.status).toBe(401);
    await nobody.close();
  });
});
