/**
 * A customer's metal statement and the report on refiners, each figure reckoned by hand from the two months that
 * `support/worked-months.ts` records.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readCsv } from '../../shared/dossier/csv.ts';
import { ownerStatementJson, refinersJson } from '../../shared/schemas/statements.ts';
import type { TestServer } from '../support/server.ts';
import { signUp, startTestServer } from '../support/server.ts';
import { httpWorkshop } from '../support/workshop-http.ts';
import type { WorkedMonths } from '../support/worked-months.ts';
import { FEBRUARY, JANUARY, workTwoMonths } from '../support/worked-months.ts';

let server: TestServer;
let months: WorkedMonths;
beforeAll(async () => {
  server = await startTestServer();
  months = await workTwoMonths(server);
});
afterAll(() => server.close());

const path = (query: string) => `/reports/statements/owner/${months.ids.customer}?${query}`;
const statement = async (query: string) =>
  ownerStatementJson.parse((await months.owner.get(path(query))).body);

describe('a customer’s metal statement', () => {
  it('of February: brought, lost in work, given back, still here', async () => {
    const report = await statement(FEBRUARY);
    expect(report.owner.name).toBe('=Edda Lorn');
    expect(
      report.movements.map(
        (m) => `${m.business_date} ${m.name} ${m.gross_g} ${m.gold_g} ${m.job_code ?? 'no job'}`,
      ),
    ).toEqual([
      '2026-02-10 Brought 20.000000 11.700000 no job',
      '2026-02-15 Loss charged -0.100000 -0.058500 J-1188',
      '2026-02-25 Given back -5.000000 -2.925000 no job',
    ]);
    expect([report.opening.gold_g, report.closing.gold_g]).toEqual(['0.000000', '8.716500']);
    expect([report.lost.gold_g, report.owed.gold_g, report.more]).toEqual(['0.000000', '0.000000', false]);
  });

  it('of January: nothing yet', async () => {
    const report = await statement(JANUARY);
    expect([report.movements, report.closing.gross_g]).toEqual([[], '0.000000']);
  });

  it('as CSV, a row for each movement', async () => {
    const response = await months.owner.get(path(`${FEBRUARY}&format=csv`));
    const [head, ...lines] = readCsv(response.text.replace('\uFEFF', ''));
    expect(lines.map((line) => line[head?.indexOf('gold_g') ?? -1])).toEqual([
      '11.700000',
      '-0.058500',
      '-2.925000',
    ]);
  });

  it('is nobody’s of another workshop, nor of an unknown party', async () => {
    const stranger = await signUp(server, 'Second Street');
    expect((await stranger.get(path(FEBRUARY))).status).toBe(404);
    const unknown = `/reports/statements/owner/${months.ids.safe}?${FEBRUARY}`;
    expect((await months.owner.get(unknown)).status).toBe(404);
    expect((await months.owner.get(`/reports/statements/owner/x?${FEBRUARY}`)).status).toBe(404);
  });
});

describe('the report on refiners', () => {
  const refiners = async (query = '') =>
    refinersJson.parse((await months.owner.get(`/reports/refiners${query}`)).body);

  it('tells sent, received, found, kept and credited, and the days', async () => {
    const { rows } = await refiners();
    // Sent 0.23175 − credited 0.2475 = 0.000005 lighter − 0.018255 more found + 0.0025 kept.
    expect(rows).toMatchObject([
      {
        id: months.ids.consign,
        code: 'C-0001',
        refiner_name: 'Osk & Varley, works',
        courier_name: 'Pell van',
        sent_on: '2026-02-05',
        arrived_on: '2026-02-07',
        settled_on: '2026-02-20',
        days: '15',
        state: 'settled',
        sent_gross_g: '50.000000',
        received_gross_g: '49.999000',
        statements: '77-1146',
        charges: '12',
        metals: [
          {
            metal: 'gold',
            expected_g: '0.231750',
            weighing_difference_g: '0.000005',
            assayed_g: '0.250000',
            assay_difference_g: '-0.018255',
            deduction_g: '0.002500',
            charge_g: '0.000000',
            credited_g: '0.247500',
            credited_percent: '106.80',
          },
        ],
      },
    ]);
  });

  it('by refiner and period, page by page', async () => {
    expect(
      (await refiners(`?refiner_id=${months.ids.refiner}&from=2026-02-05&to=2026-02-05`)).rows,
    ).toHaveLength(1);
    expect((await refiners('?from=2026-02-06')).rows).toEqual([]);
    expect((await refiners(`?refiner_id=${months.ids.safe}`)).rows).toEqual([]);
    expect((await refiners('?cursor=1')).rows).toEqual([]);
    expect((await refiners('?limit=1')).next_cursor).toBe(null);
  });

  it('says on the way before it arrives, and at the refiner after', async () => {
    const shop = httpWorkshop(months.owner);
    const { owner, ids } = months;
    const sent = await owner.record('consign', {
      code: 'C-0002',
      from_id: ids.safe,
      courier_id: await shop.account('courier'),
      destination_id: ids.refiner,
      lines: [{ lot_id: ids.sheet, amount: { how: 'weighed', weighing: { gross_g: '4.000' } } }],
      packages: [{ seal: '0392', content: 'sheet' }],
    });
    const first = async () => {
      const [row] = (await refiners()).rows;
      return [row?.code, row?.state, row?.days, row?.metals[0]?.expected_g, row?.metals[0]?.credited_percent];
    };
    expect(await first()).toEqual(['C-0002', 'on_the_way', null, '3.000000', null]);
    await owner.record('arrive', {
      consign_id: sent.records.at(-1)?.id,
      lines: [{ lot_id: ids.sheet, received_g: '4.000' }],
    });
    expect(await first()).toEqual(['C-0002', 'at_refiner', null, '3.000000', null]);
  });

  it('as CSV, a row for each metal', async () => {
    const response = await months.owner.get('/reports/refiners?format=csv&to=2026-02-28');
    const [head, line] = readCsv(response.text.replace('\uFEFF', ''));
    expect([line?.[head?.indexOf('metal') ?? -1], line?.[head?.indexOf('credited_g') ?? -1]]).toEqual([
      'gold',
      '0.247500',
    ]);
  });
});

describe('lost metal of a customer', () => {
  it('stays owed after it is written off, until house metal of as much becomes the customer’s', async () => {
    const { owner, ids } = months;
    const { today } = (await owner.get('/session')).body;
    const all = `from=2026-01-01&to=${today}`;
    await owner.record('write-off', {
      way: 'from_place',
      place_id: ids.safe,
      cause: 'theft',
      number: 'P-77',
      reason: 'The box was gone in the morning.',
      lines: [{ lot_id: ids.gold, amount: { how: 'stated', gross_g: '2.000' } }],
    });
    const lost = await statement(all);
    // 2 g of 585.
    expect([lost.lost.gold_g, lost.owed.gold_g]).toEqual(['1.170000', '1.170000']);
    await owner.record('ownership', {
      place_id: ids.safe,
      lot_id: ids.sheet,
      amount: { how: 'stated', gross_g: '1.000' },
      new_owner_id: ids.customer,
      what_for: 'for what was stolen',
    });
    const after = await statement(all);
    expect([after.made_good.gold_g, after.owed.gold_g]).toEqual(['0.750000', '0.420000']);
    expect(after.movements.slice(-2).map((m) => `${m.name} ${m.gold_g}`)).toEqual([
      'Written off -1.170000',
      'Changed owner 0.750000',
    ]);
  });
});
