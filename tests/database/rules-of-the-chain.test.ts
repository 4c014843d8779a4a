/**
 * Rules four to seven of the book (the others: `rules-of-the-book.test.ts`), attacked with SQL: as the role that the program runs as, and where the rule
 * holds for the owner of the tables too, as the owner. The states GW001 and on are those of the migrations; 42501 is
 * PostgreSQL's "insufficient privilege", 23505 and 23514 its broken unique key and check.
 */
import { createHash } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { recordLineParts } from '../../shared/chain/record-line.ts';
import type { MassVector } from '../../shared/mass/vector.ts';
import type { TestDatabase } from '../support/database.ts';
import { createTestDatabase } from '../support/database.ts';
import { RawBook, asRole, refusal } from '../support/raw-book.ts';

const NO_PRIVILEGE = '42501';
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

describe('rule 4: records are numbered without a gap, each with the hash of the one before', () => {
  beforeEach(() => openWith(STOCK));

  const row = z.object({
    sequence: z.string(),
    line: z.string(),
    previous_hash: z.string(),
    hash: z.string(),
    recorded_at: z.string(),
  });
  const chain = async () =>
    z
      .array(row)
      .parse(
        await book.as('app', (sql) =>
          sql(
            'SELECT sequence::text, line, previous_hash, hash, recorded_at::text FROM record ORDER BY record.sequence',
          ),
        ),
      );

  it('holds for posts that come together, and for those that are refused between them', async () => {
    const bad = book.move(book.safe, book.bench, { gross: 99n * G });
    await Promise.all(
      Array.from({ length: 12 }, (_, n) =>
        n % 3 === 0
          ? refusal(book.post([book.act('test_recorded', {}), bad]))
          : book.post([book.act('test_recorded', {}), book.move(book.safe, book.bench, { gross: 1n })]),
      ),
    );
    const records = await chain();
    // 6 acts and the receipt at the start, and 8 posts of two records.
    expect(records.map((record) => record.sequence)).toEqual(
      Array.from({ length: 23 }, (_, n) => String(n + 1)),
    );
    let prior = '0'.repeat(64);
    let moment = '';
    for (const record of records) {
      expect(record.previous_hash).toBe(prior);
      expect(createHash('sha256').update(record.line, 'utf8').digest('hex')).toBe(record.hash);
      expect(record.recorded_at >= moment).toBe(true);
      prior = record.hash;
      moment = record.recorded_at;
    }
    expect(await headNow()).toEqual({ sequence: '23', hash: prior });
  });

  it('a line that brings its own number, time or hash is refused', async () => {
    const { head, middle } = recordLineParts(book.act('test_recorded', {}));
    const smuggled = [
      { head: `${head}"sequence":"99",`, middle },
      { head, middle: `${middle}"sequence":"99",` },
      { head, middle: `${middle}"previous_hash":"${'0'.repeat(64)}",` },
      { head, middle: `${middle}"recorded_at":"2001-01-01T00:00:00.000Z",` },
      { head: head.replace('"note":null', '"sequence":"99"'), middle },
      { head: head.replace('"note":null', '"kind":"dossier_made"'), middle },
      { head: head.replace('"note":null,', ''), middle },
      { head: `${head}"more":null,`, middle },
    ];
    for (const parts of smuggled)
      expect([parts, await refusal(book.postParts([parts]))]).toEqual([parts, 'GW005']);
  });

  it('the head is moved by post_records alone, and nobody but a seed run by the owner hands in a time', async () => {
    expect(await attack('app', 'UPDATE workshop_head SET sequence = 0')).toBe(NO_PRIVILEGE);
    expect(await attack('app', "SELECT post_records('[]', '[]', '2001-01-01')")).toBe('GW007');
    expect(await attack('owner', "SELECT post_records('[]', '[]', '2001-01-01')")).toBe('nothing refused');
  });

  it('time never runs against the numbers, even where a seed hands in an earlier one', async () => {
    const parts = JSON.stringify([recordLineParts(book.act('test_recorded', {}))]);
    await book.as('owner', (sql) => sql("SELECT post_records($1::jsonb, '[]', '2001-01-01')", [parts]));
    const records = await chain();
    expect(records.at(-1)?.recorded_at).toBe(records.at(-2)?.recorded_at);
  });

  it('no record takes a number that is taken', async () => {
    const again = 'INSERT INTO record SELECT * FROM record ORDER BY sequence LIMIT 1';
    expect(await attack('owner', again)).toBe('23505 record_pkey');
  });
});

describe('rule 5: the same request sent twice records once', () => {
  const open = (key: string, body: string) =>
    book.as('app', (sql) =>
      sql("SELECT open_event($1, $2::uuid, $3, '{}')->>'state' AS state", [
        key,
        book.keeper,
        body.repeat(64),
      ]),
    );

  it('a key is new once; with the same body it is known, with another refused', async () => {
    expect(await open('key-0001', 'a')).toEqual([{ state: 'new' }]);
    expect(await open('key-0001', 'a')).toEqual([{ state: 'answered' }]);
    expect(await open('key-0001', 'b')).toEqual([{ state: 'other_body' }]);
  });

  it('of one key sent many times at once, one is new', async () => {
    const states = await Promise.all(Array.from({ length: 6 }, () => open('key-0002', 'a')));
    expect(states.flat().filter(({ state }) => state === 'new')).toHaveLength(1);
  });

  it('the program’s role forgets no key and gives none to another body', async () => {
    await open('key-0003', 'a');
    expect(await attack('app', 'DELETE FROM request_key')).toBe(NO_PRIVILEGE);
    expect(await attack('app', "UPDATE request_key SET body_sha256 = repeat('b', 64)")).toBe(NO_PRIVILEGE);
    expect(await attack('app', "UPDATE request_key SET key = 'key-0004'")).toBe(NO_PRIVILEGE);
  });

  it('one record is not recorded twice under two numbers', async () => {
    const record = book.move(book.safe, book.bench, { gross: 1n });
    await book.post([record]);
    expect(await refusal(book.post([record]))).toBe('23505 record_workshop_id_id_key');
  });
});

