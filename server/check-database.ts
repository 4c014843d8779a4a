/**
 * What must hold of the database before the program serves from it: the schema it is written for, and a role that
 * can't switch the rules off. Where one of these does not hold, the start is refused.
 */
import { z } from '../shared/schemas/zod.ts';
import type { Database } from './db/database.ts';
import { migrations } from './migrations/index.ts';

const role = z.object({ privileged: z.boolean(), owns: z.coerce.number() });

/** The reasons why this program must not serve from this database; none is good. Throws while it can't be reached. */
export async function reasonsAgainst(db: Database): Promise<string[]> {
  const [who] = await db.once(
    role,
    `SELECT r.rolsuper OR r.rolbypassrls AS privileged,
        (SELECT count(*)::text FROM pg_class c JOIN pg_namespace n ON n.oid = c.relnamespace
          WHERE n.nspname = 'public' AND pg_has_role(current_user, c.relowner, 'USAGE')) AS owns
      FROM pg_roles r WHERE r.rolname = current_user`,
  );
  const reasons: string[] = [];
  if (who?.privileged !== false)
    reasons.push('The role that the program runs as is a superuser or passes over row-level security.');
  if (who === undefined || who.owns > 0)
    reasons.push('The role that the program runs as owns tables. Run it as grainward_app.');
  const [schema] = await db.once(
    z.object({ there: z.boolean() }),
    "SELECT to_regclass('public.schema_migration') IS NOT NULL AS there",
  );
  if (schema?.there !== true)
    return [...reasons, 'The database has no schema yet. Run the migrations first.'];
  const done = await db.once(z.object({ name: z.string() }), 'SELECT name FROM schema_migration');
  const known = new Set(migrations.map(({ name }) => name));
  const there = new Set(done.map(({ name }) => name));
  if (migrations.some(({ name }) => !there.has(name)))
    reasons.push('The database is older than the program. Run the migrations first.');
  if (done.some(({ name }) => !known.has(name)))
    reasons.push('The database is newer than the program. Start the newer program.');
  const open = await db.once(
    z.object({ table: z.string() }),
    `SELECT c.relname AS table FROM pg_class c JOIN pg_namespace n ON n.oid = c.relnamespace
      JOIN pg_attribute a ON a.attrelid = c.oid AND a.attname = 'workshop_id' AND NOT a.attisdropped
      WHERE n.nspname = 'public' AND c.relkind = 'r' AND c.relname <> 'session' AND NOT (c.relrowsecurity AND c.relforcerowsecurity)`,
  );
  return [...reasons, ...open.map(({ table }) => `The table ${table} has no wall between workshops.`)];
}
