/**
 * F-29, F-31, I6: ids of another workshop, on every route that takes one, in paths, bodies and queries: the answer is
 * the same as for an id that was never given, and nothing of the other workshop stands in it.
 */
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { routes } from '../../server/routes/index.ts';
import type { Person, TestServer } from '../support/server.ts';
import { addMember, signUp, startTestServer } from '../support/server.ts';
import { httpWorkshop } from '../support/workshop-http.ts';

const SECRET = 'Ulverscroft';
const DATES = '?from=2026-01-01&to=2026-01-31';
let server: TestServer;
let mine: Person;
let foreign: Record<string, string>;

/** The other workshop, with one of everything; every name in it carries the secret word. */
async function other(): Promise<Record<string, string>> {
  const owner = await signUp(server, SECRET);
  const shop = httpWorkshop(owner);
  await addMember(server, owner, 'keeper', `${SECRET} keeper`);
  const party_id = await shop.party('supplier', `${SECRET} metals`);
  const customer = await shop.party('customer', `${SECRET} customer`);
  const safe_id = await shop.account('safe');
  const made = await owner.record('weigh-in', {
    party_id,
    safe_id,
    lines: [
      {
        form: 'sheet',
        description: `${SECRET} sheet`,
        alloy: '750 yellow',
        basis: 'certificate',
        gold_permille: '750',
        weighing: { gross_g: '50', tare_g: '0', tare_kind: 'measured' },
      },
    ],
  });
  const kept = await owner.send('post', '/documents').attach('file', Buffer.from('%PDF-1.7 a paper'), {
    filename: `${SECRET}.pdf`,
    contentType: 'application/pdf',
  });
  return {
    party_id,
    customer,
    safe_id,
    person_id: await shop.person(`${SECRET} keeper`),
    job_id: await shop.job(`${SECRET}-1`),
    lot_id: made.lots[0]?.id ?? '',
    lot_code: made.lots[0]?.code ?? '',
    voucher_id: made.records.at(-1)?.id ?? '',
    document_id: z.object({ id: z.string() }).parse(kept.body).id,
    workshop_id: z
      .object({ workshop: z.object({ id: z.string() }) })
      .parse((await owner.get('/session')).body).workshop.id,
  };
}

beforeAll(async () => {
  server = await startTestServer();
  mine = await signUp(server);
  foreign = await other();
});
afterAll(() => server.close());

const shape = (answer: { status: number; body: unknown }, id: string) => {
  const { error_id, ...rest } = z.looseObject({ error_id: z.string().optional() }).parse(answer.body);
  expect(error_id === undefined || error_id.length > 0).toBe(true);
  return {
    status: answer.status,
    body: z.unknown().parse(JSON.parse(JSON.stringify(rest).replaceAll(id, 'ID'))),
  };
};

const withId = routes.filter(({ path, allow }) => path.includes(':') && allow !== 'public');

describe('a foreign id in a path', () => {
  it.each(withId.map((route) => [`${route.method.toUpperCase()} ${route.path}`, route] as const))(
    'is as if absent at %s',
    async (_name, route) => {
      for (const id of Object.values(foreign)) {
        const ask = (value: string) => {
          const path = route.path.replace(/:\w+/, value);
          const bodies: Record<string, object> = {
            '/people/:id/role': { role: 'keeper' },
            '/parties/:id/contact': { email: null, phone: null, address: null },
            '/signature-requests/:id/refuse': { note: 'No.' },
            '/metal-requests/:id/answer': { voucher_id: randomUUID() },
          };
          return route.method === 'get'
            ? mine.get(`${path}${route.path.startsWith('/reports/statements') ? DATES : ''}`)
            : mine.send(route.method, path, bodies[route.path] ?? {});
        };
        const random = id.length === 36 ? randomUUID() : 'G99-9999-9';
        const [theirs, absent] = [await ask(id), await ask(random)];
        expect(theirs.text).not.toContain(SECRET);
        expect([404, 422]).toContain(theirs.status);
        if (id.length === 36) expect(shape(theirs, id)).toEqual(shape(absent, random));
      }
    },
  );
});

