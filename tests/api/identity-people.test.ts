/** Passwords, links by e-mail, invitations, roles and PINs (FAULTS S-01, S-02, S-04, S-08). */
import { randomBytes } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { invitationInfo, sessionJson } from '../../shared/schemas/identity.ts';
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
import { httpWorkshop } from '../support/workshop-http.ts';

let server: TestServer;
let owner: Person;

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server, 'Ferrow and Lisle');
});
afterAll(() => server.close());

const problem = z.object({
  errors: z.array(z.object({ field: z.string().nullable(), sentence: z.string() })),
});

/** Tries to set a password; gives null where it is taken, else the sentence beside the field. */
async function refusal(password: string): Promise<string | null> {
  const body = {
    workshop_name: 'Oriel Works',
    time_zone: 'Europe/Paris',
    currency: 'EUR',
    name: 'Perpetua Holt',
    email: `${randomBytes(6).toString('hex')}@example.test`,
    password,
  };
  const answer = await new Person(server.app).post('/workshops', body);
  if (answer.status === 201) return null;
  expect(answer.status).toBe(422);
  const [error] = problem.parse(answer.body).errors;
  expect(error?.field).toBe('password');
  return error?.sentence ?? '';
}

describe('a password', () => {
  it.each([
    ['of words', 'river copper lantern moss'],
    ['of 15 characters', 'kzwmqpvrtxbnhgf'],
    ['of 72 bytes', 'river copper lantern moss and nineteen more grey pebbles of the shore xy'],
    ['of blanks between', '   river   moss   '],
    ['in Greek', 'ποτάμι χαλκός φανάρι'],
    ['of pictures', '🦊🐻🐼🦁🐯🐨🐸🐙🦀🐳🦜🦔🌵🍄🌊'],
  ])('%s is taken: any character, no rules of composition', async (_name, password) => {
    expect(await refusal(password)).toBeNull();
  });

  it.each([
    ['of 14 characters', 'kzwmqpvrtxbnhg', /at least 15/],
    ['of 73 bytes', `${'river copper lantern moss '.repeat(2)}and twenty more pebbles`, /72 bytes/],
    ['of 30 pictures, 120 bytes', '🦊🐻🐼🦁🐯🐨🐸🐙🦀🐳'.repeat(3), /72 bytes/],
    ['of one letter', 'aaaaaaaaaaaaaaaaaaaa', /repeats/],
    ['that is common', 'passwordpassword', /guessed/],
    ['that is a walk over the keys', 'qwertyuiopasdfgh', /guessed/],
    ['that is a count', '1234567890123456', /guessed/],
    ['that is common with a tail', 'Password123456!', /guessed/],
    ['of the product’s name', 'grainwardgrainward', /guessed/],
    ['of the workshop’s name', 'Oriel Works 2026!', /guessed/],
    ['of the own name', 'perpetuaholt1999', /guessed/],
  ])('%s is refused with the reason', async (_name, password, reason) => {
    expect(await refusal(password)).toMatch(reason);
  });

  it('is never cut: what agrees in 72 bytes and goes on is another one', async () => {
    const password = 'river copper lantern moss and nineteen more grey pebbles of the shore xy';
    const person = await signUp(server);
    await person.send('put', '/session/password', { current: PASSWORD, password });
    const longer = await new Person(server.app).post('/session', {
      email: person.email,
      password: `${password}z`,
    });
    expect(longer.status).toBe(401);
    expect((await signIn(server, person.email, password)).cookies).toHaveLength(2);
  });

  it('is kept as a slow hash with salt and cost of its own', async () => {
    const rows = await server.db.query('owner', 'SELECT password_hash FROM user_account LIMIT 5');
    const hashes = rows.map((row) => z.object({ password_hash: z.string() }).parse(row).password_hash);
    for (const hash of hashes) expect(hash).toMatch(/^\$2[ab]\$\d\d\$.{53}$/);
    expect(new Set(hashes).size).toBe(hashes.length);
  });
});

describe('a link to set a new password', () => {
  it('works once, ends every session, and is not used up by a weak password', async () => {
    const person = await signUp(server);
    await person.post('/password-resets', { email: person.email });
    const token = await secretInMail(server, person.email, /new password/);
    expect((await person.post('/password-resets/complete', { token, password: 'short' })).status).toBe(422);
    const password = 'harbour violet thimble rain';
    expect((await person.post('/password-resets/complete', { token, password })).status).toBe(204);
    expect((await person.get('/session')).status).toBe(401);
    expect((await person.post('/password-resets/complete', { token, password: PASSWORD })).status).toBe(404);
    expect((await signIn(server, person.email, password)).cookies).toHaveLength(2);
  });

  it('runs out after an hour', async () => {
    const person = await signUp(server);
    await person.post('/password-resets', { email: person.email });
    const token = await secretInMail(server, person.email, /new password/);
    await server.db.query(
      'owner',
      `UPDATE password_reset SET expires_at = now() - interval '1 second' WHERE used_at IS NULL`,
    );
    expect((await person.post('/password-resets/complete', { token, password: PASSWORD })).status).toBe(404);
  });

  it('holds 256 random bits, and only their hash is kept', async () => {
    const person = await signUp(server);
    await person.post('/password-resets', { email: person.email });
    const token = await secretInMail(server, person.email, /new password/);
    expect(Buffer.from(token, 'base64url')).toHaveLength(32);
    expect(
      JSON.stringify(await server.db.query('owner', 'SELECT token_hash FROM password_reset')),
    ).not.toContain(token);
  });
});

