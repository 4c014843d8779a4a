/**
 * `npm run check-book`: checks the book of every workshop, as the owner of the tables (DATABASE_OWNER_URL). Prints a
 * line for each and one for every fault; ends with 1 where there is any.
 */
import { z } from '../../shared/schemas/zod.ts';
import { connect } from '../db/database.ts';
import { checkBook } from '../services/book/check-book.ts';

const owner_url = process.env['DATABASE_OWNER_URL'];
if (owner_url === undefined || owner_url === '') {
  console.error('DATABASE_OWNER_URL is not set. Name the database and the role that owns its tables.');
  process.exit(2);
}
const db = connect(owner_url, 2);
try {
  const workshops = await db.once(
    z.object({ workshop_id: z.string(), name: z.string() }),
    'SELECT workshop_id::text, name FROM workshop ORDER BY name',
  );
  for (const { workshop_id, name } of workshops) {
    const check = await db.inScope({ workshop_id, user_id: null }, checkBook);
    const counts = `${check.records} records, ${check.entries} entries, ${check.balances} balances`;
    console.log(`${check.sound ? 'sound' : 'FAULTY'}  ${name}: ${counts}, head ${check.hash}`);
    for (const fault of check.faults) console.log(`        ${fault.sentence}`);
    if (!check.sound) process.exitCode = 1;
  }
} finally {
  await db.close();
}
