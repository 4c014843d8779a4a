/**
 * Roles × routes, read from the router's own table (FAULTS S-10, F-35): every route refuses whoever the permission
 * table does not name, with a line in the log, and lets through whoever it names.
 */
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { routes } from '../../server/routes/index.ts';
import type { Route } from '../../server/routes/route.ts';
import type { Role } from '../../shared/permissions.ts';
import { PERMISSIONS, ROLES, may } from '../../shared/permissions.ts';
import { Person, addMember, signUp, startTestServer } from '../support/server.ts';
import type { TestServer } from '../support/server.ts';

const log_lines: string[] = [];
let server: TestServer;
let people: Record<Role, Person>;

beforeAll(async () => {
  server = await startTestServer({}, log_lines);
  const proprietor = await signUp(server);
  people = {
    proprietor,
    keeper: await addMember(server, proprietor, 'keeper', 'Bo Tarn'),
    goldsmith: await addMember(server, proprietor, 'goldsmith', 'Corin Dask'),
    auditor: await addMember(server, proprietor, 'auditor', 'Dee Voss'),
  };
});
afterAll(() => server.close());

/** Every route but the endless stream, which would never answer. */
const answering = routes.filter(({ path }) => path !== '/stream');
const guarded = answering.filter((route) => route.allow !== 'public');
const named = (route: Route) => `${route.method.toUpperCase()} ${route.path}`;

/** Asks a route for something that is not there, so that nothing changes where it is allowed. */
function call(person: Person, route: Route) {
  const path = route.path.replace(/:\w+/g, () => randomUUID());
  const asked = route.method === 'get' ? person.get(path) : person.send(route.method, path, {});
  return asked.set('Idempotency-Key', randomUUID());
}

const typeOf = (body: unknown) => z.object({ type: z.string() }).safeParse(body).data?.type ?? null;

describe.each(ROLES)('a %s', (role) => {
  it.each(guarded.map((route) => [named(route), route] as const))('at %s', async (_name, route) => {
    const { status, body } = await call(people[role], route);
    const allowed = may(role, route.allow);
    if (allowed) expect([403, 401]).not.toContain(status);
    else expect([status, typeOf(body)]).toEqual([403, '/problems/not_permitted']);
  });
});

describe('somebody who has not signed in', () => {
  it.each(guarded.map((route) => [named(route), route] as const))(
    'is refused at %s',
    async (_name, route) => {
      const { status, body } = await call(new Person(server.app), route);
      expect([status, typeOf(body)]).toEqual([401, '/problems/not_signed_in']);
    },
  );
});

describe('the table', () => {
  it('lets an auditor write nothing but ask for the audit export and care for the own account', () => {
    const writes = guarded.filter((route) => route.method !== 'get' && may('auditor', route.allow));
    const own = writes.filter((route) => route.allow !== 'session.read').map(named);
    // The facts of a preview are read by POST, since what is asked for does not fit an address.
    expect(own.sort()).toEqual(['POST /dossiers', 'POST /facts']);
  });

  it('gives a goldsmith the own bench and no page of the book', () => {
    const allowed = Object.entries(PERMISSIONS).filter(([, roles]) =>
      ROLES.filter((r) => roles.some((x) => x === r)).includes('goldsmith'),
    );
    expect(allowed.map(([action]) => action).sort()).toEqual([
      'bench.read_own',
      'document.add',
      'handover.acknowledge',
      'request.make',
      'session.read',
    ]);
  });

  it('leaves people, places, allowances and settings to the proprietor alone', () => {
    for (const action of [
      'people.invite',
      'people.end',
      'place.set',
      'allowance.set',
      'settings.set',
    ] as const)
      expect(PERMISSIONS[action]).toEqual(['proprietor']);
  });

  it('has no route twice', () => {
    const names = routes.map(named);
    expect(new Set(names).size).toBe(names.length);
  });
});

describe('a refusal', () => {
  it('stands in the log with user, workshop, address and request', async () => {
    log_lines.length = 0;
    await people.goldsmith.post('/invitations', {});
    const line = log_lines.map((text) =>
      z.looseObject({ security: z.string().optional() }).parse(JSON.parse(text)),
    );
    expect(line.find(({ security }) => security === 'not_permitted')).toMatchObject({
      action: 'people.invite',
      role: 'goldsmith',
      user_id: expect.stringMatching(/^[0-9a-f-]{36}$/),
      workshop_id: expect.stringMatching(/^[0-9a-f-]{36}$/),
      address: expect.stringContaining('127.0.0.1'),
      request_id: expect.stringMatching(/^[0-9a-f-]{36}$/),
    });
  });

  it('meets whoever gives a role to himself or herself', async () => {
    const me = z.object({ person: z.object({ id: z.string() }) });
    const { person } = me.parse((await people.keeper.get('/session')).body);
    const answer = await people.keeper.send('put', `/people/${person.id}/role`, { role: 'proprietor' });
    expect(answer.status).toBe(403);
    expect((await people.keeper.get('/session')).body).toMatchObject({ person: { role: 'keeper' } });
  });
});

describe('a path that is there, by another method', () => {
  it('is refused with 405 and the methods that are answered', async () => {
    const answer = await people.proprietor.send('delete', '/vouchers/1');
    expect([answer.status, answer.headers['allow']]).toEqual([405, 'GET']);
  });
});
