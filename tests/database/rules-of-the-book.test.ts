/**
 * The first three of the seven rules of the book (the others: `rules-of-the-chain.test.ts`), attacked with SQL: as the role that the program runs as, and where the rule
 * holds for the owner of the tables too, as the owner. The states GW001 and on are those of the migrations; 42501 is
 * PostgreSQL's "insufficient privilege", 23505 and 23514 its broken unique key and check.
 */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { z } from 'zod';
import type { MassVector } from '../../shared/mass/vector.ts';
import type { TestDatabase } from '../support/database.ts';
import { createTestDatabase } from '../support/database.ts';
import { RawBook, refusal } from '../support/raw-book.ts';

const NO_PRIVILEGE = '42501';
/** Less gross than nothing is also less than the fine metal in it: either check may speak first. */
const BELOW_NOTHING = /^23514 place_(never_below_nothing|fine_within_gross)$/;
const G = 1_000_000n;
/** 20 g with 9 g of precious metal in it. */
const STOCK = { gross: 20n * G, gold: 7n * G, silver: 1n * G, platinum: 500_000n, palladium: 500_000n };

let db: TestDatabase;
let book: RawBook;
beforeAll(async () => {
  db = await createTestDatabase();
  await openWith(STOCK);
});
afterAll(() => db.drop());

/** A workshop of its own, with this in its safe. */
const openWith = async (mass: Partial<MassVector>) => {
  book = await RawBook.open(db);
  await book.post([book.move(book.supplier, book.safe, mass)]);
};

/** A statement by itself, as a role inside the workshop's wall. */
const attack = (role: 'owner' | 'app', sql: string, bind: readonly unknown[] = []) =>
  refusal(book.as(role, (query) => query(sql, bind)));

const head = z.object({ sequence: z.string(), hash: z.string() });
const headNow = async () =>
  head.parse((await book.as('app', (sql) => sql('SELECT sequence::text, hash FROM workshop_head')))[0]);

describe('rule 1: a voucher has at least two entries, which sum to zero in all five masses', () => {
  it.each(['gross', 'gold', 'silver', 'platinum', 'palladium'] as const)(
    'one microgram of %s too many is refused',
    async (mass) => {
      const before = await headNow();
      const one = book.voucher('transfer', [
        { account: book.safe, lot: book.lot, mass: { gross: -G, gold: -10n, [mass]: -9n } },
        { account: book.bench, lot: book.lot, mass: { gross: G, gold: 10n, [mass]: 10n } },
      ]);
      expect(await refusal(book.post([one]))).toBe('GW001');
      expect(await headNow()).toEqual(before);
    },
  );

  it('no entry and one entry are refused, even one of nothing', async () => {
    expect(await refusal(book.post([book.voucher('transfer', [])]))).toBe('GW001');
    const nothing = book.voucher('transfer', [{ account: book.safe, lot: book.lot, mass: {} }]);
    expect(await refusal(book.post([nothing]))).toBe('GW001');
  });

  it('two vouchers that balance only together are refused', async () => {
    const half = (mass: bigint) =>
      book.voucher('transfer', [
        { account: book.safe, lot: book.lot, mass: { gross: mass } },
        { account: book.bench, lot: book.lot, mass: {} },
      ]);
    expect(await refusal(book.post([half(-G), half(G)]))).toBe('GW001');
    const { sequence } = await headNow();
    const both = `INSERT INTO entry (workshop_id, voucher_sequence, line, account_id, lot_id, business_date, gross_ug, gold_ug, silver_ug, platinum_ug, palladium_ug)
      SELECT $1::uuid, n, 100 + line, $2::uuid, $3::uuid, '2026-04-01', CASE WHEN n = $4::bigint THEN 1 ELSE -1 END, 0, 0, 0, 0
      FROM generate_series($4::bigint - 1, $4::bigint) n, generate_series(1, 2) line`;
    expect(await attack('owner', both, [book.workshop_id, book.safe, book.lot, sequence])).toBe('GW001');
  });

  it('an act carries no entries', async () => {
    const act = {
      ...book.move(book.safe, book.bench, { gross: G }),
      kind: 'test_recorded',
    };
    expect(await refusal(book.post([act]))).toBe('GW001');
  });

  it('the program’s role writes neither records nor entries nor holdings but through post_records', async () => {
    for (const table of [
      'record',
      'entry',
      'holding',
      'job_holding',
      'account',
      'lot',
      'lot_parent',
      'period',
    ])
      expect([table, await attack('app', `INSERT INTO ${table} SELECT * FROM ${table}`)]).toEqual([
        table,
        NO_PRIVILEGE,
      ]);
  });
});

