/**
 * `tsx server/cli/prepare-database.ts FILE`: makes the two roles and the database on a PostgreSQL server of which only
 * DATABASE_URL is known, and remembers their addresses in FILE. Does nothing where FILE is already there.
 */
import { randomBytes } from 'node:crypto';
import { existsSync, writeFileSync } from 'node:fs';
import pg from 'pg';

const SERVERS_OWN = new Set(['', 'postgres']);

const [file] = process.argv.slice(2);
const given = process.env['DATABASE_URL'];
if (file === undefined || given === undefined)
  throw new Error('Name the file to write, and set DATABASE_URL.');
if (!existsSync(file)) await prepare(new URL(given), file);

async function prepare(address: URL, to: string): Promise<void> {
  const wanted = decodeURIComponent(address.pathname.slice(1));
  const name = SERVERS_OWN.has(wanted) ? 'grainward' : wanted;
  const admin = new pg.Client({ connectionString: at(address, 'postgres') });
  await admin.connect();
  const { rows } = await admin.query<{ able: boolean; taken: boolean; there: boolean }>(
    `SELECT rolsuper OR (rolcreaterole AND rolcreatedb) AS able,
        EXISTS (SELECT 1 FROM pg_roles WHERE rolname IN ('grainward_owner', 'grainward_app')) AS taken,
        EXISTS (SELECT 1 FROM pg_database WHERE datname = $1) AS there
      FROM pg_roles WHERE rolname = current_user`,
    [name],
  );
  if (rows[0]?.able !== true) refuse('The role of DATABASE_URL can’t make roles and databases.');
  if (rows[0].taken) refuse('The server has roles called grainward_owner or grainward_app already.');
  const owner = randomBytes(24).toString('hex');
  const app = randomBytes(24).toString('hex');
  await admin.query(`CREATE ROLE grainward_owner LOGIN CREATEDB NOSUPERUSER NOBYPASSRLS PASSWORD '${owner}'`);
  await admin.query(`CREATE ROLE grainward_app LOGIN NOSUPERUSER NOBYPASSRLS PASSWORD '${app}'`);
  await admin.query('GRANT grainward_owner TO CURRENT_USER');
  const database = pg.escapeIdentifier(name);
  if (!rows[0].there) await admin.query(`CREATE DATABASE ${database} OWNER grainward_owner`);
  else await admin.query(`ALTER DATABASE ${database} OWNER TO grainward_owner`);
  await admin.end();
  const roles = {
    owner: at(address, name, 'grainward_owner', owner),
    app: at(address, name, 'grainward_app', app),
  };
  writeFileSync(to, JSON.stringify(roles), { mode: 0o600 });
}

function at(address: URL, database: string, role = address.username, password = address.password): string {
  const url = new URL(address);
  url.pathname = `/${database}`;
  url.username = role;
  url.password = password;
  return url.href;
}

function refuse(what: string): never {
  console.error(
    `${what} Set DATABASE_URL (the role that the program runs as, grainward_app, which owns nothing) and DATABASE_OWNER_URL (the owner of the tables).`,
  );
  process.exit(2);
}
