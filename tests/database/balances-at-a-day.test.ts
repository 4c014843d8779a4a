/**
 * Balances at a past day come from snapshots: they must equal the full sum of the entries at every day, whatever was
 * posted, dated back or asked for between, and must not read the entries again.
 */
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { TestDatabase } from '../support/database.ts';
import { createTestDatabase } from '../support/database.ts';
import type { Sql } from '../support/raw-book.ts';
import { RawBook, refusal } from '../support/raw-book.ts';

const G = 1_000_000n;
const MASSES = ['gross_ug', 'gold_ug', 'silver_ug', 'platinum_ug', 'palladium_ug'];
const DAYS = ['2025-12-31', '2026-01-01', '2026-01-31', '2026-02-01', '2026-02-14', '2026-04-30'] as const;

let db: TestDatabase;
beforeAll(async () => {
  db = await createTestDatabase();
});
afterAll(() => db.drop());

const columns = MASSES.map((m) => `${m}::text`).join(', ');
const sums = MASSES.map((m) => `sum(${m})::text AS ${m}`).join(', ');

const bySnapshot = (book: RawBook, day: string) => book.as('app', (sql) => snapshot(sql, day));

const snapshot = (sql: Sql, day: string) =>
  sql(`SELECT account_id, lot_id, ${columns} FROM balances_at($1) ORDER BY 1, 2`, [day]);

const fullSum = (sql: Sql, day: string) =>
  sql(
    `SELECT e.account_id, e.lot_id, ${sums} FROM entry e JOIN account a ON a.id = e.account_id AND a.workshop_id = e.workshop_id
      WHERE is_place(a.kind) AND e.business_date <= $1 GROUP BY 1, 2 HAVING ${MASSES.map((m) => `sum(${m}) <> 0`).join(' OR ')} ORDER BY 1, 2`,
    [day],
  );

const agree = (book: RawBook, days: readonly string[]) =>
  book.as('app', async (sql) => {
    for (const day of days) expect(await snapshot(sql, day)).toEqual(await fullSum(sql, day));
  });

describe('balances at the end of a day', () => {
  it('equal the sum of all entries, through any order of posting, dating back and asking', async () => {
    const step = fc.record({
      do: fc.constantFrom('receive', 'issue', 'return', 'ask'),
      day: fc.constantFrom(...DAYS),
      grams: fc.bigInt({ min: 1n, max: 5n }),
    });
    await fc.assert(
      fc.asyncProperty(fc.array(step, { minLength: 4, maxLength: 9 }), async (steps) => {
        const book = await RawBook.open(db);
        for (const { do: what, day, grams } of steps) {
          const mass = { gross: grams * G, gold: grams * 700_000n };
          if (what === 'receive') await book.post([book.move(book.supplier, book.safe, mass, day)]);
          // What is not there on that day is refused, which is part of any order.
          if (what === 'issue') await refusal(book.post([book.move(book.safe, book.bench, mass, day)]));
          if (what === 'return') await refusal(book.post([book.move(book.bench, book.safe, mass, day)]));
          if (what === 'ask') await agree(book, [day]);
        }
        await agree(book, DAYS);
      }),
      { numRuns: 6 },
    );
  }, 90_000);

  it('reads no entry where nothing was posted since the last question, and only the new ones else', async () => {
    const book = await RawBook.open(db);
    for (const day of DAYS) await book.post([book.move(book.supplier, book.safe, { gross: G }, day)]);
    await bySnapshot(book, '2026-02-14');
    const entriesRead = () =>
      book.as('owner', async (sql) => {
        await sql("SELECT * FROM balances_at('2026-02-14')");
        const [row] = await sql(
          "SELECT (seq_tup_read + idx_tup_fetch)::int AS read FROM pg_stat_xact_user_tables WHERE relname = 'entry'",
        );
        return row?.['read'];
      });
    expect(await entriesRead()).toBe(0);
    await book.post([book.move(book.safe, book.bench, { gross: G }, '2026-04-30')]);
    // Two entries, each looked at for its day and for its sums.
    expect(await entriesRead()).toBeLessThanOrEqual(4);
  });

  it('a voucher dated back shows in the months after it', async () => {
    const book = await RawBook.open(db);
    const gross = async (day: string) => (await bySnapshot(book, day)).map((row) => row['gross_ug']);
    await book.post([book.move(book.supplier, book.safe, { gross: 5n * G }, '2026-03-10')]);
    expect([await gross('2026-02-28'), await gross('2026-03-31'), await gross('2026-04-01')]).toEqual([
      [],
      ['5000000'],
      ['5000000'],
    ]);
    await book.post([book.move(book.supplier, book.safe, { gross: 2n * G }, '2026-02-28')]);
    expect([await gross('2026-02-27'), await gross('2026-02-28'), await gross('2026-04-01')]).toEqual([
      [],
      ['2000000'],
      ['7000000'],
    ]);
  });

  it('are of one’s own workshop only, and nobody writes them by hand', async () => {
    const [ours, theirs] = [await RawBook.open(db), await RawBook.open(db)];
    await ours.post([ours.move(ours.supplier, ours.safe, { gross: G })]);
    expect(await bySnapshot(theirs, '2026-04-01')).toEqual([]);
    for (const table of ['balance_day', 'balance_month', 'balance_month_made', 'balance_roll'])
      for (const sql of [`DELETE FROM ${table}`, `INSERT INTO ${table} SELECT * FROM ${table}`])
        expect(await refusal(ours.as('app', (run) => run(sql)))).toBe('42501');
    expect(await refusal(ours.as('app', (run) => run('SELECT roll_balances()')))).toBe('42501');
  });
});
