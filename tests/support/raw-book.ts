/**
 * A workshop that is in the database alone, posted to with SQL: for tests that attack the rules of the book without
 * the program between. Nothing here checks anything; the database has to.
 */
import { randomUUID } from 'node:crypto';
import pg from 'pg';
import type { Detail } from '../../shared/book/draft.ts';
import { recordLineParts } from '../../shared/chain/record-line.ts';
import type { UnchainedRecord } from '../../shared/chain/record-line.ts';
import { massToJson, massVector } from '../../shared/mass/vector.ts';
import type { MassVector } from '../../shared/mass/vector.ts';
import type { TestDatabase } from './database.ts';

export type Sql = (sql: string, bind?: readonly unknown[]) => Promise<Record<string, unknown>[]>;

/** One transaction as a role, inside a workshop's wall (none where null). */
export async function asRole<T>(
  db: TestDatabase,
  role: 'owner' | 'app',
  workshop_id: string | null,
  work: (sql: Sql) => Promise<T>,
): Promise<T> {
  const client = new pg.Client({ connectionString: role === 'owner' ? db.owner_url : db.app_url });
  await client.connect();
  try {
    await client.query('BEGIN');
    await client.query("SELECT set_config('grainward.workshop', $1, true)", [workshop_id ?? '']);
    const done = await work(
      async (sql, bind = []) => (await client.query<Record<string, unknown>>(sql, [...bind])).rows,
    );
    await client.query('COMMIT');
    return done;
  } finally {
    await client.end();
  }
}

/** The state that PostgreSQL refused with (and the constraint, where it names one), or "nothing refused". */
export async function refusal(work: Promise<unknown>): Promise<string> {
  try {
    await work;
    return 'nothing refused';
  } catch (error) {
    if (!(error instanceof pg.DatabaseError)) throw error;
    return [error.code, error.constraint].filter((part) => part !== undefined).join(' ');
  }
}

export interface RawEntry {
  readonly account: string;
  readonly lot: string;
  readonly mass: Partial<MassVector>;
  readonly pieces?: bigint;
}

type Parts = { head: string; middle: string };

export class RawBook {
  readonly db: TestDatabase;
  readonly workshop_id = randomUUID();
  readonly keeper = randomUUID();
  readonly safe = randomUUID();
  readonly bench = randomUUID();
  readonly supplier = randomUUID();
  readonly loss = randomUUID();
  readonly lot = randomUUID();

  private constructor(db: TestDatabase) {
    this.db = db;
  }

  /** A workshop with a keeper, a safe, a bench, a supplier, one operation and one lot of 750 gold, of which nothing is held. */
  static async open(db: TestDatabase): Promise<RawBook> {
    const book = new RawBook(db);
    await asRole(db, 'app', book.workshop_id, (sql) =>
      sql("SELECT open_workshop('Raw & Sons', 'Europe/Paris', 'EUR')"),
    );
    const account = (account_id: string, kind: string, name: string, operation: string | null = null) =>
      book.act('account_opened', { account_id, kind, name, operation, custodian_id: null, party_id: null });
    await book.post([
      book.act('role_given', { person_id: book.keeper, name: 'Mara Quist', role: 'keeper', until: null }),
      account(book.safe, 'safe', 'Safe'),
      account(book.bench, 'bench', 'Bench 1'),
      account(book.supplier, 'supplier', 'Aurel Metals'),
      account(book.loss, 'working_loss', 'Loss, filing', 'filing'),
      book.lotDescribed(book.lot, 'G26-0001-X'),
    ]);
    return book;
  }

  act(kind: string, detail: Detail, business_date = '2026-04-01'): UnchainedRecord {
    return this.record(kind, { detail, business_date });
  }

  lotDescribed(lot_id: string, code: string, parents: readonly string[] = []): UnchainedRecord {
    return this.act('lot_described', {
      lot_id,
      code,
      form: 'sheet',
      alloy: '750 yellow',
      owner_id: null,
      origin: 'recycled',
      gold_permille: '750',
      silver_permille: '0',
      platinum_permille: '0',
      palladium_permille: '0',
      basis: 'certificate',
      standing: 'released',
      parents: parents.map((parent) => ({ lot_id: parent })),
    });
  }

  voucher(kind: string, entries: readonly RawEntry[], more: Partial<UnchainedRecord> = {}): UnchainedRecord {
    const written = entries.map(({ account, lot, mass, pieces }, index) => ({
      account_id: account,
      lot_id: lot,
      line: String(index + 1),
      pieces: pieces?.toString() ?? null,
      ...massToJson(massVector(mass)),
    }));
    return this.record(kind, { entries: written, ...more });
  }

  /** A mass of the lot from one account to another. */
  move(from: string, to: string, mass: Partial<MassVector>, business_date = '2026-04-01'): UnchainedRecord {
    const whole = massVector(mass);
    const taken = {
      gross: -whole.gross,
      gold: -whole.gold,
      silver: -whole.silver,
      platinum: -whole.platinum,
      palladium: -whole.palladium,
    };
    const entries = [
      { account: from, lot: this.lot, mass: taken },
      { account: to, lot: this.lot, mass: whole },
    ];
    return this.voucher('transfer', entries, { business_date });
  }

  /** Posts records as the program's role does; gives what `post_records` answers. */
  post(records: readonly UnchainedRecord[], role: 'owner' | 'app' = 'app'): Promise<unknown> {
    return this.postParts(
      records.map((record) => recordLineParts(record)),
      role,
    );
  }

  /** Posts lines in parts, as they are. */
  postParts(parts: readonly Parts[], role: 'owner' | 'app' = 'app'): Promise<unknown> {
    return this.as(role, (sql) => sql('SELECT post_records($1::jsonb) AS posted', [JSON.stringify(parts)]));
  }

  as<T>(role: 'owner' | 'app', work: (sql: Sql) => Promise<T>): Promise<T> {
    return asRole(this.db, role, this.workshop_id, work);
  }

  private record(kind: string, more: Partial<UnchainedRecord>): UnchainedRecord {
    return {
      approved_by: null,
      business_date: '2026-04-01',
      detail: {},
      documents: [],
      entries: [],
      id: randomUUID(),
      kind,
      note: null,
      recorded_by: this.keeper,
      reverses: null,
      ...more,
    };
  }
}
