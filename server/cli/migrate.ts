/** `tsx server/cli/migrate.ts`: brings the database named by DATABASE_OWNER_URL up to date. */
import { migrate } from '../db/migrate.ts';

const owner_url = process.env['DATABASE_OWNER_URL'];
if (owner_url === undefined || owner_url === '') {
  console.error('DATABASE_OWNER_URL is not set. Name the database and the role that owns its tables.');
  process.exit(2);
}
await migrate(owner_url);
