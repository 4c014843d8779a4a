/**
 * The second wall between workshops, PostgreSQL's row-level security, attacked as the role that the program runs as:
 * without a workshop set, from another workshop, and by naming another workshop's rows. A new table with a
 * workshop_id is found in the catalogue and has to withstand the same.
 */
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { TestDatabase } from '../support/database.ts';
import { createTestDatabase } from '../support/database.ts';
import { workshopWithOneRowEach } from '../support/one-row-each.ts';
import type { RawBook } from '../support/raw-book.ts';
import { asRole, refusal } from '../support/raw-book.ts';

/** A sign-in session belongs to an account, and only names the workshop it is in at the moment. */
const NO_WALL = ['session'];
const BOOK = [
  'account',
  'lot',
  'lot_parent',
  'record',
  'entry',
  'holding',
  'job_holding',
  'period',
  'workshop_head',
];

let db: TestDatabase;
let ours: RawBook;
let theirs: RawBook;
let tables: string[];

beforeAll(async () => {
  db = await createTestDatabase();
  ours = await workshopWithOneRowEach(db);
  theirs = await workshopWithOneRowEach(db);
  const rows = await db.query(
    'owner',
    `SELECT c.relname AS name FROM pg_class c JOIN pg_attribute a ON a.attrelid = c.oid AND a.attname = 'workshop_id'
      WHERE c.relnamespace = 'public'::regnamespace AND c.relkind IN ('r', 'p') ORDER BY 1`,
  );
  tables = rows.map(({ name }) => String(name)).filter((name) => !NO_WALL.includes(name));
});
afterAll(() => db.drop());

/** How many rows of a workshop the program's role sees, with this workshop set (or none). */
async function seen(table: string, of: string, from: string | null): Promise<string> {
  const rows = await asRole(db, 'app', from, (sql) =>
    sql(`SELECT count(*)::text AS rows FROM ${table} WHERE workshop_id = $1`, [of]),
  );
  return `${table}: ${String(rows[0]?.['rows'])}`;
}

const none = (): string[] => tables.map((table) => `${table}: 0`);
const all = <T>(work: (table: string) => Promise<T>): Promise<T[]> =>
  tables.reduce<Promise<T[]>>(
    async (before, table) => [...(await before), await work(table)],
    Promise.resolve([]),
  );

describe('every table with a workshop', () => {
  it('has a row to look for, so that the next tests can fail', async () => {
    expect(tables).toEqual(expect.arrayContaining([...BOOK, 'document', 'invitation', 'price']));
    const rows = await all((table) => seen(table, ours.workshop_id, ours.workshop_id));
    expect(rows.filter((row) => row.endsWith(': 0'))).toEqual([]);
  });

  it('has its wall up, forced on the owner too', async () => {
    const open = await db.query(
      'owner',
      'SELECT relname FROM pg_class WHERE relname = ANY ($1) AND NOT (relrowsecurity AND relforcerowsecurity)',
      [tables],
    );
    expect(open).toEqual([]);
  });

  it('shows nothing where no workshop is set', async () => {
    expect(await all((table) => seen(table, ours.workshop_id, null))).toEqual(none());
  });

  it('shows nothing of another workshop', async () => {
    expect(await all((table) => seen(table, ours.workshop_id, theirs.workshop_id))).toEqual(none());
  });

  it('shows nothing to the owner of the tables either, but for the queue that serves all workshops and their list', async () => {
    const rows = await asRole(db, 'owner', theirs.workshop_id, (sql) =>
      all(async (table) => {
        const [row] = await sql(`SELECT count(*)::text AS rows FROM ${table} WHERE workshop_id = $1`, [
          ours.workshop_id,
        ]);
        return `${table}: ${String(row?.['rows'])}`;
      }),
    );
    expect(rows.filter((row) => !row.endsWith(': 0'))).toEqual(['background_job: 1', 'workshop: 1']);
  });

  it('takes no row for another workshop', async () => {
    const copy = (table: string) =>
      asRole(db, 'app', theirs.workshop_id, async (sql) => {
        const columns = await sql(
          `SELECT string_agg(CASE WHEN column_name = 'workshop_id' THEN quote_literal($1::text) || '::uuid' ELSE quote_ident(column_name) END, ', ' ORDER BY ordinal_position) AS list
            FROM information_schema.columns WHERE table_schema = 'public' AND table_name = $2`,
          [ours.workshop_id, table],
        );
        await sql(`INSERT INTO ${table} SELECT ${String(columns[0]?.['list'])} FROM ${table} LIMIT 1`);
      });
    // 42501 is both "no right to insert" and "new row violates row-level security policy".
    const states = await all(async (table) => `${table}: ${await refusal(copy(table))}`);
    expect(states).toEqual(tables.map((table) => `${table}: 42501`));
  });

  it('lets no row of another workshop be changed or removed', async () => {
    const changed = async (table: string, sql: string) => {
      const before = await seen(table, ours.workshop_id, ours.workshop_id);
      const state = await refusal(
        asRole(db, 'app', theirs.workshop_id, (run) => run(sql, [ours.workshop_id])),
      );
      const after = await seen(table, ours.workshop_id, ours.workshop_id);
      return { state, kept: before === after };
    };
    for (const table of tables) {
      const update = await changed(
        table,
        `UPDATE ${table} SET workshop_id = current_workshop() WHERE workshop_id = $1`,
      );
      expect([table, update]).toEqual([table, { state: '42501', kept: true }]);
      const remove = await changed(table, `DELETE FROM ${table} WHERE workshop_id = $1`);
      expect([table, remove.kept]).toEqual([table, true]);
    }
  });
});

