/** F-30: two tabs share their cookies; what a page was opened as decides, so nothing is written to the wrong workshop. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { sessionJson } from '../../shared/schemas/identity.ts';
import { PASSWORD, addMember, secretInMail, signUp, startTestServer } from '../support/server.ts';
import type { Person, TestServer } from '../support/server.ts';

let server: TestServer;
let browser: Person;
let first: { workshop_id: string; person_id: string };
let second: { workshop_id: string; person_id: string };

async function here(): Promise<{ workshop_id: string; person_id: string }> {
  const session = sessionJson.parse((await browser.get('/session')).body);
  return { workshop_id: session.workshop.id, person_id: session.person.id };
}

beforeAll(async () => {
  server = await startTestServer();
  const one = await signUp(server, 'First bench');
  const two = await signUp(server, 'Second bench');
  browser = await addMember(server, one, 'keeper', 'Bo Tarn');
  first = await here();
  await two.post('/invitations', { email: browser.email, name: 'Bo Tarn', role: 'keeper' });
  const token = await secretInMail(server, browser.email, /Second bench/);
  browser.keep((await browser.post('/invitations/accept', { token, password: PASSWORD })).headers);
  second = await here();
});
afterAll(() => server.close());

const enter = (name: string, opened_as: string) =>
  browser.event('set-party', { kind: 'supplier', name }).set('X-Grainward-Person', opened_as);

describe('a page that was opened in one workshop', () => {
  it('writes and reads nothing once another tab has gone into a second one', async () => {
    expect(second.workshop_id).not.toBe(first.workshop_id);
    const late = await enter('Meant for the first', first.person_id);
    expect([late.status, late.body]).toMatchObject([409, { type: '/problems/other_person' }]);
    const read = await browser.get('/parties').set('X-Grainward-Person', first.person_id);
    expect(read.status).toBe(409);
    expect((await browser.get('/parties')).body).toEqual({ rows: [] });
  });

  it('goes on once it is opened again', async () => {
    expect((await enter('Meant for the second', second.person_id)).status).toBe(201);
    await browser.post('/session/workshop', { workshop_id: first.workshop_id });
    expect((await enter('Meant for the first', first.person_id)).status).toBe(201);
    expect((await browser.get('/parties')).text).not.toContain('second');
  });
});