describe('rule 6: nothing enters a closed period', () => {
  const period_id = '6f0b7f3e-5d3c-4d54-9f60-1f3b6f6e0a01';
  beforeEach(() => openWith(STOCK));
  beforeEach(() =>
    book.post([book.act('period_closed', { period_id, from: '2026-03-01', to: '2026-03-31' })]),
  );

  it.each(['2026-03-01', '2026-03-31'])('neither voucher nor act of %s', async (day) => {
    const move = book.move(book.supplier, book.safe, { gross: 1n }, day);
    expect(await refusal(book.post([move]))).toBe('GW008');
    expect(await refusal(book.post([book.act('test_recorded', {}, day)]))).toBe('GW008');
  });

  it('the days round it are open, and the period is opened again by an act only', async () => {
    const on = (day: string) => refusal(book.post([book.act('test_recorded', {}, day)]));
    expect(await on('2026-02-28')).toBe('nothing refused');
    expect(await on('2026-04-01')).toBe('nothing refused');
    expect(await attack('app', 'UPDATE period SET closed = false')).toBe(NO_PRIVILEGE);
    await book.post([book.act('period_reopened', { period_id })]);
    expect(await on('2026-03-15')).toBe('nothing refused');
  });

  it('an empty table of the same name in the session’s own schema doesn’t open it', async () => {
    const parts = JSON.stringify([recordLineParts(book.act('test_recorded', {}, '2026-03-15'))]);
    const shadowed = book.as('app', async (sql) => {
      await sql('CREATE TEMPORARY TABLE period (LIKE public.period)');
      await sql('SET LOCAL search_path = pg_temp, public');
      await sql('SELECT public.post_records($1::jsonb)', [parts]);
    });
    expect(await refusal(shadowed)).toBe('GW008');
  });
});

describe('rule 7: the role that the program runs as can’t switch the rules off', () => {
  it('owns nothing, belongs to no other role, and passes over no wall', async () => {
    const rows = await db.query(
      'app',
      `SELECT rolsuper, rolbypassrls, rolcreaterole, rolcreatedb,
          (SELECT count(*)::int FROM pg_auth_members m WHERE m.member = r.oid) AS roles,
          (SELECT count(*)::int FROM pg_class c WHERE c.relowner = r.oid) AS tables,
          (SELECT count(*)::int FROM pg_proc p WHERE p.proowner = r.oid) AS functions
        FROM pg_roles r WHERE rolname = current_user`,
    );
    expect(rows).toEqual([
      {
        rolsuper: false,
        rolbypassrls: false,
        rolcreaterole: false,
        rolcreatedb: false,
        roles: 0,
        tables: 0,
        functions: 0,
      },
    ]);
  });

  it.each([
    'ALTER TABLE entry DISABLE TRIGGER ALL',
    'DROP TRIGGER entry_balances ON entry',
    'ALTER TABLE holding DROP CONSTRAINT place_never_below_nothing',
    'ALTER TABLE record DISABLE ROW LEVEL SECURITY',
    'DROP POLICY record_of_workshop ON record',
    'CREATE POLICY open ON record USING (true)',
    'DROP TABLE record CASCADE',
    "SET session_replication_role = 'replica'",
    'SET ROLE grainward_owner',
    'SET SESSION AUTHORIZATION grainward_owner',
    'ALTER ROLE grainward_app BYPASSRLS',
    'GRANT UPDATE ON record TO grainward_app',
    'CREATE TABLE public.mine (a integer)',
    'CREATE TRIGGER mine BEFORE INSERT ON entry FOR EACH ROW EXECUTE FUNCTION refuse_change()',
    "CREATE OR REPLACE FUNCTION public.is_place(kind text) RETURNS boolean LANGUAGE sql AS 'SELECT false'",
    "CREATE FUNCTION public.is_place(kind varchar) RETURNS boolean LANGUAGE sql AS 'SELECT false'",
    "SELECT apply_entries(current_workshop(), 7, NULL, '{}')",
    "SELECT project_act(current_workshop(), 1, 'period_reopened', '{}', '2026-04-01', now())",
  ])('%s', async (sql) => {
    // GRANT of what one has no right to give is a warning, not an error: then the right must not be there after it.
    const state = await attack('app', sql);
    if (sql.startsWith('GRANT')) {
      const [right] = await db.query('app', "SELECT has_table_privilege('record', 'UPDATE') AS given");
      expect(right).toEqual({ given: false });
    } else expect(state).toBe(NO_PRIVILEGE);
  });

  it('every function that runs with the owner’s rights fixes its search path', async () => {
    const loose = await db.query(
      'owner',
      `SELECT proname FROM pg_proc WHERE prosecdef AND pronamespace = 'public'::regnamespace
        AND NOT coalesce(array_to_string(proconfig, ',') LIKE '%search_path=public, pg_temp%', false)`,
    );
    expect(loose).toEqual([]);
  });

  it('without a workshop set, nothing is posted', async () => {
    const parts = JSON.stringify([recordLineParts(book.act('test_recorded', {}))]);
    const outside = asRole(db, 'app', null, (sql) => sql('SELECT post_records($1::jsonb)', [parts]));
    expect(await refusal(outside)).toBe('P0002');
  });
});
