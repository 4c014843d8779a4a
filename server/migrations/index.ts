/** Every migration, in the order in which they run. A new one goes to the end. */
import type { Migration } from './migration.ts';
import { workshopsAndPersons } from './2026-12-01-01-workshops-and-persons.ts';
import { bookTables } from './2026-12-01-02-book-tables.ts';
import { masterData } from './2026-12-01-03-master-data.ts';
import { projectAct } from './2026-12-01-04-project-act.ts';
import { postRecords } from './2026-12-01-05-post-records.ts';
import { identity } from './2026-12-01-06-identity.ts';
import { requestsAndQueue } from './2026-12-01-07-requests-and-queue.ts';
import { readFacts } from './2026-12-01-08-read-facts.ts';
import { balancesAtADay } from './2026-12-01-09-balances-at-a-day.ts';
import { secondFactor } from './2026-12-01-10-second-factor.ts';
import { lotNewest } from './2026-12-01-11-lot-newest.ts';

export const migrations: readonly Migration[] = [
  workshopsAndPersons,
  bookTables,
  masterData,
  projectAct,
  postRecords,
  identity,
  requestsAndQueue,
  readFacts,
  balancesAtADay,
  secondFactor,
  lotNewest,
];
