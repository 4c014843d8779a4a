/** F-12: all connections to the database are taken: 503 within seconds, life signs go on, and it recovers alone. */
import { afterAll, beforeAll, expect, it } from 'vitest';
import request from 'supertest';
import type { Person, TestServer } from '../support/server.ts';
import { signUp, startTestServer } from '../support/server.ts';

const NOBODY = { workshop_id: null, user_id: null };
let server: TestServer;
let owner: Person;

beforeAll(async () => {
  server = await startTestServer({ database_pool: 2 });
  owner = await signUp(server);
});
afterAll(() => server.close());

it('answers 503 with Retry-After while no connection is free, and is back by itself', async () => {
  const letGo: (() => void)[] = [];
  const taken = Array.from({ length: 2 }, () =>
    server.context.db.inScope(NOBODY, () => new Promise<void>((resolve) => void letGo.push(resolve))),
  );
  while (letGo.length < 2) await new Promise((resolve) => setTimeout(resolve, 10));

  const begun = Date.now();
  const refused = await owner.event('set-party', { kind: 'supplier', name: 'Brenholt' });
  expect(refused.status).toBe(503);
  expect(Number(refused.headers['retry-after'])).toBeGreaterThan(0);
  expect(Date.now() - begun).toBeLessThan(9_000);
  expect((await request(server.app).get('/api/v1/health/live')).status).toBe(200);
  expect((await request(server.app).get('/api/v1/health/ready')).status).toBe(503);

  for (const release of letGo) release();
  await Promise.all(taken);
  expect((await owner.get('/parties')).body).toEqual({ rows: [] });
  expect((await owner.event('set-party', { kind: 'supplier', name: 'Brenholt' })).status).toBe(201);
});