/** Bodies that would be right, were the ids one's own. `ID` is replaced by the foreign or a random id. */
const line = {
  form: 'sheet',
  description: 'sheet',
  alloy: '750 yellow',
  basis: 'certificate',
  gold_permille: '750',
  weighing: { gross_g: '5', tare_g: '0', tare_kind: 'measured' },
};
const whole = { how: 'all' };
const bodies: readonly (readonly [string, string, (id: string, own: string) => object])[] = [
  ['weigh-in', 'party_id', (id, own) => ({ party_id: id, safe_id: own, lines: [line] })],
  ['hold', 'lot_id', (id) => ({ lot_id: id, reason: 'Looked at.' })],
  ['release', 'lot_id', (id) => ({ lot_id: id, reason: 'Good.' })],
  ['transfer', 'lot_id', (id, own) => ({ from_id: own, to_id: own, lines: [{ lot_id: id, amount: whole }] })],
  ['reversal', 'voucher_id', (id) => ({ voucher_id: id, reason: 'Wrong.' })],
  ['set-party', 'party_id', (id) => ({ party_id: id, kind: 'supplier', name: 'Taken over' })],
  ['open-place', 'person_id', (id) => ({ kind: 'bench', name: 'Bench 9', custodian_id: id })],
  ['open-job', 'customer', (id) => ({ code: 'J-1', title: 'Ring', customer_id: id })],
  ['rename-account', 'safe_id', (id) => ({ account_id: id, name: 'Taken over' })],
  ['close-account', 'safe_id', (id) => ({ account_id: id })],
  ['hold', 'document_id', (id) => ({ lot_id: id, reason: 'Looked at.', document_ids: [id] })],
];

describe('a foreign id in the body of an event', () => {
  it.each(bodies)('%s: %s is as if absent', async (event, field, body) => {
    const own = await httpWorkshop(mine).account('safe');
    const id = foreign[field] ?? '';
    const random = randomUUID();
    const theirs = await mine.event(event, body(id, own));
    const absent = await mine.event(event, body(random, own));
    expect(theirs.text).not.toContain(SECRET);
    expect([404, 422]).toContain(theirs.status);
    // Refused for the id, and not for the form of the body.
    expect(theirs.text).not.toContain('Some entries are not right. Nothing was posted');
    expect(shape(theirs, id)).toEqual(shape(absent, random));
  });
});

describe('what is read', () => {
  it('as facts of foreign ids is empty', async () => {
    const ids = Object.values(foreign).filter((id) => id.length === 36);
    const answer = await mine.post('/facts', {
      lot_ids: ids,
      place_ids: ids,
      party_ids: ids,
      job_ids: ids,
      voucher_ids: ids,
      document_ids: ids,
    });
    expect(answer.status).toBe(200);
    expect(answer.text).not.toContain(SECRET);
  });

  it.each(
    routes
      .filter(
        (r) => r.method === 'get' && !r.path.includes(':') && r.allow !== 'public' && r.path !== '/stream',
      )
      .map((r) => [r.path] as const),
  )('at %s holds nothing of the other workshop, whatever is filtered by', async (path) => {
    const queries = [
      '',
      `?q=${SECRET}`,
      ...Object.values(foreign).map((id) => `?place_id=${id}&owner=${id}&workshop_id=${id}`),
    ];
    for (const query of queries) {
      const answer = await mine.get(`${path}${query}`);
      expect([200, 400]).toContain(answer.status);
      expect(answer.text).not.toContain(SECRET);
      for (const id of Object.values(foreign)) expect(answer.text).not.toContain(id);
    }
  });

  it('is told by no header either', async () => {
    const answer = await mine
      .get('/session')
      .set('X-Workshop-Id', foreign['workshop_id'] ?? '')
      .set('X-Forwarded-User', foreign['person_id'] ?? '');
    expect(answer.text).not.toContain(SECRET);
  });
});
