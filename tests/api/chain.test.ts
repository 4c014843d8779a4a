/**
 * The main job over HTTP, end to end: weigh-in, issue, acknowledgement, weigh-back, sweep-up, consignment, arrival,
 * outturn. Every figure is reckoned by hand beside it.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Person, TestServer } from '../support/server.ts';
import { addMember, signUp, startTestServer } from '../support/server.ts';
import type { HttpWorkshop } from '../support/workshop-http.ts';
import { httpWorkshop } from '../support/workshop-http.ts';

let server: TestServer;
let owner: Person;
let smith: Person;
let shop: HttpWorkshop;
const ids: Record<string, string> = {};
const id = (name: string): string => {
  const found = ids[name];
  if (found === undefined) throw new Error(`the chain has no ${name} yet`);
  return found;
};

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server);
  smith = await addMember(server, owner, 'goldsmith', 'Corin Dask');
  shop = httpWorkshop(owner);
  ids['safe'] = await shop.account('safe');
  ids['bench'] = await shop.openPlace('bench', 'Bench 1', await shop.person('Corin Dask'));
  ids['bin'] = await shop.openPlace('bin', 'Floor');
  ids['supplier'] = await shop.party('supplier', 'Brenholt Fine Metals');
  ids['refiner_party'] = await shop.party('refiner', 'Osk & Varley');
  await shop.party('courier', 'Pell Couriers');
  ids['refiner'] = await shop.openPlace('refiner', 'Osk & Varley, works', null, id('refiner_party'));
  ids['courier'] = await shop.openPlace('courier', 'Pell van');
  ids['metal_account'] = await shop.openPlace(
    'metal_account',
    'With Osk & Varley',
    null,
    id('refiner_party'),
  );
  ids['job'] = await shop.job('J-1187');
  // 60 % of the gold that sheet work loses is expected back from the floor.
  await owner.record('set-setting', {
    what: 'bin_feed',
    bin_id: id('bin'),
    operation: 'sheet_work',
    gold_percent: '60',
    silver_percent: '60',
    platinum_percent: '60',
    palladium_percent: '60',
  });
});
afterAll(() => server.close());

describe('the chain of the main job', () => {
  it('weighs in 100 g of 750 sheet: 75 g of gold', async () => {
    const line = {
      form: 'sheet',
      description: '750 yellow sheet',
      alloy: '750 yellow',
      basis: 'certificate',
      gold_permille: '750',
      invoice_gross_g: '100.000',
      weighing: { gross_g: '120.000', tare_g: '20.000', tare_kind: 'measured' },
    };
    const answer = await owner.record('weigh-in', {
      party_id: id('supplier'),
      safe_id: id('safe'),
      lines: [line],
    });
    ids['sheet'] = answer.lots[0]?.id ?? '';
    expect(await shop.held(id('safe'), id('sheet'))).toBe('100.000000 75.000000');
  });

  it('issues 40 g to the bench, which the goldsmith acknowledges', async () => {
    const answer = await owner.record('issue', {
      from_id: id('safe'),
      to_id: id('bench'),
      lot_id: id('sheet'),
      operation: 'sheet_work',
      job_id: id('job'),
      amount: { how: 'weighed', weighing: { gross_g: '40.000' } },
    });
    ids['issue'] = answer.records.at(-1)?.id ?? '';
    expect(await shop.held(id('bench'), id('sheet'))).toBe('40.000000 30.000000');
    const taken = await smith.event('acknowledge', { voucher_id: id('issue'), how: 'session' });
    expect(taken.status).toBe(201);
    const again = await smith.event('acknowledge', { voucher_id: id('issue'), how: 'session' });
    expect(again.status).toBe(409);
  });

  it('weighs back: 10 unused, 2 scrap, 1 filings, 26.5 work; 0.515 g is lost, 0.38625 g of it gold', async () => {
    // Blend 40 − 10 − 2 = 28.000 g; filings 0.985 g metal and 0.015 g dirt; rest 27.015 − work 26.500 = 0.515 g, × 0.75.
    const work = {
      job_id: id('job'),
      operation: 'sheet_work',
      unused: [{ lot_id: id('sheet'), weighing: { gross_g: '10.000' } }],
      scrap: [{ from_lot_id: id('sheet'), weighing: { gross_g: '2.000' } }],
      filings: [{ weighing: { gross_g: '1.000' } }],
      made: [{ form: 'work', description: 'ring blank', pieces: '1', weighing: { gross_g: '26.500' } }],
    };
    const answer = await owner.record('weigh-back', {
      place_id: id('bench'),
      safe_id: id('safe'),
      works: [work],
    });
    ids['weigh_back'] = answer.records.at(-1)?.id ?? '';
    ids['work'] = answer.lots[0]?.id ?? '';
    const voucher = (await owner.get(`/vouchers/${id('weigh_back')}`)).body;
    const loss = voucher.entries.find(
      (entry: { account_kind: string }) => entry.account_kind === 'working_loss',
    );
    expect([loss.gross_g, loss.gold_g]).toEqual(['0.515000', '0.386250']);
    expect(voucher.detail.worked_gold_g).toBe('22.500000');
    expect(await shop.held(id('bench'), id('work'))).toBe('26.500000 19.875000');
  });

  it('sweeps up 50 g of dust with 0.23175 g of gold in it by estimate', async () => {
    // 60 % of 0.386250 g.
    const answer = await owner.record('sweep-up', {
      bin_id: id('bin'),
      to_id: id('safe'),
      container: 'Floor, drum 1',
      weighing: { gross_g: '50.000' },
    });
    ids['sweeps'] = answer.lots[0]?.id ?? '';
    expect(await shop.held(id('safe'), id('sweeps'))).toBe('50.000000 0.231750');
  });

  it('consigns the drum, and it arrives 0.001 g lighter: within the weighing error', async () => {
    const answer = await owner.record('consign', {
      code: 'C-0001',
      from_id: id('safe'),
      courier_id: id('courier'),
      destination_id: id('refiner'),
      lines: [{ lot_id: id('sweeps'), amount: { how: 'all' } }],
      packages: [{ seal: '0391', content: 'drum 1' }],
      declared_value: '25.00',
    });
    ids['consign'] = answer.records.at(-1)?.id ?? '';
    await owner.record('arrive', {
      consign_id: id('consign'),
      lines: [{ lot_id: id('sweeps'), received_g: '49.999' }],
    });
    // 0.001 g × 0.23175 ÷ 50 = 0.000005 g of gold to count variance.
    expect(await shop.held(id('refiner'), id('sweeps'))).toBe('49.999000 0.231745');
  });

  it('settles the outturn: 0.250 g found, 0.2475 g credited; 0.018255 g more than expected goes back to the loss', async () => {
    const line = {
      lot_id: id('sweeps'),
      settle: { how: 'all' },
      metals: [{ metal: 'gold', assayed_g: '0.250', credited_g: '0.2475' }],
    };
    const answer = await owner.record('outturn', {
      refiner_id: id('refiner'),
      consign_id: id('consign'),
      statement: '77-1146',
      lines: [line],
      payments: [{ way: 'metal_account', account_id: id('metal_account'), metal: 'gold', mass_g: '0.2475' }],
      charges: [{ what: 'Refining', amount: '12.00' }],
    });
    const voucher = (await owner.get(`/vouchers/${answer.records.at(-1)?.id}`)).body;
    const rows = voucher.entries.map(
      (e: { account_kind: string; gross_g: string; gold_g: string }) =>
        `${e.account_kind} ${e.gross_g} ${e.gold_g}`,
    );
    // Foreign matter gets back the 49.76825 g that it gave; the 0.000995 g of dust lost on the way is the deduction's:
    // 0.0025 − 0.000995.
    expect(rows).toEqual([
      'refiner -49.999000 -0.231745',
      'working_loss -0.018255 -0.018255',
      'processors_deduction 0.001505 0.002500',
      'foreign_matter 49.768250 0.000000',
      'metal_account 0.247500 0.247500',
    ]);
  });

  it('leaves a book that sums to nothing', async () => {
    const session = (await owner.get('/session')).body;
    expect(session.book.balanced).toBe(true);
  });
});
