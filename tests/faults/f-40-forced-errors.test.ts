/** F-40, S-20, S-22: whatever fails inside, the answer is general, has an id that is in the log, and all its headers. */
import { randomUUID } from 'node:crypto';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { routes } from '../../server/routes/index.ts';
import { signUp, startTestServer } from '../support/server.ts';
import type { Person, TestServer } from '../support/server.ts';

const log_lines: string[] = [];
let server: TestServer;
let owner: Person;
let home: string;

beforeAll(async () => {
  home = mkdtempSync(join(tmpdir(), 'grainward-client-'));
  mkdirSync(join(home, 'assets'));
  writeFileSync(join(home, 'index.html'), '<!doctype html><title>Grainward</title>');
  writeFileSync(join(home, 'assets/app.js'), 'export {};');
  server = await startTestServer({ client_dir: home }, log_lines);
  owner = await signUp(server);
});
afterAll(async () => {
  await server.close();
  rmSync(home, { recursive: true, force: true });
});

function expectHeaders(headers: Readonly<Record<string, unknown>>): void {
  const csp = String(headers['content-security-policy']);
  expect(csp).toContain("default-src 'self'");
  expect(csp).toContain("frame-ancestors 'none'");
  expect(csp).not.toContain('unsafe');
  expect(headers).toMatchObject({
    'strict-transport-security': expect.stringContaining('max-age=31536000'),
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'no-referrer',
    'cross-origin-opener-policy': 'same-origin',
    'cross-origin-resource-policy': 'same-origin',
    'permissions-policy': expect.stringContaining('camera=()'),
  });
  expect(headers['x-powered-by']).toBeUndefined();
  expect(headers['server']).toBeUndefined();
  expect(headers['access-control-allow-origin']).toBeUndefined();
}

const problem = z.strictObject({
  type: z.literal('/problems/failed'),
  title: z.string(),
  status: z.literal(500),
  detail: z.string(),
  errors: z.array(z.unknown()).length(0),
  error_id: z.string().regex(/^[0-9A-F]{4}-[0-9A-F]{4}$/),
});

describe('every header of safety', () => {
  it.each([
    ['a page', '/'],
    ['a file', '/assets/app.js'],
    ['a file that is not there', '/assets/none.js'],
    ['data', '/api/v1/session'],
    ['an address that is not there', '/api/v1/none'],
    ['an address that can’t be read', '/%'],
    ['the API page', '/api/v1/docs'],
    ['the mail kept here', '/mail'],
    ['the counts', '/metrics'],
  ])('is on %s', async (_name, path) => {
    expectHeaders((await request(server.app).get(path)).headers);
  });

  it('is on what is posted to a page, which is answered as a problem', async () => {
    const answer = await request(server.app).post('/');
    expectHeaders(answer.headers);
    expect(answer.status).toBe(404);
    expect(answer.headers['content-type']).toContain('application/problem+json');
  });

  it('keeps data out of every cache', async () => {
    expect((await owner.get('/session')).headers['cache-control']).toBe('no-store');
    expect((await owner.get('/none')).headers['cache-control']).toBe('no-store');
  });
});

describe('a fault inside', () => {
  const broken = routes.filter(({ allow, path }) => allow !== 'public' && path !== '/stream');

  it.each(broken.map((route) => [`${route.method.toUpperCase()} ${route.path}`, route] as const))(
    'at %s is told in general words, with an id that is in the log',
    async (_name, route) => {
      await server.db.query('owner', 'ALTER TABLE session RENAME TO session_gone');
      try {
        log_lines.length = 0;
        const path = route.path.replace(/:\w+/g, () => randomUUID());
        const asked = route.method === 'get' ? owner.get(path) : owner.send(route.method, path, {});
        const answer = await asked.set('Idempotency-Key', randomUUID());
        expectHeaders(answer.headers);
        const { error_id } = problem.parse(answer.body);
        expect(answer.text).not.toMatch(
          /session_gone|relation|SELECT|at .*\.ts|node_modules|sequelize|postgres/i,
        );
        expect(log_lines.some((line) => line.includes(error_id) && line.includes('who_is'))).toBe(true);
      } finally {
        await server.db.query('owner', 'ALTER TABLE session_gone RENAME TO session');
      }
    },
  );

  it('leaves the service whole when it has gone', async () => {
    expect((await owner.get('/session')).status).toBe(200);
  });
});

describe('the log', () => {
  it('holds no password, token, PIN or cookie (S-21)', async () => {
    log_lines.length = 0;
    const fresh = await signUp(server);
    await fresh.send('put', '/session/pin', { password: 'river copper lantern moss', pin: '24682468' });
    await fresh.post('/session/refresh');
    const text = log_lines.join('\n');
    expect(text).toContain('"security":"workshop_opened"');
    expect(text).toContain('"security":"pin_set"');
    for (const secret of [
      'river copper lantern moss',
      '24682468',
      fresh.cookie('grainward'),
      fresh.cookie('grainward-refresh'),
      fresh.email,
    ])
      expect(text).not.toContain(secret);
  });
});
