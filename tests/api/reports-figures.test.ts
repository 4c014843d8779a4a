/**
 * Balances, losses and reconciliation over HTTP, each figure reckoned by hand from the two months that
 * `support/worked-months.ts` records.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { balancesJson, lossesJson, reconciliationJson } from '../../shared/schemas/reports.ts';
import { voucherPage } from '../../shared/schemas/vouchers.ts';
import { readCsv } from '../../shared/dossier/csv.ts';
import type { TestServer } from '../support/server.ts';
import { addMember, signUp, startTestServer } from '../support/server.ts';
import type { WorkedMonths } from '../support/worked-months.ts';
import { FEBRUARY, JANUARY, workTwoMonths } from '../support/worked-months.ts';

let server: TestServer;
let months: WorkedMonths;
beforeAll(async () => {
  server = await startTestServer();
  months = await workTwoMonths(server);
});
afterAll(() => server.close());

const balances = async (query: string) =>
  balancesJson.parse((await months.owner.get(`/reports/balances?${query}`)).body);
/** "name part gross gold value" of each row. */
const rows = (report: Awaited<ReturnType<typeof balances>>) =>
  report.rows.map((r) => `${r.name} ${r.part} ${r.gross_g} ${r.gold_g} ${r.value ?? 'none'}`);

describe('balances', () => {
  it('at the end of January: weighed and estimated metal apart, valued at the price of that day', async () => {
    const report = await balances('by=place&on=2026-01-31');
    // Safe: 60 + 10 unused + 2 scrap; filings 0.985 g of 750. Bench: 26.5 g of 750.
    // 54 g ÷ 31.1034768 × 2000 = 3472.28; 0.73875 g = 47.50; 19.875 g = 1277.99.
    expect(rows(report)).toEqual([
      'Bench 1 weighed 26.500000 19.875000 1277.99',
      'Safe weighed 72.000000 54.000000 3472.28',
      'Safe estimated 1.000000 0.738750 47.50',
    ]);
    expect(report.prices.map((p) => `${p.price_per_ozt} ${p.priced_on} ${p.source}`)).toEqual([
      '2000 2026-01-01 typed',
    ]);
  });

  it('before anything was there: none', async () => {
    expect((await balances('by=place&on=2026-01-04')).rows).toEqual([]);
  });

  it('on the day of an issue: its closing', async () => {
    expect(rows(await balances('by=place&on=2026-01-10'))).toEqual([
      'Bench 1 weighed 40.000000 30.000000 1929.04',
      'Safe weighed 60.000000 45.000000 2893.57',
    ]);
  });

  it('by owner at the end of February: the house’s, its claim, and the customer’s, never in one sum', async () => {
    const report = await balances('by=owner&on=2026-02-28');
    const figures = report.rows.map((r) => `${r.name} ${r.part} ${r.gross_g} ${r.gold_g}`).sort();
    // The customer: 11.7 − 0.0585 lost − 2.925 given back.
    expect(figures).toEqual([
      '=Edda Lorn weighed 14.900000 8.716500',
      'House claim 0.247500 0.247500',
      'House estimated 1.000000 0.738750',
      'House weighed 98.500000 73.875000',
    ]);
    expect(report.totals.map((t) => `${t.part} ${t.gross_g} ${t.gold_g}`)).toEqual([
      'weighed 113.400000 82.591500',
      'estimated 1.000000 0.738750',
      'claim 0.247500 0.247500',
    ]);
  });

  it('now are what they were at the last day of anything', async () => {
    const gold = (report: Awaited<ReturnType<typeof balances>>) =>
      report.rows.map((r) => `${r.key} ${r.part} ${r.gross_g} ${r.gold_g}`).sort();
    for (const by of ['place', 'metal', 'owner', 'lot'])
      expect(gold(await balances(`by=${by}`))).toEqual(gold(await balances(`by=${by}&on=2026-02-28`)));
  });

  it('by metal: the gross there is what each metal weighs', async () => {
    const report = await balances('by=metal&on=2026-01-31');
    expect(report.rows.map((r) => `${r.name} ${r.part} ${r.gross_g} ${r.gold_g}`)).toContain(
      'Gold weighed 73.875000 73.875000',
    );
  });

  it('as CSV: figures plain, and a name that a spreadsheet would run is kept from it', async () => {
    const response = await months.owner.get('/reports/balances?by=owner&on=2026-02-28&format=csv');
    expect(response.headers['content-type']).toContain('text/csv');
    expect(response.headers['content-disposition']).toContain('attachment');
    const [head, ...lines] = readCsv(response.text.replace('\uFEFF', ''));
    const name = head?.indexOf('name') ?? -1;
    const gold = head?.indexOf('gold_g') ?? -1;
    expect(lines.map((line) => `${line[name]} ${line[gold]}`)).toContain("'=Edda Lorn 8.716500");
  });
});

