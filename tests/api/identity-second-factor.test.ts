/** The second factor (FAULTS S-01, S-05): set up, asked for, each code once, recovery codes, demanded of roles. */
import { generate } from 'otplib';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { recoveryCodes, secondFactorSetup, sessionJson } from '../../shared/schemas/identity.ts';
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

beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

/** The code of the 30 seconds before, now or after: three that are valid at once, none of them used yet. */
const codeAt = (secret: string, steps: number) =>
  generate({ secret, epoch: Math.floor(Date.now() / 1000) + 30 * steps });

/** Turns the second factor on, with the code of the step before. */
async function turnOn(person: Person): Promise<{ secret: string; codes: string[] }> {
  const begun = await person.post('/second-factor/setup', { password: PASSWORD });
  const { setup, secret, qr } = secondFactorSetup.parse(begun.body);
  expect(qr).toMatch(/^data:image\/png;base64,/);
  const on = await person.post('/second-factor', { setup, code: await codeAt(secret, -1) });
  expect(on.status).toBe(201);
  return { secret, codes: recoveryCodes.parse(on.body).recovery_codes };
}

const tryWith = (email: string, code: string | null, password = PASSWORD) =>
  new Person(server.app).post('/session', { email, password, ...(code === null ? {} : { code }) });

describe('an account with a second factor', () => {
  it('is asked for the code once the password is right, and not before', async () => {
    const owner = await signUp(server);
    await turnOn(owner);
    const wrong = await tryWith(owner.email, null, 'wrong but of a good length');
    expect(wrong.body).toMatchObject({ type: '/problems/not_signed_in', status: 401 });
    const right = await tryWith(owner.email, null);
    expect(right.body).toMatchObject({ type: '/problems/second_factor_needed', status: 401 });
    expect(right.headers['set-cookie']).toBeUndefined();
  });

  it('takes a code once, also where it is sent twice at once, and no older one after it', async () => {
    const owner = await signUp(server);
    const { secret } = await turnOn(owner);
    const [before, now] = [await codeAt(secret, -1), await codeAt(secret, 0)];
    expect((await tryWith(owner.email, before)).status).toBe(401);
    const both = await Promise.all([tryWith(owner.email, now), tryWith(owner.email, now)]);
    expect(both.map(({ status }) => status).sort()).toEqual([204, 401]);
    expect((await tryWith(owner.email, now)).status).toBe(401);
    expect((await tryWith(owner.email, await codeAt(secret, 1))).status).toBe(204);
  });

  it('takes no code of another time', async () => {
    const owner = await signUp(server);
    const { secret } = await turnOn(owner);
    for (const steps of [-10, -3, 3, 10])
      expect((await tryWith(owner.email, await codeAt(secret, steps))).status).toBe(401);
  });

  it('is slowed down where codes are guessed', async () => {
    const owner = await signUp(server);
    await turnOn(owner);
    for (let n = 0; n < 5; n += 1) expect((await tryWith(owner.email, '000000')).status).toBe(401);
    expect((await tryWith(owner.email, '000000')).status).toBe(429);
  });

  it('opens by each recovery code once, typed as it comes', async () => {
    const owner = await signUp(server);
    const { codes } = await turnOn(owner);
    expect(new Set(codes).size).toBe(10);
    const [first = '', second = ''] = codes;
    expect((await tryWith(owner.email, first)).status).toBe(204);
    expect((await tryWith(owner.email, first)).status).toBe(401);
    expect((await tryWith(owner.email, second.toLowerCase().replaceAll('-', ' '))).status).toBe(204);
    const kept = await server.db.query('owner', 'SELECT recovery_hashes FROM user_account WHERE email = $1', [
      owner.email,
    ]);
    expect(JSON.stringify(kept)).not.toContain(codes[3]);
  });

  it('may have a password of eight characters, and must lengthen it before the factor goes', async () => {
    const owner = await signUp(server);
    const short = { current: PASSWORD, password: 'moss7rvr' };
    expect((await owner.send('put', '/session/password', short)).status).toBe(422);
    const { codes } = await turnOn(owner);
    expect((await owner.send('put', '/session/password', short)).status).toBe(204);
    const off = await owner.post('/second-factor/off', { password: short.password, code: codes[0] });
    expect(off.status).toBe(422);
    await owner.send('put', '/session/password', { current: short.password, password: PASSWORD });
    expect((await owner.post('/second-factor/off', { password: PASSWORD, code: codes[0] })).status).toBe(204);
    expect((await tryWith(owner.email, null)).status).toBe(204);
  });

  it('gets new recovery codes by password and code, and the old ones are gone', async () => {
    const owner = await signUp(server);
    const { codes } = await turnOn(owner);
    const wrong = await owner.post('/second-factor/recovery-codes', { password: PASSWORD, code: '000000' });
    expect(wrong.status).toBe(422);
    const renewed = await owner.post('/second-factor/recovery-codes', { password: PASSWORD, code: codes[0] });
    const { recovery_codes } = recoveryCodes.parse(renewed.body);
    expect((await tryWith(owner.email, codes[1] ?? '')).status).toBe(401);
    expect((await tryWith(owner.email, recovery_codes[0] ?? '')).status).toBe(204);
  });

  it('is not passed over by an invitation to another workshop', async () => {
    const owner = await signUp(server);
    const { codes } = await turnOn(owner);
    const other = await signUp(server, 'Second bench');
    await other.post('/invitations', { email: owner.email, name: 'Ada Quill', role: 'keeper' });
    const token = await secretInMail(server, owner.email, /Second bench/);
    const accept = (body: object) =>
      new Person(server.app).post('/invitations/accept', { token, password: PASSWORD, ...body });
    expect((await accept({})).body).toMatchObject({ type: '/problems/second_factor_needed' });
    expect((await accept({ code: codes[0] })).status).toBe(204);
  });
});

