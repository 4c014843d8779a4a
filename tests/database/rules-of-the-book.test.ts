/**
 * Each of the seven rules of the book, attacked with SQL: as the role that the program runs as, and where the rule
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
