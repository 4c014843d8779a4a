/** F-36, S-14: fields that the server owns are never taken from a body, on any event and any form of the account. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { EVENTS } from '../../shared/events/index.ts';
import { PASSWORD, addMember, signUp, startTestServer } from '../support/server.ts';
import type { Person, TestServer } from '../support/server.ts';

const SERVER_OWNED = {
  workshop_id: '00000000-0000-4000-8000-000000000001',
  id: '00000000-0000-4000-8000-000000000002',
  sequence: '1',
  recorded_at: '2020-01-01T00:00:00.000Z',
  recorded_by: '00000000-0000-4000-8000-000000000003',
  hash: 'f'.repeat(64),
  previous_hash: 'f'.repeat(64),
  approved_by: '00000000-0000-4000-8000-000000000004',
  single_handed: false,
};

let server: TestServer;
let owner: Person;
let goldsmith: Person;

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server);
  goldsmith = await addMember(server, owner, 'goldsmith', 'Corin Dask');
});
afterAll(() => server.close());

const problem = z.object({
  errors: z.array(z.object({ field: z.string().nullable(), sentence: z.string() })),
});

describe('an event', () => {
  it.each(Object.values(EVENTS).map(({ name }) => name))(
    '%s refuses every field that the server owns',
    async (name) => {
      // Settings tell their fields apart by "what".
      const answer = await owner.event(name, { ...SERVER_OWNED, what: 'weighing' });
      expect(answer.status).toBe(422);
      const told = problem
        .parse(answer.body)
        .errors.map(({ sentence }) => sentence)
        .join(' ');
      for (const field of Object.keys(SERVER_OWNED)) expect(told).toContain(field);
    },
  );

  it('posted nothing of all that, and is posted without them', async () => {
    const body = { kind: 'supplier', name: 'Brenholt' };
    expect((await owner.event('set-party', { ...body, recorded_by: SERVER_OWNED.recorded_by })).status).toBe(
      422,
    );
    expect((await owner.get('/parties')).body).toEqual({ rows: [] });
    expect((await owner.event('set-party', body)).status).toBe(201);
  });
});

describe('a form of the account', () => {
  const role = { role: 'proprietor' };
  it.each([
    [
      '/workshops',
      {
        workshop_name: 'X',
        time_zone: 'UTC',
        currency: 'EUR',
        name: 'X',
        email: 'x@example.test',
        password: PASSWORD,
        ...role,
      },
    ],
    ['/session', { email: 'x@example.test', password: PASSWORD, ...role }],
    ['/invitations/accept', { token: 'x'.repeat(43), password: PASSWORD, ...role }],
  ])('%s refuses a role', async (path, body) => {
    expect((await goldsmith.post(path, body)).status).toBe(422);
  });

  it('of one’s own password or PIN refuses another person’s id', async () => {
    const person_id = SERVER_OWNED.id;
    const pin = { password: PASSWORD, pin: '2468', person_id };
    expect((await goldsmith.send('put', '/session/pin', pin)).status).toBe(422);
  });
});

describe('prototype tricks', () => {
  it.each(['__proto__', 'constructor', 'prototype'])('with %s change nothing', async (key) => {
    const answer = await owner
      .send('post', '/invitations')
      .set('Content-Type', 'application/json')
      .send(`{"${key}":{"role":"proprietor"},"email":"y@example.test","name":"Y","role":"goldsmith"}`);
    expect([201, 422]).toContain(answer.status);
    expect(Object.hasOwn(Object.prototype, 'role')).toBe(false);
  });
});