describe('rule 2: records and entries are never changed or removed', () => {
  const CHANGES = [
    "UPDATE record SET note = 'mended'",
    'UPDATE entry SET gross_ug = gross_ug',
    'DELETE FROM record',
    'DELETE FROM entry',
    'TRUNCATE entry',
    'TRUNCATE record CASCADE',
    'INSERT INTO record SELECT * FROM record ON CONFLICT (workshop_id, sequence) DO UPDATE SET note = $$x$$',
  ];

  it.each(CHANGES)('the program’s role: %s', async (sql) => {
    expect(await attack('app', sql)).toBe(NO_PRIVILEGE);
  });

  it.each([...CHANGES, 'TRUNCATE workshop CASCADE'])('the owner of the tables too: %s', async (sql) => {
    expect(await attack('owner', sql)).toBe('GW002');
  });

  it('the program’s role changes no balance by hand', async () => {
    for (const table of ['holding', 'job_holding', 'workshop_head', 'period', 'account', 'lot'])
      for (const sql of [
        `DELETE FROM ${table}`,
        `TRUNCATE ${table}`,
        `UPDATE ${table} SET workshop_id = workshop_id`,
      ])
        expect([sql, await attack('app', sql)]).toEqual([sql, NO_PRIVILEGE]);
  });

  it('a reversal is the exact mirror image of a voucher, and there is one only', async () => {
    await book.post([book.move(book.safe, book.bench, { gross: 3n * G, gold: G })]);
    const issue = book.move(book.safe, book.bench, { gross: 2n * G, gold: G });
    await book.post([issue]);
    const back = (gold: bigint) => ({
      ...book.move(book.bench, book.safe, { gross: 2n * G, gold }),
      kind: 'reversal',
      reverses: issue.id,
    });
    const mirror = () => {
      const { entries, ...rest } = back(G);
      // The mirror keeps the lines in their order, with the signs turned.
      return { ...rest, entries: [...entries].reverse().map((e, i) => ({ ...e, line: String(i + 1) })) };
    };
    expect(await refusal(book.post([back(G - 1n)]))).toBe('GW004');
    expect(await refusal(book.post([mirror()]))).toBe('nothing refused');
    expect(await refusal(book.post([mirror()]))).toBe('23505 record_reversed_once');
  });

  it('nothing reverses an act, a reversal, or what is not there', async () => {
    const act = book.act('test_recorded', {});
    await book.post([act]);
    const reverse = (reverses: string) => ({
      ...book.move(book.supplier, book.safe, { gross: G }),
      kind: 'reversal',
      reverses,
    });
    expect(await refusal(book.post([reverse(act.id)]))).toBe('GW004');
    expect(await refusal(book.post([reverse(book.lot)]))).toMatch(/^(GW004|23503)/);
    const named = { ...book.move(book.supplier, book.safe, { gross: G }), reverses: act.id };
    expect(await refusal(book.post([named]))).toMatch(/^23514/);
  });
});

describe('rule 3: no place ever holds less than nothing', () => {
  beforeEach(() => openWith(STOCK));

  it.each(['gross', 'gold', 'silver', 'platinum', 'palladium'] as const)(
    'one microgram of %s more than is there is refused',
    async (mass) => {
      const most = { ...STOCK, [mass]: STOCK[mass] + 1n };
      expect(await refusal(book.post([book.move(book.safe, book.bench, most)]))).toMatch(BELOW_NOTHING);
      expect(await refusal(book.post([book.move(book.safe, book.bench, STOCK)]))).toBe('nothing refused');
    },
  );

  it('not for a moment either: what is put back in the same transaction doesn’t help', async () => {
    await openWith({ gross: 10n * G });
    const out = book.move(book.safe, book.bench, { gross: 11n * G });
    const back = book.move(book.bench, book.safe, { gross: 11n * G });
    expect(await refusal(book.post([out, back]))).toMatch(BELOW_NOTHING);
  });

  it('a place holds no more precious metal than gross, and no pieces below nothing', async () => {
    const finer = book.move(book.supplier, book.bench, { gross: G, gold: G, silver: 1n });
    expect(await refusal(book.post([finer]))).toBe('23514 place_fine_within_gross');
    const pieces = book.voucher('transfer', [
      { account: book.safe, lot: book.lot, mass: { gross: -G }, pieces: -1n },
      { account: book.bench, lot: book.lot, mass: { gross: G }, pieces: 1n },
    ]);
    expect(await refusal(book.post([pieces]))).toBe('23514 place_never_below_nothing');
  });

  it('a voucher dated back is refused where a later day’s closing would fall below nothing, with the earliest date that does', async () => {
    await openWith({ gross: 10n * G });
    // 10 g since 1 April; 8 g out on the 10th, 8 g back on the 20th. 3 g out on the 5th would leave −1 g on the 10th.
    await book.post([
      book.move(book.safe, book.bench, { gross: 8n * G }, '2026-04-10'),
      book.move(book.bench, book.safe, { gross: 8n * G }, '2026-04-20'),
    ]);
    const back = (day: string, gross: bigint) =>
      book.post([book.move(book.safe, book.bench, { gross: gross * G }, day)]);
    expect(await refusal(back('2026-04-05', 3n))).toBe('GW003');
    await expect(back('2026-04-05', 3n)).rejects.toHaveProperty(
      'detail',
      expect.stringContaining('"earliest": "2026-04-20"'),
    );
    expect(await refusal(back('2026-04-05', 2n))).toBe('nothing refused');
    expect(await refusal(back('2026-04-20', 3n))).toBe('nothing refused');
  });

  it('outside, a supplier’s account goes below nothing: what came in is negative', async () => {
    const rows = await book.as('app', (sql) =>
      sql('SELECT gross_ug::text FROM holding WHERE account_id = $1', [book.supplier]),
    );
    expect(rows).toEqual([{ gross_ug: '-20000000' }]);
  });

  it('of many who take the same last gram at once, one has it', async () => {
    const takers = await Promise.all(
      Array.from({ length: 8 }, () => refusal(book.post([book.move(book.safe, book.bench, STOCK)]))),
    );
    expect(takers.filter((t) => t === 'nothing refused')).toHaveLength(1);
    expect(takers.filter((t) => BELOW_NOTHING.test(t))).toHaveLength(7);
  });
});
