/** Half a year of the demo workshop, with every kind of event it plays, holds in every check of a dossier (FAULTS E-05). */
import { afterAll, beforeAll, expect, it } from 'vitest';
import { playWorkshop } from '../../seed/workshop.ts';
import { connect } from '../../server/db/database.ts';
import type { Database } from '../../server/db/database.ts';
import { readSnapshot } from '../../server/services/dossier/snapshot.ts';
import type { ChainRecord } from '../../shared/chain/record-line.ts';
import { readLine } from '../../shared/chain/record-line.ts';
import { dossierOf } from '../support/dossier-book.ts';
import { failures, linesOf } from '../support/dossier-files.ts';
import { recompute } from '../support/recompute.ts';
import type { TestServer } from '../support/server.ts';
import { startTestServer } from '../support/server.ts';

let server: TestServer;
let owner: Database;
let lines: readonly string[];
let records: readonly ChainRecord[];

beforeAll(async () => {
  server = await startTestServer();
  owner = connect(server.db.owner_url, 4);
  const workshop_id = await playWorkshop({ db: owner, config: server.config }, '2026-11-30');
  const snapshot = await readSnapshot(server.context.db, workshop_id);
  lines = snapshot.lines.map(({ line }) => line);
  records = lines.flatMap((line) => readLine(line) ?? []);
}, 300_000);
afterAll(async () => {
  await owner.close();
  await server.close();
});

it('stands in canonical lines, with many kinds of records', () => {
  expect(records).toHaveLength(lines.length);
  expect(linesOf(dossierOf(records))).toEqual(lines);
  expect(new Set(records.map(({ kind }) => kind)).size).toBeGreaterThan(20);
});

it('holds in every check', async () => {
  expect(await failures(dossierOf(records))).toEqual({});
});

it('is recomputed from the format’s description alone, and sums to nothing', () => {
  const found = recompute(dossierOf(records).get('book.jsonl') ?? new Uint8Array());
  expect([found.broken_at, found.unbalanced, found.records]).toEqual([null, [], lines.length]);
});
