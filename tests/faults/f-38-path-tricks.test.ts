/** F-38, F-37 and F-20 in names: tricks in paths, names of files, searches and filters find nothing and change nothing. */
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request as plainRequest } from 'node:http';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import type { Person, TestServer } from '../support/server.ts';
import { signUp, startTestServer } from '../support/server.ts';

let server: TestServer;
let owner: Person;
let home: string;
let listening: ReturnType<typeof createServer>;

beforeAll(async () => {
  home = mkdtempSync(join(tmpdir(), 'grainward-client-'));
  mkdirSync(join(home, 'dist/assets'), { recursive: true });
  writeFileSync(join(home, 'dist/index.html'), '<!doctype html><title>Grainward</title>');
  writeFileSync(join(home, 'dist/assets/app.js'), 'export {};');
  writeFileSync(join(home, 'secret.txt'), 'TOP SECRET');
  server = await startTestServer({ client_dir: join(home, 'dist') });
  owner = await signUp(server);
  listening = createServer(server.app);
  await new Promise<void>((resolve) => listening.listen(0, '127.0.0.1', resolve));
});
afterAll(async () => {
  await new Promise((resolve) => listening.close(resolve));
  await server.close();
  rmSync(home, { recursive: true, force: true });
});

/** Asks for a path exactly as it is written: clients tidy "../" away. */
function raw(path: string): Promise<{ status: number; body: string }> {
  const { port }: AddressInfo = z
    .object({ port: z.number(), address: z.string(), family: z.string() })
    .parse(listening.address());
  return new Promise((resolve, reject) => {
    const asked = plainRequest({ host: '127.0.0.1', port, path, agent: false }, (response) => {
      const parts: Buffer[] = [];
      response.on('data', (part: Buffer) => parts.push(part));
      response.on('end', () =>
        resolve({ status: response.statusCode ?? 0, body: Buffer.concat(parts).toString() }),
      );
    });
    asked.on('error', reject);
    asked.end();
  });
}

describe('a path of the client', () => {
  it.each([
    '/../secret.txt',
    '/assets/../../secret.txt',
    '/assets/..%2f..%2fsecret.txt',
    '/assets/%2e%2e/%2e%2e/secret.txt',
    '/..%5csecret.txt',
    '/assets/....//....//secret.txt',
    '/%c0%ae%c0%ae/secret.txt',
    '/assets/app.js%00.html',
    '//etc/passwd',
    '/%',
  ])('%s never leaves the folder that is served', async (path) => {
    const { status, body } = await raw(path);
    expect(body).not.toContain('TOP SECRET');
    expect(body).not.toContain('root:');
    // A page of the client answers with the client itself; everything else is refused.
    if (status === 200) expect(body).toContain('<title>Grainward</title>');
    else expect([400, 403, 404]).toContain(status);
  });
});

describe('an id in a path', () => {
  it.each([
    '/documents/..%2f..%2fetc%2fpasswd',
    '/documents/not-an-id',
    '/dossiers/..%2f/file',
    '/lots/1%20OR%201=1',
    '/vouchers/1;DROP%20TABLE%20record',
    '/signature-requests/%00',
    '/lots/by-code/%27%20OR%20%27%27=%27',
  ])('%s is not found', async (path) => {
    const { status } = await owner.get(path);
    expect([400, 404, 422]).toContain(status);
  });
});

describe('SQL in a filter, a search or a page', () => {
  const tricks = ["' OR 1=1 --", "'; DROP TABLE record; --", 'name DESC; SELECT 1', '$1', '\\', '%'];
  it.each([
    '/lots',
    '/vouchers',
    '/search',
    '/reports/balances',
    '/reports/losses',
    '/reports/reconciliation',
  ])('of %s is text or refused', async (path) => {
    for (const trick of tricks) {
      for (const field of ['q', 'sort', 'order', 'cursor', 'form', 'kind', 'limit', 'from', 'to']) {
        const answer = await owner.get(`${path}?${field}=${encodeURIComponent(trick)}`);
        expect([200, 400]).toContain(answer.status);
      }
    }
  });

  it('left every table where it was', async () => {
    expect((await owner.get('/vouchers')).status).toBe(200);
  });
});