describe('an invitation', () => {
  const invited = async (role: string, until: string | null = null) => {
    const email = `${randomBytes(6).toString('hex')}@example.test`;
    const answer = await owner.post('/invitations', { email, name: 'Bo Tarn', role, until });
    return { email, answer };
  };

  it('says what it is for, works once, and gives the role by a record of the book', async () => {
    const { email } = await invited('keeper');
    const token = await secretInMail(server, email, /Ferrow and Lisle/);
    const nobody = new Person(server.app);
    expect(invitationInfo.parse((await nobody.post('/invitations/read', { token })).body)).toEqual({
      email,
      name: 'Bo Tarn',
      role: 'keeper',
      workshop_name: 'Ferrow and Lisle',
      has_account: false,
    });
    const both = await Promise.all([
      nobody.post('/invitations/accept', { token, password: PASSWORD }),
      new Person(server.app).post('/invitations/accept', { token, password: PASSWORD }),
    ]);
    expect(both.map(({ status }) => status).sort()).not.toEqual([204, 204]);
    expect(both.filter(({ status }) => status === 204)).toHaveLength(1);
    expect((await nobody.post('/invitations/read', { token })).status).toBe(404);
    const { sequence } = sessionJson.parse((await owner.get('/session')).body).book;
    const last = await owner.get(`/vouchers/${sequence}`);
    expect(last.body).toMatchObject({ kind: 'role_given', detail: { name: 'Bo Tarn', role: 'keeper' } });
  });

  it('runs out after seven days', async () => {
    const { email } = await invited('keeper');
    const token = await secretInMail(server, email, /Ferrow and Lisle/);
    await server.db.query('owner', `ALTER TABLE invitation NO FORCE ROW LEVEL SECURITY`);
    await server.db.query(
      'owner',
      `UPDATE invitation SET expires_at = now() - interval '1 second' WHERE email = $1`,
      [email],
    );
    await server.db.query('owner', `ALTER TABLE invitation FORCE ROW LEVEL SECURITY`);
    expect((await new Person(server.app).post('/invitations/read', { token })).status).toBe(404);
  });

  it('of an auditor has a last day', async () => {
    const { answer } = await invited('auditor');
    expect(answer.status).toBe(422);
    expect(problem.parse(answer.body).errors[0]?.field).toBe('until');
    expect((await invited('auditor', '2099-12-31')).answer.status).toBe(201);
  });

  it('to somebody with an account is taken by that account’s own password, and guessing is slowed down', async () => {
    const known = await signUp(server);
    await owner.post('/invitations', { email: known.email, name: 'Cal Orme', role: 'keeper' });
    const token = await secretInMail(server, known.email, /Ferrow and Lisle/);
    const accept = (password: string) =>
      new Person(server.app).post('/invitations/accept', { token, password });
    for (let n = 0; n < 5; n += 1) expect((await accept('a wild guess at it')).status).toBe(401);
    expect((await accept(PASSWORD)).status).toBe(429);
  });

  it('names its secret behind the # alone, so that no server’s log ever has it', async () => {
    const { email } = await invited('keeper');
    const mail = server.local_mail?.messages().find(({ to }) => to.includes(email));
    expect(mail?.text).toMatch(/\/invitation#[\w-]{43}/);
    expect(mail?.text).not.toMatch(/\?.*token/);
  });
});

describe('a workshop', () => {
  it('is never left without a proprietor', async () => {
    const shop = httpWorkshop(owner);
    const me = await shop.person('Ada Quill');
    expect((await owner.send('delete', `/people/${me}/role`)).status).toBe(409);
    expect((await owner.send('put', `/people/${me}/role`, { role: 'keeper' })).status).toBe(409);
    const second = await addMember(server, owner, 'proprietor', 'Dot Rusk');
    expect((await owner.send('put', `/people/${me}/role`, { role: 'keeper' })).status).toBe(204);
    expect((await second.send('put', `/people/${me}/role`, { role: 'proprietor' })).status).toBe(204);
  });
});

describe('a PIN', () => {
  it('is set with the own password, of four to eight figures, and kept as a hash', async () => {
    const set = (body: object) => owner.send('put', '/session/pin', { password: PASSWORD, ...body });
    for (const pin of ['123', '123456789', '12a4', '', ' 1234'])
      expect((await set({ pin })).status).toBe(422);
    expect((await set({ pin: '2468', password: 'not the one at all' })).status).toBe(422);
    expect((await set({ pin: '2468' })).status).toBe(204);
    const session = await owner.get('/session');
    expect(session.body).toMatchObject({ person: { has_pin: true } });
    expect(session.text).not.toContain('2468');
  });
});
