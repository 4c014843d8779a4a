/** F-34, S-03: guessing passwords, codes and PINs is slowed down, tells nothing, and never locks the owner out for good. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { createApp } from '../../server/app.ts';
import { startContext } from '../../server/start-context.ts';
import { PASSWORD, Person, secretInMail, signIn, signUp, startTestServer } from '../support/server.ts';
import type { TestServer } from '../support/server.ts';

let server: TestServer;

beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

const guess = (email: string, password = 'wrong but of a good length', app = server.app) =>
  new Person(app).post('/session', { email, password });
const problem = z.object({ type: z.string(), title: z.string(), status: z.number(), detail: z.string() });

/** As if the pause had been sat out. */
const sitOut = () =>
  server.db.query('owner', `UPDATE sign_in_brake SET paused_until = now() - interval '1 second'`);
const pauses = (answer: { headers: Record<string, unknown> }) => Number(answer.headers['retry-after']);

describe('guessing at one account', () => {
  it('pauses after five tries, longer each time, at most an hour; the owner gets in after each pause', async () => {
    const owner = await signUp(server);
    for (let n = 0; n < 5; n += 1) expect((await guess(owner.email)).status).toBe(401);
    const first = await guess(owner.email);
    expect(first.status).toBe(429);
    expect(pauses(first)).toBeGreaterThan(14 * 60);
    expect(pauses(first)).toBeLessThanOrEqual(15 * 60);
    expect((await guess(owner.email, PASSWORD)).status).toBe(429);

    const growing: number[] = [];
    for (let round = 0; round < 5; round += 1) {
      await sitOut();
      expect((await guess(owner.email)).status).toBe(401);
      growing.push(Math.ceil(pauses(await guess(owner.email)) / 60));
    }
    expect(growing).toEqual([30, 45, 60, 60, 60]);

    await sitOut();
    expect((await guess(owner.email, PASSWORD)).status).toBe(204);
    for (let n = 0; n < 4; n += 1) expect((await guess(owner.email)).status).toBe(401);
    expect((await guess(owner.email, PASSWORD)).status).toBe(204);
  });

  it('holds in every process', async () => {
    const owner = await signUp(server);
    const other = await startContext(server.config, () => 'http://127.0.0.1');
    const there = createApp(other.context);
    for (let n = 0; n < 5; n += 1) await guess(owner.email);
    expect((await guess(owner.email, PASSWORD, there)).status).toBe(429);
    await other.close();
  });

  it('gains nothing from many tries at once', async () => {
    const owner = await signUp(server);
    const answers = await Promise.all(Array.from({ length: 20 }, () => guess(owner.email)));
    const tried = answers.filter(({ status }) => status === 401).length;
    expect(tried).toBe(5);
  });

  it('is ended by the owner with a reset by e-mail, though the guessing goes on', async () => {
    const owner = await signUp(server);
    for (let n = 0; n < 5; n += 1) await guess(owner.email);
    expect((await owner.post('/password-resets', { email: owner.email })).status).toBe(202);
    const token = await secretInMail(server, owner.email, /new password/);
    const password = 'harbour violet thimble rain';
    expect((await owner.post('/password-resets/complete', { token, password })).status).toBe(204);
    expect((await signIn(server, owner.email, password)).cookies).toHaveLength(2);
  });
});

describe('an account that is not there', () => {
  it('answers in the same words and status, wrong password or pause', async () => {
    const owner = await signUp(server);
    const absent = 'nobody@example.test';
    for (let n = 0; n < 7; n += 1) {
      const there = problem.parse((await guess(owner.email)).body);
      expect(problem.parse((await guess(absent)).body)).toEqual(there);
    }
  });

  it('takes as long as one that is', async () => {
    const slow = await startTestServer({ bcrypt_cost: 10 });
    const owner = await signUp(slow);
    const times: Record<'there' | 'absent', number[]> = { there: [], absent: [] };
    for (let n = 0; n < 4; n += 1) {
      for (const [who, email] of [
        ['there', owner.email],
        ['absent', `nobody-${n}@example.test`],
      ] as const) {
        const begun = performance.now();
        await guess(email, 'wrong but of a good length', slow.app);
        times[who].push(performance.now() - begun);
      }
    }
    const least = (list: readonly number[]) => Math.min(...list);
    expect(least(times.absent) / least(times.there)).toBeGreaterThan(0.6);
    expect(least(times.absent) / least(times.there)).toBeLessThan(1.6);
    await slow.close();
  });

  it('is not told by a reset: same status, same text, and no e-mail', async () => {
    const owner = await signUp(server);
    const there = await owner.post('/password-resets', { email: owner.email });
    const absent = await owner.post('/password-resets', { email: 'nobody-here@example.test' });
    expect([absent.status, absent.body]).toEqual([there.status, there.body]);
    await secretInMail(server, owner.email, /new password/);
    expect(server.local_mail?.messages().some(({ to }) => to.includes('nobody-here'))).toBe(false);
  });
});

describe('guessing over many accounts from one address', () => {
  it('pauses the address after fifty tries', async () => {
    const fresh = await startTestServer();
    let refused = 0;
    for (let n = 0; n < 52; n += 1)
      if ((await guess(`somebody-${n}@example.test`, PASSWORD, fresh.app)).status === 429) refused += 1;
    expect(refused).toBe(2);
    await fresh.close();
  });
});

describe('one’s own password, asked for again', () => {
  it('can’t be guessed in a session that was left open', async () => {
    const owner = await signUp(server);
    const change = () =>
      owner.send('put', '/session/password', {
        current: 'a wild guess at it',
        password: 'harbour violet thimble rain',
      });
    for (let n = 0; n < 5; n += 1) expect((await change()).status).toBe(422);
    expect((await change()).status).toBe(429);
  });
});
