/**
 * A database of its own for each test file: a copy of one migrated template, made in a few dozen milliseconds. Run by
 * `npm test`, or alone with TEST_DATABASE_URL and TEST_DATABASE_APP_URL pointing at any throw-away cluster.
 */
import { createHash, randomUUID } from 'node:crypto';
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import pg from 'pg';
import { migrate } from '../../server/db/migrate.ts';

const TEMPLATE_LOCK = 4_180_002;

export interface TestDatabase {
  readonly owner_url: string;
  readonly app_url: string;
  /** Plain SQL as a role, for tests that attack the rules. */
  query(role: 'owner' | 'app', sql: string, bind?: readonly unknown[]): Promise<Record<string, unknown>[]>;
  drop(): Promise<void>;
}

function clusterUrl(name: 'TEST_DATABASE_URL' | 'TEST_DATABASE_APP_URL'): URL {
  const url = process.env[name];
  if (url === undefined) throw new Error(`${name} is not set. Run the tests with: npm test`);
  return new URL(url);
}

function at(cluster: URL, database: string): string {
  const url = new URL(cluster);
  url.pathname = `/${database}`;
  return url.href;
}

/** Makes a migrated, empty database. */
export async function createTestDatabase(): Promise<TestDatabase> {
  const cluster = clusterUrl('TEST_DATABASE_URL');
  const name = `test_${randomUUID().replaceAll('-', '')}`;
  const admin = new pg.Client({ connectionString: cluster.href });
  await admin.connect();
  const template = templateName();
  await admin.query('SELECT pg_advisory_lock($1)', [TEMPLATE_LOCK]);
  const there = await admin.query('SELECT 1 FROM pg_database WHERE datname = $1', [template]);
  if (there.rowCount === 0) {
    await admin.query(`CREATE DATABASE "${template}_new"`);
    await migrate(at(cluster, `${template}_new`));
    await admin.query(`ALTER DATABASE "${template}_new" RENAME TO "${template}"`);
  }
  await admin.query(`CREATE DATABASE "${name}" TEMPLATE "${template}"`);
  await admin.query('SELECT pg_advisory_unlock($1)', [TEMPLATE_LOCK]);
  await admin.end();
  const owner_url = at(cluster, name);
  const app_url = at(clusterUrl('TEST_DATABASE_APP_URL'), name);
  return {
    owner_url,
    app_url,
    async query(role, sql, bind = []) {
      const client = new pg.Client({ connectionString: role === 'owner' ? owner_url : app_url });
      await client.connect();
      try {
        return (await client.query<Record<string, unknown>>(sql, [...bind])).rows;
      } finally {
        await client.end();
      }
    },
    async drop() {
      const last = new pg.Client({ connectionString: cluster.href });
      await last.connect();
      await drop(last, name);
      await last.end();
    },
  };
}

/** A connection that was closed a moment ago may still be leaving, and of the program's role the owner may not end it. */
async function drop(admin: pg.Client, name: string, tries = 50): Promise<void> {
  try {
    await admin.query(`DROP DATABASE IF EXISTS "${name}" WITH (FORCE)`);
  } catch (error) {
    if (tries === 0) throw error;
    await new Promise((resolve) => setTimeout(resolve, 100));
    await drop(admin, name, tries - 1);
  }
}

/** The template carries the state of the migrations in its name, so that an old one is never copied. */
function templateName(): string {
  const dir = join(import.meta.dirname, '../../server/migrations');
  const hash = createHash('sha256');
  for (const file of readdirSync(dir).sort()) hash.update(readFileSync(join(dir, file)));
  return `template_${hash.digest('hex').slice(0, 16)}`;
}
