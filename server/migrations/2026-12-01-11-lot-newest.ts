/** The list of lots goes by the running number in their codes, newest first, a page at a time. */
import type { Migration } from './migration.ts';

export const lotNewest: Migration = {
  name: '2026-12-01-11-lot-newest',
  up: `CREATE INDEX lot_newest ON lot (workshop_id, (split_part(code, '-', 2)::bigint) DESC)`,
  down: 'DROP INDEX lot_newest',
};
