/**
 * F-01 to F-05: the same posting sent many times at once, repeated after a restart, under a used key with another body;
 * sixteen clients on one lot's last grams; transfers both ways at once. The book holds each act once or not at all.
 */
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createApp } from '../../server/app.ts';
import { startContext } from '../../server/start-context.ts';
import type { TestServer } from '../support/server.ts';
import { Person, signUp, startTestServer } from '../support/server.ts';
import type { HttpWorkshop } from '../support/workshop-http.ts';
import { httpWorkshop } from '../support/workshop-http.ts';

const CLIENTS = 16;

let server: TestServer;
let owner: Person;
let shop: HttpWorkshop;
let safe: string;
let bench: string;
let party_id: string;

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server);
  shop = httpWorkshop(owner);
  safe = await shop.account('safe');
  bench = await shop.openPlace('bench', 'Bench 1', await shop.person('Ada Quill'));
  party_id = await shop.party('supplier', 'Brackwater');
});
afterAll(() => server.close());

/** A fresh lot of 750 sheet in the safe. */
async function sheet(gross_g: string): Promise<string> {
  const line = {
    form: 'sheet',
    description: '750 sheet',
    basis: 'certificate',
    gold_permille: '750',
    weighing: { gross_g },
  };
  return (await owner.record('weigh-in', { party_id, safe_id: safe, lines: [line] })).lots[0]?.id ?? '';
}

const issueOf = (lot_id: string, gross_g: string) => ({
  from_id: safe,
  to_id: bench,
  lot_id,
  operation: 'sheet_work',
  amount: { how: 'weighed', weighing: { gross_g } },
});

const many = <T>(make: (index: number) => Promise<T>): Promise<T[]> =>
  Promise.all(Array.from({ length: CLIENTS }, (_, index) => make(index)));

describe('the same request', () => {
  it('sent by sixteen clients at once is recorded once, and all get the same answer', async () => {
    const lot_id = await sheet('100.000');
    const key = randomUUID();
    const answers = await many(async () => owner.event('issue', issueOf(lot_id, '10.000'), key));
    expect(new Set(answers.map(({ status }) => status))).toEqual(new Set([201]));
    expect(new Set(answers.map(({ body }) => JSON.stringify(body))).size).toBe(1);
    expect(await shop.held(bench, lot_id)).toBe('10.000000 7.500000');
  });

  it('repeated to another process after the answer was lost gets the first answer again', async () => {
    const lot_id = await sheet('100.000');
    const key = randomUUID();
    const first = await owner.event('issue', issueOf(lot_id, '10.000'), key);
    const second = await startContext(server.config, () => 'http://127.0.0.1');
    const again = await new Person(createApp(second.context))
      .as(owner)
      .event('issue', issueOf(lot_id, '10.000'), key);
    await second.close();
    expect(again.status).toBe(201);
    expect(again.body).toEqual(first.body);
    expect(await shop.held(bench, lot_id)).toBe('10.000000 7.500000');
  });

  it('under a used key with another body is refused, and nothing is posted', async () => {
    const lot_id = await sheet('100.000');
    const key = randomUUID();
    await owner.event('issue', issueOf(lot_id, '10.000'), key);
    const other = await owner.event('issue', issueOf(lot_id, '11.000'), key);
    expect([other.status, other.body.type]).toEqual([422, '/problems/key_reused']);
    expect(await shop.held(bench, lot_id)).toBe('10.000000 7.500000');
  });

  it('that was refused leaves its key free for the mended one', async () => {
    const lot_id = await sheet('5.000');
    const key = randomUUID();
    expect((await owner.event('issue', issueOf(lot_id, '50.000'), key)).status).toBe(409);
    expect((await owner.event('issue', issueOf(lot_id, '5.000'), key)).status).toBe(201);
  });
});

describe('several keepers at once', () => {
  it('who take the same last grams: one wins, the others are told what is left', async () => {
    const lot_id = await sheet('12.006');
    const answers = await many(async () => owner.event('issue', issueOf(lot_id, '12.006')));
    const won = answers.filter(({ status }) => status === 201);
    const lost = answers.filter(({ status }) => status === 409);
    expect([won.length, lost.length]).toEqual([1, CLIENTS - 1]);
    expect(lost.every(({ body }) => body.type === '/problems/not_enough')).toBe(true);
    expect(await shop.held(bench, lot_id)).toBe('12.006000 9.004500');
  });

  it('who transfer both ways at once all get through, and the sum stays', async () => {
    const drawer = await shop.openPlace('safe', `Drawer ${randomUUID().slice(0, 4)}`);
    const lot_id = await sheet('100.000');
    const move = (from_id: string, to_id: string) =>
      owner.event('transfer', {
        from_id,
        to_id,
        lines: [{ lot_id, amount: { how: 'weighed', weighing: { gross_g: '1.000' } } }],
      });
    for (let times = 0; times < CLIENTS; times += 1) expect((await move(safe, drawer)).status).toBe(201);
    const answers = await many(async (index) => (index % 2 === 0 ? move(safe, drawer) : move(drawer, safe)));
    expect(answers.map(({ status }) => status)).toEqual(Array.from({ length: CLIENTS }, () => 201));
    expect([await shop.held(safe, lot_id), await shop.held(drawer, lot_id)]).toEqual([
      '84.000000 63.000000',
      '16.000000 12.000000',
    ]);
  });
});
