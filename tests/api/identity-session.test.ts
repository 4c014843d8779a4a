/** Sessions: how they begin, renew and end, in every process at once (FAULTS S-03, S-06, S-07, S-08, F-28, F-43). */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createApp } from '../../server/app.ts';
import { startContext } from '../../server/start-context.ts';
import type { Started } from '../../server/start-context.ts';
import { sessionJson } from '../../shared/schemas/identity.ts';
import {
  PASSWORD,
  Person,
  addMember,
  secretInMail,
  signIn,
  signUp,
  startTestServer,
} from '../support/server.ts';
import type { TestServer } from '../support/server.ts';

let server: TestServer;
let owner: Person;

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server);
});
afterAll(() => server.close());

const age = (column: 'rotated_at' | 'made_at', by: string) =>
  server.db.query(
    'owner',
    `UPDATE session SET ${column} = ${column} - interval '${by}' WHERE ended_at IS NULL`,
  );

describe('a session', () => {
  it('tells who is signed in, where, and what the role may do', async () => {
    const session = sessionJson.parse((await owner.get('/session')).body);
    expect(session.person).toMatchObject({ name: 'Ada Quill', role: 'proprietor', has_pin: false });
    expect(session.workshop).toMatchObject({ name: 'Hallow Lane', currency: 'EUR' });
    expect(session.may).toContain('people.invite');
    expect(session.book.balanced).toBe(true);
  });

  it('has new tokens at every sign-in, and the old ones go on only in their own session', async () => {
    const one = await signIn(server, owner.email);
    const two = await signIn(server, owner.email);
    expect(one.cookie('grainward')).not.toBe(two.cookie('grainward'));
    expect(one.cookie('grainward-refresh')).not.toBe(two.cookie('grainward-refresh'));
    await one.send('delete', '/session');
    expect((await one.get('/session')).status).toBe(401);
    expect((await two.get('/session')).status).toBe(200);
  });

  it('ends at sign-out in another process too, though the token has not run out', async () => {
    const other: Started = await startContext(server.config, () => 'http://127.0.0.1');
    const here = await signIn(server, owner.email);
    const there = here.copy(createApp(other.context));
    expect((await there.get('/session')).status).toBe(200);
    await here.send('delete', '/session');
    expect((await there.get('/session')).status).toBe(401);
    expect((await there.post('/session/refresh')).status).toBe(401);
    await other.close();
  });

  it('is ended by the refresh token alone, where the access token has run out', async () => {
    const person = await signIn(server, owner.email);
    const stale = person.copy();
    stale.carry([`grainward-refresh=${person.cookie('grainward-refresh')}`]);
    expect((await stale.send('delete', '/session')).status).toBe(204);
    expect((await person.get('/session')).status).toBe(401);
  });

  it('is renewed by a refresh token that works once; two tabs at once both go on', async () => {
    const person = await signIn(server, owner.email);
    const tab = person.copy();
    const first = await person.post('/session/refresh');
    expect(first.status).toBe(204);
    person.keep(first.headers);
    expect(person.cookie('grainward-refresh')).not.toBe(tab.cookie('grainward-refresh'));
    expect((await tab.post('/session/refresh')).status).toBe(204);
    expect((await person.get('/session')).status).toBe(200);
  });

  it('ends for thief and owner alike when an old refresh token is used again', async () => {
    const person = await signIn(server, owner.email);
    const thief = person.copy();
    person.keep((await person.post('/session/refresh')).headers);
    await age('rotated_at', '1 minute');
    expect((await thief.post('/session/refresh')).status).toBe(401);
    expect((await person.get('/session')).status).toBe(401);
    expect((await person.post('/session/refresh')).status).toBe(401);
  });

  it('ends after eight idle hours', async () => {
    const person = await signIn(server, owner.email);
    await age('rotated_at', '7 hours 59 minutes');
    expect((await person.get('/session')).status).toBe(200);
    await age('rotated_at', '2 minutes');
    expect((await person.get('/session')).status).toBe(401);
    expect((await person.post('/session/refresh')).status).toBe(401);
  });

  it('ends after seven days, however busy', async () => {
    const person = await signIn(server, owner.email);
    await age('made_at', '6 days 23 hours');
    expect((await person.post('/session/refresh')).status).toBe(204);
    await age('made_at', '2 hours');
    expect((await person.get('/session')).status).toBe(401);
  });
});

describe('somebody with roles in two workshops', () => {
  it('goes from one to the other, and only into those', async () => {
    const first = await signUp(server, 'First bench');
    const second = await signUp(server, 'Second bench');
    const mine = sessionJson.parse((await first.get('/session')).body).workshop.id;
    const other = sessionJson.parse((await second.get('/session')).body).workshop.id;
    const stray = await first.post('/session/workshop', { workshop_id: other });
    expect(stray.status).toBe(404);

    const invited = await addMember(server, second, 'auditor', 'Bo Tarn');
    await first.post('/invitations', { email: invited.email, name: 'Bo Tarn', role: 'keeper' });
    expect((await invited.post('/session/workshop', { workshop_id: mine })).status).toBe(404);
    const token = await secretInMail(server, invited.email, /First bench/);
    const joined = await invited.post('/invitations/accept', { token, password: PASSWORD });
    expect(joined.status).toBe(204);
    invited.keep(joined.headers);
    const session = sessionJson.parse((await invited.get('/session')).body);
    expect(session.workshops.map(({ name, role }) => `${name}: ${role}`)).toEqual([
      'First bench: keeper',
      'Second bench: auditor',
    ]);
    expect((await invited.post('/session/workshop', { workshop_id: other })).status).toBe(204);
    expect(sessionJson.parse((await invited.get('/session')).body).person.role).toBe('auditor');
  });
});

describe('the cookies of a session', () => {
  it('carry the __Host- name, Secure, HttpOnly, SameSite and Path=/ where the address is https (S-06)', async () => {
    const secure = await startTestServer({ public_url: 'https://book.example.test' });
    const person = new Person(secure.app);
    const made = await person.post('/workshops', {
      workshop_name: 'Hallow Lane',
      time_zone: 'Europe/Paris',
      currency: 'EUR',
      name: 'Ada Quill',
      email: 'ada@example.test',
      password: PASSWORD,
    });
    const cookies = [made.headers['set-cookie'] ?? []].flat().map(String);
    expect(cookies).toHaveLength(2);
    for (const cookie of cookies) {
      expect(cookie).toMatch(/^__Host-grainward(-refresh)?=/);
      expect(cookie).toMatch(/; Path=\/;/);
      expect(cookie).toMatch(/; HttpOnly; Secure; SameSite=Strict$/);
      expect(cookie).not.toMatch(/Domain/i);
    }
    await secure.close();
  });
});
