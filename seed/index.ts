/**
 * `tsx seed/index.ts`: makes the demo workshop where the database has no account yet, as the owner of the tables, and
 * writes down its sign-ins. Does nothing to a database that somebody uses.
 */
import { mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { readConfig } from '../server/config.ts';
import { connect } from '../server/db/database.ts';
import { z } from '../shared/schemas/zod.ts';
import { CAST, WORKSHOP } from './cast.ts';
import { playWorkshop } from './workshop.ts';

/** There while the workshop is being made: a start that finds it begins again (`server/start/start.mjs`). */
const UNFINISHED = '.grainward/demo-unfinished';

const config = readConfig(process.env);
const owner_url = process.env['DATABASE_OWNER_URL'];
if (owner_url === undefined) throw new Error('DATABASE_OWNER_URL is not set.');
const db = connect(owner_url, 4);
try {
  const [accounts] = await db.once(
    z.object({ there: z.boolean() }),
    'SELECT EXISTS (SELECT 1 FROM user_account) AS there',
  );
  if (accounts?.there === true) {
    console.log('  The book is in use; the demo workshop is left as it is.');
  } else {
    const today = new Date().toLocaleDateString('en-CA', { timeZone: WORKSHOP.time_zone });
    mkdirSync('.grainward', { recursive: true });
    writeFileSync(UNFINISHED, '');
    console.log('  Making the demo workshop, six months of work:');
    await playWorkshop({ db, config }, today, (month) => console.log(`  ${month} …`));
    rmSync(UNFINISHED);
    const signIns = CAST.map(({ role, name, email, password }) => ({ role, name, email, password }));
    writeFileSync('.grainward/demo-sign-ins.json', JSON.stringify(signIns, null, 2), { mode: 0o600 });
    console.log(`  ${WORKSHOP.name} is ready.`);
  }
} finally {
  await db.close();
}
