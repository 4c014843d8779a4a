/**
 * What the counter reads: lots with their trail and family, the register of vouchers, the scan field, the keeper's day
 * and the goldsmith's bench, each figure from the two months that `support/worked-months.ts` records.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readCsv } from '../../shared/dossier/csv.ts';
import { lotPage, lotWhole } from '../../shared/schemas/lots.ts';
import { searchHit } from '../../shared/schemas/search.ts';
import { myBenchJson, todayJson } from '../../shared/schemas/today.ts';
import { voucherPage, voucherWhole } from '../../shared/schemas/vouchers.ts';
import type { Person, TestServer } from '../support/server.ts';
import { addMember, signUp, startTestServer } from '../support/server.ts';
import type { WorkedMonths } from '../support/worked-months.ts';
import { workTwoMonths } from '../support/worked-months.ts';

let server: TestServer;
let months: WorkedMonths;
beforeAll(async () => {
  server = await startTestServer();
  months = await workTwoMonths(server);
});
afterAll(() => server.close());

const get = async (path: string, by: Person = months.owner): Promise<unknown> => (await by.get(path)).body;
const lots = async (query: string) => lotPage.parse(await get(`/lots?${query}`));
const vouchers = async (query: string) => voucherPage.parse(await get(`/vouchers?${query}`));
const words = (page: { rows: readonly { description: string }[] }) =>
  page.rows.map((row) => row.description).sort();

describe('the list of lots', () => {
  it.each([
    ['form=sheet', ['750 yellow sheet']],
    ['q=pendant', ['pendant']],
    ['owner=house&form=work', ['ring blank']],
    ['standing=spent', ['Floor, drum 1']],
    ['metal=platinum', []],
    ['q=%25', []],
  ])('%s', async (query, expected) => {
    expect(words(await lots(query))).toEqual(expected);
  });

  it('by owner and by place', async () => {
    expect(words(await lots(`owner=${months.ids.customer}`))).toEqual(['her mother’s chain', 'pendant']);
    expect(words(await lots(`place_id=${months.ids.bench}`))).toEqual(['pendant', 'ring blank']);
  });

  it('page by page gives every lot once, newest first', async () => {
    const whole = await lots('limit=200');
    const seen: string[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const page = await lots(cursor === '' ? 'limit=2' : `limit=2&cursor=${cursor}`);
      seen.push(...page.rows.map((row) => row.code));
      cursor = page.next_cursor;
    }
    expect(seen).toEqual(whole.rows.map((row) => row.code));
    expect(new Set(seen).size).toBe(seen.length);
  });

  it.each(['limit=0', 'limit=201', 'form=ingot', "cursor=1'", 'sort=code', 'place_id=1'])(
    'refuses what it does not know: %s',
    async (query) => {
      expect([400, 422]).toContain((await months.owner.get(`/lots?${query}`)).status);
    },
  );

  it('as CSV', async () => {
    const response = await months.owner.get('/lots?form=sheet&format=csv');
    const [head, line] = readCsv(response.text.replace('\uFEFF', ''));
    expect(line?.[head?.indexOf('gold_g') ?? -1]).toBe('52.500000');
  });
});

describe('one lot', () => {
  it('tells where it lies, how it came there, and what came of it', async () => {
    const lot = lotWhole.parse(await get(`/lots/${months.ids.sheet}`));
    expect(lot.holdings.map((h) => `${h.account_name} ${h.gross_g} ${h.gold_g} ${h.since}`)).toEqual([
      'Safe 70.000000 52.500000 2026-01-12',
    ]);
    expect(
      lot.trail.map(
        (t) => `${t.kind} ${t.business_date} ${t.from_names ?? ''} > ${t.to_names ?? ''} ${t.gross_g}`,
      ),
    ).toEqual([
      'weigh_back 2026-01-12 Bench 1 > Safe 10.000000',
      'issue 2026-01-10 Safe > Bench 1 40.000000',
      'weigh_in 2026-01-05 Brenholt Fine Metals > Safe 100.000000',
    ]);
    const made = lot.family.map((f) => `${f.depth} ${f.form} ${f.gross_g} ${f.gold_g}`).sort();
    // The filings are told as they lie in the safe, dirt and all.
    expect(made).toEqual([
      '1 clean_scrap 2.000000 1.500000',
      '1 filings 1.000000 0.738750',
      '1 work 26.500000 19.875000',
    ]);
  });

  it('knows its parents from the other side', async () => {
    const [row] = (await lots('q=ring blank')).rows;
    const lot = lotWhole.parse(await get(`/lots/${row?.id ?? ''}`));
    expect(lot.family.map((f) => `${f.depth} ${f.description}`)).toEqual(['-1 750 yellow sheet']);
    // The loss stands in the name of the work, and is no metal that lies anywhere.
    expect(lot.trail.map((t) => `${t.kind} ${t.gross_g} ${t.gold_g}`)).toEqual([
      'weigh_back 26.500000 19.875000',
    ]);
  });

  it('is found by its code, typed small and without hyphens; a mistyped code finds none', async () => {
    const { code } = lotWhole.parse(await get(`/lots/${months.ids.sheet}`));
    for (const typed of [code, code.toLowerCase(), code.replaceAll('-', '')])
      expect(lotWhole.parse(await get(`/lots/by-code/${typed}`)).id).toBe(months.ids.sheet);
    const other = code.endsWith('A') ? 'B' : 'A';
    const mistyped = await months.owner.get(`/lots/by-code/${code.slice(0, -1)}${other}`);
    expect([mistyped.status, mistyped.body.errors[0].field]).toEqual([422, 'code']);
  });

  it('is as if absent for another workshop', async () => {
    const stranger = await signUp(server, 'Second Street');
    expect((await stranger.get(`/lots/${months.ids.sheet}`)).status).toBe(404);
    expect((await stranger.get(`/vouchers/${months.ids.weigh_in}`)).status).toBe(404);
  });
});

describe('the register of vouchers', () => {
  it.each([
    ['kind=issue', ['issue 2026-02-12', 'issue 2026-01-10']],
    ['from=2026-02-20&to=2026-02-20', ['outturn 2026-02-20']],
    ['operation=sheet_work&to=2026-01-31', ['weigh_back 2026-01-12', 'issue 2026-01-10']],
  ])('%s', async (query, expected) => {
    expect((await vouchers(query)).rows.map((v) => `${v.kind} ${v.business_date}`)).toEqual(expected);
  });

  it('by account and by lot', async () => {
    const ofRefiner = await vouchers(`account_id=${months.ids.refiner}`);
    expect(ofRefiner.rows.map((v) => v.kind)).toEqual(['outturn', 'arrive']);
    const ofSheet = await vouchers(`lot_id=${months.ids.sheet}`);
    expect(ofSheet.rows.map((v) => v.kind)).toEqual(['weigh_back', 'issue', 'weigh_in']);
  });

  it('page by page gives every record once, newest first', async () => {
    const seen: string[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const page = await vouchers(`show=all&limit=7${cursor === '' ? '' : `&cursor=${cursor}`}`);
      seen.push(...page.rows.map((v) => v.sequence));
      cursor = page.next_cursor;
    }
    expect(seen).toEqual(Array.from(seen, (_, n) => String(seen.length - n)));
  });

  it('one voucher by id or number: entries that sum to nothing, and the hash of the one before', async () => {
    const one = voucherWhole.parse(await get(`/vouchers/${months.ids.weigh_in}`));
    expect(one.entries.map((e) => `${e.account_name} ${e.gross_g} ${e.gold_g}`)).toEqual([
      'Brenholt Fine Metals -100.000000 -75.000000',
      'Safe 100.000000 75.000000',
    ]);
    const before = voucherWhole.parse(await get(`/vouchers/${BigInt(one.sequence) - 1n}`));
    expect(one.previous_hash).toBe(before.hash);
  });
});

describe('the scan field', () => {
  const hits = async (q: string) =>
    searchHit
      .array()
      .parse((await months.owner.get('/search').query({ q })).body.hits)
      .map((hit) => `${hit.what} ${hit.label}`);

  it('finds a lot by its code or words, a voucher by its number, a job, a party', async () => {
    const { code } = lotWhole.parse(await get(`/lots/${months.ids.sheet}`));
    expect(await hits(code.replaceAll('-', ''))).toEqual([`lot ${code}`]);
    expect(await hits('J-1188')).toEqual(['job J-1188']);
    expect(await hits('brenholt')).toEqual(['party Brenholt Fine Metals']);
    expect(await hits('3')).toContain('voucher 3');
  });

  it('takes marks of a pattern for what they are', async () => {
    expect(await hits('%')).toEqual([]);
    expect(await hits('_')).toEqual([]);
    expect(await hits("' OR 1=1 --")).toEqual([]);
  });
});

describe('the keeper’s day', () => {
  it('tells who holds what out of the safe, and what it is worth', async () => {
    const day = todayJson.parse(await get('/today'));
    // 26.5 g of 750 and 9.9 g with 5.7915 g of gold; 25.6665 ÷ 31.1034768 × 2500.
    expect(
      day.holders.map(
        (h) => `${h.name} ${h.custodian_name ?? ''} ${h.since} ${h.gross_g} ${h.gold_g} ${h.value ?? ''}`,
      ),
    ).toEqual(['Bench 1 Corin Dask 2026-01-12 36.400000 25.666500 2062.99']);
    expect(day.value_out).toBe('2062.99');
    expect(day.house).toEqual([
      {
        metal: 'gold',
        safe_g: '54.738750',
        benches_g: '19.875000',
        bins_g: '0.000000',
        outside_g: '0.000000',
        house_g: '74.613750',
      },
    ]);
    expect([day.consignments, day.holds, day.requests, day.to_explain, day.signatures]).toEqual([
      [],
      [],
      [],
      [],
      0,
    ]);
    const issued = day.handovers.filter((h) => h.kind === 'issue');
    expect(issued.map((h) => `${h.to_name} ${h.job_code ?? ''} ${h.gross_g}`)).toEqual([
      'Corin Dask J-1187 40.000000',
      'Corin Dask J-1188 10.000000',
    ]);
  });
});

describe('the goldsmith’s bench', () => {
  it('shows what lies there job by job, and what waits to be taken over', async () => {
    const bench = myBenchJson.parse(await get('/my-bench', months.smith));
    expect(bench.places.map((p) => p.name)).toEqual(['Bench 1']);
    expect(
      bench.holdings.map((h) => `${h.job_code ?? ''} ${h.lot.description} ${h.gross_g} ${h.gold_g}`),
    ).toEqual(['J-1187 ring blank 26.500000 19.875000', 'J-1188 pendant 9.900000 5.791500']);
    expect(bench.handovers.every((h) => h.to_name === 'Corin Dask')).toBe(true);
  });

  it('shows nothing of another’s bench', async () => {
    const other = await addMember(server, months.owner, 'goldsmith', 'Yusuf Arden');
    const bench = myBenchJson.parse(await get('/my-bench', other));
    expect([bench.places, bench.holdings, bench.handovers]).toEqual([[], [], []]);
  });
});