describe('what is accepted', () => {
  it('gives CSV to who accepts CSV alone, and JSON to who accepts anything', async () => {
    const type = async (accept: string) =>
      (await months.owner.get('/reports/balances').set('Accept', accept)).headers['content-type'];
    expect(await type('text/csv')).toContain('text/csv');
    expect(await type('*/*')).toContain('application/json');
    expect(await type('application/json, text/csv')).toContain('application/json');
  });
});

describe('losses', () => {
  const losses = async (query: string) =>
    lossesJson.parse((await months.owner.get(`/reports/losses?${query}`)).body);
  const both = 'from=2026-01-01&to=2026-02-28';
  type Row = Awaited<ReturnType<typeof losses>>['rows'][number];
  const line = (r: Row) =>
    [
      r.name,
      r.vouchers,
      r.worked_g,
      r.loss_g,
      r.gross_percent,
      r.recovered_g,
      r.net_percent,
      r.allowance_g,
      r.finding,
    ].join(' ');

  it('by operation: worked, lost, given back by the refiner, allowed', async () => {
    const { rows: found } = await losses(`by=operation&${both}`);
    // Worked 30 × 0.75 + 10 × 0.585; lost 0.38625 + 0.0585; allowed 2 % and 0.05 g each: 0.5 + 0.167.
    // Back: 0.23175 estimated + 0.018255 more found. 0.44475 ÷ 28.35 = 1.569 %; 0.194745 ÷ 28.35 = 0.687 %.
    expect(found.map((r) => r.name.length > 0 && line({ ...r, name: r.key }))).toEqual([
      'sheet_work 2 28.350000 0.444750 1.569 0.250005 0.687 0.667000 within_allowance',
    ]);
    // 0.44475 g at 2500 an ounce.
    expect(found[0]?.value).toBe('35.75');
  });

  it('by month: the series of the chart', async () => {
    const { rows: found } = await losses(`by=month&${both}`);
    expect(found.map(line)).toEqual([
      '2026-01 1 22.500000 0.386250 1.717 0.000000 1.717 0.500000 within_allowance',
      '2026-02 1 5.850000 0.058500 1.000 0.250005 -3.274 0.167000 within_allowance',
    ]);
  });

  it.each([
    ['job', ['J-1187, J-1187 22.500000 0.386250', 'J-1188, J-1188 5.850000 0.058500']],
    ['bench', ['Bench 1 28.350000 0.444750']],
    ['alloy', ['750 yellow 22.500000 0.386250', 'of no alloy 5.850000 0.058500']],
    ['person', ['Corin Dask 28.350000 0.444750']],
  ])('by %s: no recovery, which is nobody’s in particular', async (by, expected) => {
    const { rows: found } = await losses(`by=${by}&${both}`);
    expect(found.map((r) => `${r.name} ${r.worked_g} ${r.loss_g}`)).toEqual(expected);
    expect(found.map((r) => r.recovered_g)).toEqual(found.map(() => null));
  });

  it('of a metal that was not worked: none', async () => {
    expect((await losses(`by=operation&metal=platinum&${both}`)).rows).toEqual([]);
  });
});

