/** F-24, F-25: weights and finenesses that are no weights and no finenesses, over HTTP: refused, nothing posted. */
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import type { Person, TestServer } from '../support/server.ts';
import { signUp, startTestServer } from '../support/server.ts';
import type { HttpWorkshop } from '../support/workshop-http.ts';
import { httpWorkshop } from '../support/workshop-http.ts';

let server: TestServer;
let owner: Person;
let shop: HttpWorkshop;
let safe_id: string;
let party_id: string;

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server);
  shop = httpWorkshop(owner);
  safe_id = await shop.account('safe');
  party_id = await shop.party('supplier', 'Brenholt Fine Metals');
});
afterAll(() => server.close());

/** A weigh-in whose weight and fineness stand in the JSON as given, character by character. */
function weighIn(gross: string, gold = '"750"') {
  const body = `{"party_id":"${party_id}","safe_id":"${safe_id}","lines":[{"form":"sheet","description":"750 sheet",
    "alloy":"750 yellow","basis":"certificate","gold_permille":${gold},
    "weighing":{"gross_g":${gross},"tare_g":"0","tare_kind":"measured"}}]}`;
  return owner
    .send('post', '/events/weigh-in')
    .set('Content-Type', 'application/json')
    .set('Idempotency-Key', randomUUID())
    .send(body);
}

const sequence = async () =>
  z.object({ book: z.object({ sequence: z.string() }) }).parse((await owner.get('/session')).body).book
    .sequence;

async function refusedWithNothingPosted(gross: string, gold?: string) {
  const before = await sequence();
  const answer = await weighIn(gross, gold);
  expect(answer.status).toBe(422);
  const { errors } = z
    .object({ errors: z.array(z.object({ field: z.string().nullable() })) })
    .parse(answer.body);
  expect(errors[0]?.field).toMatch(/lines/);
  expect(await sequence()).toBe(before);
}

describe('a weight in JSON', () => {
  it.each([
    '"-1.000"',
    '"-0"',
    '"0"',
    '"0.000"',
    '"NaN"',
    '"Infinity"',
    '"-Infinity"',
    '1e309',
    '"1e309"',
    '"1e3"',
    '12.5',
    '-0',
    '0',
    'null',
    'true',
    '[]',
    '{}',
    '""',
    '" "',
    '"12.5 g"',
    '"1,250"',
    '"1.234.567"',
    '"0x10"',
    '"١٢"',
    '"1.0000001"',
    '"12."',
    '".5"',
    '"99999999999999999999"',
    '"10000000000.000000"',
  ])('%s is refused, and nothing is posted', (text) => refusedWithNothingPosted(text));
});

describe('a fineness in JSON', () => {
  it.each(['"1000.1"', '"1001"', '"-1"', '"NaN"', '"Infinity"', '1e309', '750', '"75O"', '"1e2"', '""'])(
    '%s is refused, and nothing is posted',
    (text) => refusedWithNothingPosted('"10.000"', text),
  );

  it('of metals that add up to more than the whole is refused', async () => {
    await refusedWithNothingPosted('"10.000"', '"750","silver_permille":"250.1"');
  });
});

describe('the same line with plain figures', () => {
  it('is posted, so that the refusals above mean something', async () => {
    expect((await weighIn('"10.000"')).status).toBe(201);
  });
});
