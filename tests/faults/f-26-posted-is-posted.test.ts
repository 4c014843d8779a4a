/** F-26, S-12: what is posted is neither edited nor deleted, over HTTP or with SQL in the server's own role. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Person, TestServer } from '../support/server.ts';
import { signUp, startTestServer } from '../support/server.ts';

let server: TestServer;
let owner: Person;

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server);
});
afterAll(() => server.close());

describe('a posted record', () => {
  it.each(['put', 'patch', 'delete'] as const)('is not there to be changed by %s', async (method) => {
    for (const path of ['/vouchers/1', '/lots/1', '/accounts', '/events/opening', '/vouchers'])
      expect([404, 405]).toContain((await owner.send(method, path, { gross_g: '1' })).status);
  });

  it.each(['record', 'entry', 'account', 'lot', 'holding', 'job_holding', 'workshop_head'])(
    'of table %s can’t be updated, deleted or truncated by the program’s role',
    async (table) => {
      const state = async (sql: string) =>
        server.db.query('app', sql).then(
          () => 'done',
          (error: unknown) => (error instanceof Error && 'code' in error ? error.code : 'none'),
        );
      // 42501: insufficient privilege (PostgreSQL, appendix A).
      expect(await state(`DELETE FROM ${table}`)).toBe('42501');
      expect(await state(`TRUNCATE ${table} CASCADE`)).toBe('42501');
      expect(await state(`UPDATE ${table} SET workshop_id = workshop_id`)).toBe('42501');
    },
  );
});