describe('reconciliation', () => {
  const reconciliation = async (query: string) =>
    reconciliationJson.parse((await months.owner.get(`/reports/reconciliation?${query}`)).body);
  /** "line gross gold" of what is not nothing. */
  const lines = (report: Awaited<ReturnType<typeof reconciliation>>) =>
    report.lines
      .filter((l) => /[1-9]/.test(`${l.gross_g}${l.gold_g}`))
      .map((l) => `${l.line} ${l.gross_g} ${l.gold_g}`);
  const nothing = {
    gross_g: '0.000000',
    gold_g: '0.000000',
    silver_g: '0.000000',
    platinum_g: '0.000000',
    palladium_g: '0.000000',
  };

  it('of January: what came, less what was lost, and the dirt in the filings', async () => {
    const report = await reconciliation(JANUARY);
    expect(report.opening).toEqual(nothing);
    expect(lines(report)).toEqual([
      'from_suppliers 100.000000 75.000000',
      'working_loss -0.515000 -0.386250',
      'foreign_matter 0.015000 0.000000',
    ]);
    expect([report.closing.gross_g, report.closing.gold_g]).toEqual(['99.500000', '74.613750']);
    expect(report.left_over).toEqual(nothing);
  });

  it('of February: what was swept up is where it went, to the last microgram', async () => {
    const report = await reconciliation(FEBRUARY);
    expect([report.opening.gross_g, report.opening.gold_g]).toEqual(['99.500000', '74.613750']);
    // Gold: 0.250005 − 0.000005 on the way − 0.0025 kept − 0.2475 credited = 0.
    expect(lines(report)).toEqual([
      'handed_over -0.247500 -0.247500',
      'swept_up 0.250005 0.250005',
      'deductions -0.001505 -0.002500',
      'count_variance -0.001000 -0.000005',
    ]);
    expect([report.closing.gross_g, report.closing.gold_g]).toEqual(['99.500000', '74.613750']);
    expect(report.left_over).toEqual(nothing);
  });

  it('of February by place: opening, in, out, loss, closing', async () => {
    const { places } = await reconciliation(FEBRUARY);
    expect(
      places.map(
        (p) => `${p.name} ${p.metal} ${p.opening_g} ${p.in_g} ${p.out_g} ${p.loss_g} ${p.closing_g}`,
      ),
    ).toEqual([
      'Safe gold 54.738750 0.231750 0.231750 0.000000 54.738750',
      'Bench 1 gold 19.875000 0.000000 0.000000 0.000000 19.875000',
      'Pell van gold 0.000000 0.231750 0.231750 0.000000 0.000000',
      'Osk & Varley, works gold 0.000000 0.231745 0.231745 0.000000 0.000000',
    ]);
  });

  it.each([
    ['swept_up', 'house', ['outturn', 'sweep_up']],
    ['count_variance', 'house', ['arrive']],
    ['handed_over', 'house', ['outturn']],
    ['deductions', 'house', ['outturn']],
    ['foreign_matter', 'house', ['outturn', 'sweep_up']],
    ['working_loss', 'house', []],
    ['working_loss', 'all', ['weigh_back']],
    ['from_customers', 'customer', ['weigh_in']],
    ['to_customers', 'customer', ['return_to_owner']],
  ])('the figure “%s” of %s opens exactly its vouchers', async (line, whose, expected) => {
    const owner = whose === 'customer' ? months.ids.customer : whose;
    const { body } = await months.owner.get(`/vouchers?${FEBRUARY}&line=${line}&owner=${owner}`);
    expect(voucherPage.parse(body).rows.map((row) => row.kind)).toEqual(expected);
  });

  it('of a customer: brought, lost in work, given back, still here', async () => {
    const report = await reconciliation(`${FEBRUARY}&owner=${months.ids.customer}`);
    expect(lines(report)).toEqual([
      'from_customers 20.000000 11.700000',
      'to_customers -5.000000 -2.925000',
      'working_loss -0.100000 -0.058500',
    ]);
    expect([report.closing.gross_g, report.closing.gold_g]).toEqual(['14.900000', '8.716500']);
  });

  it('of all owners is the sum of each', async () => {
    const report = await reconciliation(`${FEBRUARY}&owner=all`);
    expect([report.closing.gross_g, report.closing.gold_g]).toEqual(['114.400000', '83.330250']);
    expect(report.left_over).toEqual(nothing);
  });
});

describe('what is wrongly asked', () => {
  it.each([
    '/reports/balances?by=colour',
    '/reports/balances?on=31.01.2026',
    '/reports/losses?by=operation',
    "/reports/losses?by=bench'--&from=2026-01-01&to=2026-01-31",
    '/reports/reconciliation?from=2026-01-01&to=2026-01-31&owner=me',
    '/reports/reconciliation?from=2026-01-01&to=2026-01-31&more=1',
  ])('%s is not answered', async (path) => {
    expect([400, 422]).toContain((await months.owner.get(path)).status);
  });

  it('a goldsmith reads no report, an auditor reads all', async () => {
    const smith = await addMember(server, months.owner, 'goldsmith', 'Yusuf Arden');
    const auditor = await addMember(server, months.owner, 'auditor', 'Nell Oram');
    for (const path of [
      `/reports/balances`,
      `/reports/losses?${JANUARY}`,
      `/reports/reconciliation?${JANUARY}`,
      '/book/check',
    ]) {
      expect([path, (await smith.get(path)).status]).toEqual([path, 403]);
      expect([path, (await auditor.get(path)).status]).toEqual([path, 200]);
    }
  });

  it('another workshop’s owner is as if absent, and its reports are empty', async () => {
    const stranger = await signUp(server, 'Second Street');
    const { rows: found } = balancesJson.parse((await stranger.get('/reports/balances')).body);
    expect(found).toEqual([]);
    const report = reconciliationJson.parse(
      (await stranger.get(`/reports/reconciliation?${FEBRUARY}&owner=${months.ids.customer}`)).body,
    );
    expect(report.places).toEqual([]);
  });

  it('the whole book checks after all this', async () => {
    const { body } = await months.owner.get('/book/check');
    expect([body.sound, body.faults]).toEqual([true, []]);
  });
});
