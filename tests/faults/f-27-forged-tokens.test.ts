/** F-27, F-28: tokens that are not ours, were changed, are for something else, or have run out. */
import { createHmac, generateKeyPairSync } from 'node:crypto';
import jwt from 'jsonwebtoken';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { PASSWORD, Person, addMember, signIn, signUp, startTestServer } from '../support/server.ts';
import type { TestServer } from '../support/server.ts';

const log_lines: string[] = [];
let server: TestServer;
let owner: Person;
let claims: { sub: string; sid: string };

beforeAll(async () => {
  server = await startTestServer({}, log_lines);
  owner = await signUp(server);
  claims = z.object({ sub: z.string(), sid: z.string() }).parse(jwt.decode(owner.cookie('grainward')));
});
afterAll(() => server.close());

const whoAmI = z.object({ person: z.object({ id: z.string() }) });
const encode = (value: object) => Buffer.from(JSON.stringify(value)).toString('base64url');
const ours = () => ({ issuer: 'grainward', audience: 'grainward-session', subject: claims.sub });

async function statusWith(token: string): Promise<number> {
  const person = new Person(server.app);
  person.carry([`grainward=${token}`]);
  return (await person.get('/session')).status;
}

const forged: readonly (readonly [string, () => string])[] = [
  [
    'of algorithm none',
    () =>
      `${encode({ alg: 'none', typ: 'JWT' })}.${encode({ ...claims, iss: 'grainward', aud: 'grainward-session', exp: 9_999_999_999 })}.`,
  ],
  [
    'signed with another key',
    () => jwt.sign({ sid: claims.sid }, 'x'.repeat(72), { ...ours(), algorithm: 'HS256', expiresIn: 600 }),
  ],
  [
    'of another algorithm with our key',
    () =>
      jwt.sign({ sid: claims.sid }, server.config.jwt_secret, {
        ...ours(),
        algorithm: 'HS512',
        expiresIn: 600,
      }),
  ],
  [
    'signed by a key that it brings itself',
    () => {
      const { privateKey, publicKey } = generateKeyPairSync('rsa', { modulusLength: 2048 });
      const own_key = publicKey.export({ type: 'spki', format: 'der' }).toString('base64');
      return jwt.sign({ sid: claims.sid }, privateKey, {
        ...ours(),
        algorithm: 'RS256',
        expiresIn: 600,
        header: { alg: 'RS256', x5c: own_key },
      });
    },
  ],
  [
    'with changed content',
    () => {
      const [head, body, signature] = owner.cookie('grainward').split('.');
      const read = z
        .record(z.string(), z.unknown())
        .parse(JSON.parse(Buffer.from(body ?? '', 'base64url').toString()));
      return `${head}.${encode({ ...read, sub: '00000000-0000-4000-8000-000000000000' })}.${signature}`;
    },
  ],
  [
    'that has run out',
    () =>
      jwt.sign({ sid: claims.sid }, server.config.jwt_secret, {
        ...ours(),
        algorithm: 'HS256',
        expiresIn: -1,
      }),
  ],
  [
    'that is not valid yet',
    () =>
      jwt.sign({ sid: claims.sid }, server.config.jwt_secret, {
        ...ours(),
        algorithm: 'HS256',
        expiresIn: 600,
        notBefore: 60,
      }),
  ],
  [
    'for another purpose',
    () =>
      jwt.sign({ sid: claims.sid }, server.config.jwt_secret, {
        ...ours(),
        audience: 'grainward-second-factor',
        algorithm: 'HS256',
        expiresIn: 600,
      }),
  ],
  [
    'of another maker',
    () =>
      jwt.sign({ sid: claims.sid }, server.config.jwt_secret, {
        ...ours(),
        issuer: 'elsewhere',
        algorithm: 'HS256',
        expiresIn: 600,
      }),
  ],
  ['that is none', () => createHmac('sha256', 'x').update('y').digest('hex')],
];

describe('a token', () => {
  it('of ours is taken, so that the refusals below mean something', async () => {
    const good = jwt.sign({ sid: claims.sid }, server.config.jwt_secret, {
      ...ours(),
      algorithm: 'HS256',
      expiresIn: 600,
    });
    expect(await statusWith(good)).toBe(200);
  });

  it.each(forged)('%s is refused with 401 and a line in the log', async (_name, make) => {
    log_lines.length = 0;
    expect(await statusWith(make())).toBe(401);
    expect(log_lines.some((line) => line.includes('"security":"token_refused"'))).toBe(true);
  });

  it('of one user does not open another’s session', async () => {
    const other = await signUp(server);
    const theirs = z.object({ sid: z.string() }).parse(jwt.decode(other.cookie('grainward')));
    const mixed = jwt.sign({ sid: theirs.sid }, server.config.jwt_secret, {
      ...ours(),
      algorithm: 'HS256',
      expiresIn: 600,
    });
    expect(await statusWith(mixed)).toBe(401);
  });
});

describe('a token is worth nothing at once after', () => {
  it('a change of password, in every other session', async () => {
    const person = await addMember(server, owner, 'keeper', 'Bo Tarn');
    const elsewhere = await signIn(server, person.email);
    const next = 'harbour violet thimble rain';
    const body = { current: PASSWORD, password: next };
    expect((await person.send('put', '/session/password', body)).status).toBe(204);
    expect((await elsewhere.get('/session')).status).toBe(401);
    expect((await elsewhere.post('/session/refresh')).status).toBe(401);
    expect((await person.get('/session')).status).toBe(200);
  });

  it('a change of role: what the old role could do is refused', async () => {
    const person = await addMember(server, owner, 'keeper', 'Cal Orme');
    expect((await person.get('/lots')).status).toBe(200);
    const { person: me } = whoAmI.parse((await person.get('/session')).body);
    expect((await owner.send('put', `/people/${me.id}/role`, { role: 'goldsmith' })).status).toBe(204);
    expect((await person.get('/lots')).status).toBe(403);
  });

  it('the end of the role: nothing is read any more, in words that say why', async () => {
    const person = await addMember(server, owner, 'keeper', 'Dot Rusk');
    const { person: me } = whoAmI.parse((await person.get('/session')).body);
    expect((await owner.send('delete', `/people/${me.id}/role`)).status).toBe(204);
    for (const path of ['/session', '/lots', '/people']) {
      const answer = await person.get(path);
      expect([answer.status, z.object({ type: z.string() }).parse(answer.body).type]).toEqual([
        403,
        '/problems/role_ended',
      ]);
    }
  });

  it('an auditor’s last day', async () => {
    const auditor = await addMember(server, owner, 'auditor', 'Eli Frome');
    expect((await auditor.get('/vouchers')).status).toBe(200);
    const { person: me } = whoAmI.parse((await auditor.get('/session')).body);
    const past = { role: 'auditor', until: '2026-01-31' };
    expect((await owner.send('put', `/people/${me.id}/role`, past)).status).toBe(204);
    expect((await auditor.get('/vouchers')).status).toBe(403);
  });
});
