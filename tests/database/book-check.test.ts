/**
 * Somebody with full rights on the database alters an old weight (F-46), a balance, a hash, a price: the built-in
 * check says so and names the voucher. And a sound book is found sound.
 */
import { createHash } from 'node:crypto';
import { execFile } from 'node:child_process';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { Database } from '../../server/db/database.ts';
import { connect } from '../../server/db/database.ts';
import { checkBook } from '../../server/services/book/check-book.ts';
import type { TestDatabase } from '../support/database.ts';
import { createTestDatabase } from '../support/database.ts';
import { workshopWithOneRowEach } from '../support/one-row-each.ts';
import type { RawBook } from '../support/raw-book.ts';

let test: TestDatabase;
let db: Database;
let book: RawBook;
beforeAll(async () => {
  test = await createTestDatabase();
  db = connect(test.app_url, 2);
});
beforeEach(async () => {
  book = await workshopWithOneRowEach(test);
});
afterAll(async () => {
  await db.close();
  await test.drop();
});

const check = () => db.inScope({ workshop_id: book.workshop_id, user_id: null }, checkBook);

/** Alters rows as the owner of the tables, with the rules switched off. */
const alter = (...statements: readonly string[]) =>
  book.as('owner', async (sql) => {
    await sql('ALTER TABLE record DISABLE TRIGGER USER');
    await sql('ALTER TABLE entry DISABLE TRIGGER USER');
    for (const statement of statements) await sql(statement);
    await sql('ALTER TABLE record ENABLE TRIGGER USER');
    await sql('ALTER TABLE entry ENABLE TRIGGER USER');
  });

/** What the check found: "check no. kind" of each fault. */
const found = async () =>
  (await check()).faults.map((f) => `${f.check} ${f.sequence ?? 'none'} ${f.kind ?? 'none'}`);

const sequenceOf = async (kind: string): Promise<string> => {
  const [row] = await book.as('app', (sql) =>
    sql('SELECT min(sequence)::text AS sequence FROM record WHERE kind = $1', [kind]),
  );
  return String(row?.['sequence']);
};

describe('the check of the whole book', () => {
  it('finds a sound book sound, and counts what it recomputed', async () => {
    const report = await check();
    expect(report.faults).toEqual([]);
    // 6 records at the opening, 10 of one row each; two vouchers of two entries; three balances: supplier, safe, bench.
    expect(report).toMatchObject({ sound: true, records: 16, entries: 4, balances: 3, sequence: '16' });
  });

  it('names the voucher of which one weight was altered', async () => {
    const n = await sequenceOf('transfer');
    await alter(
      `UPDATE entry SET gross_ug = gross_ug - 1000000 WHERE voucher_sequence = ${n} AND gross_ug > 0`,
    );
    const faults = await found();
    expect(faults).toContain(`entries ${n} transfer`);
    expect(faults).toContain(`sum ${n} transfer`);
    expect((await check()).sound).toBe(false);
  });

  it('finds a weight that was altered everywhere it stands, by the hash', async () => {
    const n = await sequenceOf('transfer');
    await alter(
      `UPDATE entry SET gross_ug = gross_ug / 2 WHERE voucher_sequence = ${n}`,
      `UPDATE record SET line = replace(line, '10.000000', '5.000000') WHERE sequence = ${n}`,
      `UPDATE holding SET gross_ug = gross_ug / 2 WHERE account_id IN (SELECT id FROM account WHERE kind = 'supplier')`,
    );
    expect(await found()).toContain(`chain ${n} transfer`);
  });

  it('finds it after the hash was made anew too, by the next record', async () => {
    const n = await sequenceOf('transfer');
    const [row] = await book.as('app', (sql) => sql('SELECT line FROM record WHERE sequence = $1', [n]));
    const line = String(row?.['line']).replaceAll('10.000000', '11.000000');
    const hash = createHash('sha256').update(line).digest('hex');
    await alter(`UPDATE record SET line = $$${line}$$, hash = '${hash}' WHERE sequence = ${n}`);
    expect(await found()).toContain(`chain ${BigInt(n) + 1n} transfer`);
  });

  it('finds a record that was taken out, and a chain that was cut short', async () => {
    const n = await sequenceOf('price_set');
    await alter(`DELETE FROM record WHERE sequence = ${n}`);
    expect(await found()).toContain(`chain ${BigInt(n) + 1n} allowance_set`);
    await alter('DELETE FROM entry WHERE voucher_sequence = 16', 'DELETE FROM record WHERE sequence = 16');
    expect(await found()).toContain('chain 16 none');
  });

  it.each([
    ["note = 'mended'", 'line'],
    ["business_date = '2026-04-02'", 'line'],
    ['detail = detail || \'{"job": "J-2"}\'', 'line'],
    ["operation = 'filing'", 'line'],
    ['approved_by = recorded_by', 'line'],
    ["recorded_at = recorded_at + interval '1 millisecond'", 'line'],
  ])('finds a column altered beside the line: %s', async (change, what) => {
    const n = await sequenceOf('transfer');
    await alter(`UPDATE record SET ${change} WHERE sequence = ${n}`);
    expect(await found()).toContain(`${what} ${n} transfer`);
  });

  it('finds a balance that its entries do not make, and names the last voucher that touched it', async () => {
    await alter(`UPDATE holding SET gold_ug = gold_ug + 1 WHERE account_id = '${book.safe}'`);
    expect(await found()).toEqual(['balance 16 transfer']);
    await alter(`DELETE FROM holding WHERE account_id = '${book.safe}'`);
    expect((await check()).faults[0]?.sentence).toContain(
      'Safe, lot G26-0001-X: the balance says 0.000000 g, its entries 9.000000 g',
    );
  });

  it('finds a balance by job or by day that its entries do not make', async () => {
    await alter('UPDATE job_holding SET gross_ug = gross_ug + 1');
    expect(await found()).toEqual(['balance 16 transfer']);
    await alter('UPDATE job_holding SET gross_ug = gross_ug - 1', 'UPDATE balance_day SET gross_ug = 1');
    expect(await found()).toEqual(['balance 16 transfer', 'balance 16 transfer']);
  });

  it.each([
    ["UPDATE account SET name = 'Vault' WHERE kind = 'safe'", 'account_opened'],
    ["UPDATE account SET operation = 'melting' WHERE kind = 'working_loss'", 'account_opened'],
    ["UPDATE lot SET gold_permille = 999 WHERE code = 'G26-0001-X'", 'lot_described'],
    ['UPDATE lot SET owner_id = gen_random_uuid()', 'lot_described'],
    ['UPDATE price SET price_per_ozt = 1', 'price_set'],
  ])('finds a register altered by hand: %s', async (change, kind) => {
    await alter(change);
    expect((await check()).faults.map((f) => `${f.check} ${f.kind ?? 'none'}`)).toContain(`register ${kind}`);
  });

  it('runs from the command line over every workshop, and ends with 1 where one is faulty', async () => {
    await alter(`UPDATE holding SET gold_ug = gold_ug + 1 WHERE account_id = '${book.safe}'`);
    const run = promisify(execFile)(
      process.execPath,
      ['--import', 'tsx', join(import.meta.dirname, '../../server/cli/check-book.ts')],
      { env: { ...process.env, DATABASE_OWNER_URL: test.owner_url } },
    );
    await expect(run).rejects.toMatchObject({
      code: 1,
      stdout: expect.stringMatching(
        /^(sound|FAULTY) {2}Raw & Sons: 16 records[^]*no\. 16 was the last of them/,
      ),
    });
  });
});