describe('setting up', () => {
  it('asks for the password, and keeps nothing before the first code', async () => {
    const owner = await signUp(server);
    expect((await owner.post('/second-factor/setup', { password: 'not the one at all' })).status).toBe(422);
    const { setup } = secondFactorSetup.parse(
      (await owner.post('/second-factor/setup', { password: PASSWORD })).body,
    );
    expect((await owner.post('/second-factor', { setup, code: '000000' })).status).toBe(422);
    expect((await tryWith(owner.email, null)).status).toBe(204);
  });

  it('of somebody else is no setup of one’s own, and a session’s token is none either', async () => {
    const [one, two] = [await signUp(server), await signUp(server)];
    const { setup, secret } = secondFactorSetup.parse(
      (await one.post('/second-factor/setup', { password: PASSWORD })).body,
    );
    const code = await codeAt(secret, 0);
    expect((await two.post('/second-factor', { setup, code })).status).toBe(422);
    expect((await two.post('/second-factor', { setup: two.cookie('grainward'), code })).status).toBe(422);
  });
});

describe('a workshop that demands a second factor of a role', () => {
  it('lets nobody of the role do anything before it is set up, at once and in sessions that are open', async () => {
    const owner = await signUp(server);
    const keeper = await addMember(server, owner, 'keeper', 'Bo Tarn');
    expect((await keeper.get('/lots')).status).toBe(200);
    expect((await owner.send('put', '/workshop/second-factor-roles', { roles: ['keeper'] })).status).toBe(
      204,
    );
    expect((await keeper.get('/lots')).body).toMatchObject({
      type: '/problems/second_factor_required',
      status: 403,
    });
    const session = sessionJson.parse((await keeper.get('/session')).body);
    expect([session.user.second_factor, session.workshop.second_factor_roles]).toEqual([false, ['keeper']]);
    const { codes } = await turnOn(keeper);
    expect((await keeper.get('/lots')).status).toBe(200);
    const off = await keeper.post('/second-factor/off', { password: PASSWORD, code: codes[0] });
    expect(off.status).toBe(409);
  });

  it('is not told so by a proprietor who has none, nor by a keeper', async () => {
    const owner = await signUp(server);
    const keeper = await addMember(server, owner, 'keeper', 'Bo Tarn');
    const roles = { roles: ['proprietor', 'keeper'] };
    expect((await owner.send('put', '/workshop/second-factor-roles', roles)).status).toBe(409);
    expect((await keeper.send('put', '/workshop/second-factor-roles', { roles: [] })).status).toBe(403);
    await turnOn(owner);
    expect((await owner.send('put', '/workshop/second-factor-roles', roles)).status).toBe(204);
    expect((await signIn(server, keeper.email)).cookies).toHaveLength(2);
  });
});