describe('the book’s tables', () => {
  it.each(BOOK)(
    '%s: the program’s role may read, and neither insert, update, delete nor truncate',
    async (table) => {
      const right = (what: string) =>
        `has_table_privilege('${table}', '${what}') OR has_any_column_privilege('${table}', '${what}')`;
      const [rights] = await db.query(
        'app',
        `SELECT ${right('SELECT')} AS reads, ${right('INSERT')} AS inserts, ${right('UPDATE')} AS updates,
        has_table_privilege('${table}', 'DELETE') AS deletes, has_table_privilege('${table}', 'TRUNCATE') AS truncates`,
      );
      expect(rights).toEqual({
        reads: true,
        inserts: false,
        updates: false,
        deletes: false,
        truncates: false,
      });
    },
  );
});

describe('a posting', () => {
  it('can’t name another workshop’s account, lot or person', async () => {
    const entries = (account: string, lot: string) => [
      { account: theirs.safe, lot: theirs.lot, mass: { gross: -1n } },
      { account, lot, mass: { gross: 1n } },
    ];
    const states = [
      await refusal(theirs.post([theirs.voucher('transfer', entries(ours.safe, theirs.lot))])),
      await refusal(theirs.post([theirs.voucher('transfer', entries(theirs.bench, ours.lot))])),
      await refusal(theirs.post([{ ...theirs.act('test_recorded', {}), recorded_by: ours.keeper }])),
      await refusal(theirs.post([{ ...theirs.act('test_recorded', {}), approved_by: ours.keeper }])),
    ];
    for (const state of states) expect(state).toMatch(/^(23503|23502)/);
  });

  it('can’t change another workshop by an act that names its rows', async () => {
    const lot = () => ours.as('app', (sql) => sql('SELECT standing FROM lot WHERE id = $1', [ours.lot]));
    const before = await lot();
    await theirs.post([
      theirs.act('lot_held', { lot_id: ours.lot, reason: 'spite', until: null }),
      theirs.act('account_renamed', { account_id: ours.safe, name: 'Mine' }),
    ]);
    expect(await lot()).toEqual(before);
    const [safe] = await ours.as('app', (sql) => sql('SELECT name FROM account WHERE id = $1', [ours.safe]));
    expect(safe).toEqual({ name: 'Safe' });
  });

  it('leaves no workshop behind for the next on the same connection', async () => {
    const rows = await db.query(
      'app',
      `DO $$ BEGIN PERFORM set_config('grainward.workshop', '${ours.workshop_id}', true); END $$;`,
    );
    expect(rows).toEqual([]);
    const set = await asRole(db, 'app', ours.workshop_id, async (sql) => {
      await sql('COMMIT');
      return sql('SELECT current_workshop() AS workshop');
    });
    expect(set).toEqual([{ workshop: null }]);
  });
});

describe('the schema', () => {
  it('every foreign key between walled tables carries the workshop', async () => {
    const loose = await db.query(
      'owner',
      `SELECT k.conrelid::regclass::text || ' ' || k.conname AS key FROM pg_constraint k
        WHERE k.contype = 'f' AND k.conrelid::regclass::text = ANY ($1) AND k.confrelid::regclass::text = ANY ($1)
          AND NOT EXISTS (SELECT 1 FROM pg_attribute a WHERE a.attrelid = k.conrelid AND a.attnum = ANY (k.conkey) AND a.attname = 'workshop_id')`,
      [tables],
    );
    expect(loose).toEqual([]);
  });

  it('every unique key of a walled table carries the workshop, but for the hash of an invitation’s link', async () => {
    const loose = await db.query(
      'owner',
      `SELECT i.indexrelid::regclass::text AS key FROM pg_index i
        WHERE i.indisunique AND i.indrelid::regclass::text = ANY ($1)
          AND NOT EXISTS (SELECT 1 FROM pg_attribute a WHERE a.attrelid = i.indrelid AND a.attnum = ANY (i.indkey) AND a.attname = 'workshop_id')`,
      [tables],
    );
    expect(loose).toEqual([{ key: 'invitation_token_hash_key' }]);
  });

  it('every view runs with its reader’s rights', async () => {
    const views = await db.query(
      'owner',
      `SELECT relname FROM pg_class WHERE relkind IN ('v', 'm') AND relnamespace = 'public'::regnamespace
        AND NOT coalesce(array_to_string(reloptions, ',') LIKE '%security_invoker=true%', false)`,
    );
    expect(views).toEqual([]);
  });

  it('an unknown workshop set by hand shows nothing', async () => {
    const rows = await all((table) => seen(table, ours.workshop_id, randomUUID()));
    expect(rows).toEqual(none());
  });
});
