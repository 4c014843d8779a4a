/**
 * What is mended later stays out of the month that it belongs to: a correction and a reversal stand in the period of
 * their own date, shown apart, and the closed month reads as it did when it was closed.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { lossesJson, reconciliationJson } from '../../shared/schemas/reports.ts';
import { voucherPage, voucherWhole } from '../../shared/schemas/vouchers.ts';
import type { TestServer } from '../support/server.ts';
import { startTestServer } from '../support/server.ts';
import type { WorkedMonths } from '../support/worked-months.ts';
import { FEBRUARY, JANUARY, workTwoMonths } from '../support/worked-months.ts';

let server: TestServer;
let months: WorkedMonths;
let since = '';
let january: unknown;

const get = async (path: string): Promise<unknown> => (await months.owner.get(path)).body;
const losses = async (query: string) => lossesJson.parse(await get(`/reports/losses?${query}`)).rows;
const reconciliation = async (query: string) =>
  reconciliationJson.parse(await get(`/reports/reconciliation?${query}`));

/** The weigh-back of a job. */
async function weighBack(job_code: string) {
  const { rows } = voucherPage.parse(await get('/vouchers?kind=weigh_back'));
  const found = rows.find((row) => row.job_code === job_code);
  return voucherWhole.parse(await get(`/vouchers/${found?.id ?? ''}`));
}

beforeAll(async () => {
  server = await startTestServer();
  months = await workTwoMonths(server);
  const { today } = z.object({ today: z.string() }).parse(await get('/session'));
  since = `from=2026-03-01&to=${today}`;
  await months.owner.record('close-period', { from: '2026-01-01', to: '2026-01-31' });
  january = await reconciliation(JANUARY);
  // 101 g came in, not 100 g: 1 g more, 0.75 g of it gold.
  const received = voucherWhole.parse(await get(`/vouchers/${months.ids.weigh_in}`));
  const line = (kind: string) => received.entries.find((e) => e.account_kind === kind)?.line;
  await months.owner.record('correction', {
    voucher_id: months.ids.weigh_in,
    reason: 'The delivery note was misread.',
    lines: [{ line: line('safe'), gross_g: '101.000' }],
    rest_line: line('supplier'),
  });
  // The ring blank weighed 26.4 g, not 26.5 g: 0.1 g more was lost, 0.075 g of it gold.
  const worked = await weighBack('J-1187');
  await months.owner.record('correction', {
    voucher_id: worked.id,
    reason: 'The blank was weighed with its tag.',
    lines: [{ line: worked.entries.find((e) => e.gross_g === '26.500000')?.line, gross_g: '26.400' }],
    rest_line: worked.entries.find((e) => e.account_kind === 'working_loss')?.line,
  });
});
afterAll(() => server.close());

describe('after a closed month was corrected', () => {
  it('the month itself reads as before', async () => {
    expect(await reconciliation(JANUARY)).toEqual(january);
    expect((await losses(`by=operation&${JANUARY}`)).map((r) => r.loss_g)).toEqual(['0.386250']);
  });

  it('the corrections stand in a line of their own, in the period of their own date', async () => {
    const report = await reconciliation(since);
    const moved = report.lines
      .filter((l) => /[1-9]/.test(l.gross_g))
      .map((l) => `${l.line} ${l.gross_g} ${l.gold_g}`);
    // + 1 g received − 0.1 g of work; 0.75 − 0.075 of gold.
    expect(moved).toEqual(['corrections 0.900000 0.675000']);
    expect([report.opening.gold_g, report.closing.gold_g, report.left_over.gold_g]).toEqual([
      '74.613750',
      '75.288750',
      '0.000000',
    ]);
  });

  it('the line opens the corrections, and no other voucher of the days', async () => {
    const { rows } = voucherPage.parse(await get(`/vouchers?${since}&line=corrections&owner=house`));
    expect(rows.map((row) => row.kind)).toEqual(['correction', 'correction']);
  });

  it('the loss that was corrected is shown apart, under the operation of the first voucher', async () => {
    const [row] = await losses(`by=operation&${since}`);
    expect([
      row?.key,
      row?.vouchers,
      row?.worked_g,
      row?.loss_g,
      row?.corrected_g,
      row?.gross_percent,
    ]).toEqual(['sheet_work', '0', '0.000000', '0.075000', '0.075000', null]);
  });
});

describe('after a weigh-back was reversed', () => {
  beforeAll(async () => {
    const { id } = await weighBack('J-1188');
    await months.owner.record('reversal', { voucher_id: id, reason: 'Posted to the wrong job.' });
  });
  const ofJob = async (query: string) => {
    const row = (await losses(`by=job&${query}`)).find((r) => r.name.startsWith('J-1188'));
    return row === undefined ? 'none' : `${row.vouchers} ${row.worked_g} ${row.loss_g} ${row.corrected_g}`;
  };

  it('its month keeps what it counted, and the reversal takes it back on its own day', async () => {
    expect(await ofJob(FEBRUARY)).toBe('1 5.850000 0.058500 0.000000');
    expect(await ofJob(since)).toBe('-1 -5.850000 -0.058500 -0.058500');
  });

  it('over both, nothing of it is left', async () => {
    expect(await ofJob(since.replace('2026-03-01', '2026-01-01'))).toBe('none');
  });

  it('the whole book still checks', async () => {
    expect(await get('/book/check')).toMatchObject({ sound: true, faults: [] });
  });
});
