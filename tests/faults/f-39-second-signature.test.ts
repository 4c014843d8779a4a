/** F-39, S-15: what two have to sign is posted once, signed by somebody else, and only while it still fits. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { sessionJson } from '../../shared/schemas/identity.ts';
import type { Person, TestServer } from '../support/server.ts';
import { addMember, signUp, startTestServer } from '../support/server.ts';
import { httpWorkshop } from '../support/workshop-http.ts';

const asked = z.object({ signature_request_id: z.string() });
let server: TestServer;
let owner: Person;
let keeper: Person;
let goldsmith: Person;
let party_id: string;
let safe_id: string;

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server);
  keeper = await addMember(server, owner, 'keeper', 'Bo Tarn');
  goldsmith = await addMember(server, owner, 'goldsmith', 'Corin Dask');
  const shop = httpWorkshop(owner);
  party_id = await shop.party('supplier', 'Brenholt Fine Metals');
  safe_id = await shop.account('safe');
});
afterAll(() => server.close());

const head = async () => sessionJson.parse((await owner.get('/session')).body).book.sequence;

/** Weighs 10 g in, and asks as the keeper to have that reversed. Gives the request's id. */
async function askForReversal(): Promise<string> {
  const made = await keeper.record('weigh-in', {
    party_id,
    safe_id,
    lines: [
      {
        form: 'sheet',
        description: '750 sheet',
        alloy: '750 yellow',
        basis: 'certificate',
        gold_permille: '750',
        weighing: { gross_g: '10', tare_g: '0', tare_kind: 'measured' },
      },
    ],
  });
  const voucher_id = made.records.at(-1)?.id;
  const answer = await keeper.event('reversal', { voucher_id, reason: 'Weighed with the box.' });
  expect(answer.status).toBe(202);
  return asked.parse(answer.body).signature_request_id;
}

describe('an act that two sign', () => {
  it('posts nothing before the second has signed', async () => {
    const before = await head();
    await askForReversal();
    expect(BigInt(await head()) - BigInt(before)).toBe(2n);
  });

  it('can’t be signed by who recorded it, nor refused by him or her', async () => {
    const id = await askForReversal();
    const before = await head();
    expect((await keeper.post(`/signature-requests/${id}/approve`)).status).toBe(403);
    expect((await keeper.post(`/signature-requests/${id}/refuse`, { note: 'No.' })).status).toBe(403);
    expect(await head()).toBe(before);
  });

  it('can’t be signed by somebody without the right', async () => {
    const id = await askForReversal();
    expect((await goldsmith.post(`/signature-requests/${id}/approve`)).status).toBe(403);
  });

  it('is posted once, however often it is signed at the same time', async () => {
    const id = await askForReversal();
    const before = await head();
    const answers = await Promise.all(
      Array.from({ length: 6 }, () => owner.post(`/signature-requests/${id}/approve`)),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409, 409, 409, 409]);
    expect(BigInt(await head()) - BigInt(before)).toBe(1n);
    expect((await owner.post(`/signature-requests/${id}/refuse`, { note: 'Too late.' })).status).toBe(409);
  });

  it('names both: who recorded, and who approved', async () => {
    const id = await askForReversal();
    const answer = await owner.post(`/signature-requests/${id}/approve`);
    const { records } = z.object({ records: z.array(z.object({ sequence: z.string() })) }).parse(answer.body);
    const voucher = await owner.get(`/vouchers/${records[0]?.sequence ?? ''}`);
    expect(voucher.body).toMatchObject({ recorded_by_name: 'Bo Tarn', approved_by_name: 'Ada Quill' });
  });

  it('is posted no more once it was refused or withdrawn', async () => {
    const [refused, withdrawn] = [await askForReversal(), await askForReversal()];
    const before = await head();
    expect(
      (await owner.post(`/signature-requests/${refused}/refuse`, { note: 'It was right.' })).status,
    ).toBe(204);
    expect((await owner.post(`/signature-requests/${withdrawn}/withdraw`)).status).toBe(403);
    expect((await keeper.post(`/signature-requests/${withdrawn}/withdraw`)).status).toBe(204);
    for (const id of [refused, withdrawn])
      expect((await owner.post(`/signature-requests/${id}/approve`)).status).toBe(409);
    expect(await head()).toBe(before);
  });

  it('is refused where it no longer fits, and stays to be refused', async () => {
    const id = await askForReversal();
    const twice = await keeper.get(`/signature-requests/${id}`);
    const { input } = z.object({ input: z.looseObject({ voucher_id: z.string() }) }).parse(twice.body);
    const again = await keeper.event('reversal', {
      voucher_id: input.voucher_id,
      reason: 'The same once more.',
    });
    const second = asked.parse(again.body).signature_request_id;
    expect((await owner.post(`/signature-requests/${id}/approve`)).status).toBe(201);
    const before = await head();
    const stale = await owner.post(`/signature-requests/${second}/approve`);
    expect([409, 422]).toContain(stale.status);
    expect(await head()).toBe(before);
  });

  it('asks for no second signature of its body: an approver in it is refused', async () => {
    const answer = await keeper.event('reversal', {
      voucher_id: party_id,
      reason: 'x',
      approved_by: safe_id,
    });
    expect(answer.status).toBe(422);
  });
});
