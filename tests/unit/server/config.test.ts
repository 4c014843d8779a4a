/** The environment is read once: what is wrong stops the start with a list in plain words; no secret has a default. */
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { readConfig } from '../../../server/config.ts';

const home = mkdtempSync(join(tmpdir(), 'grainward-config-'));
const key = join(home, 'key.pem');
writeFileSync(key, 'a key');
afterAll(() => rmSync(home, { recursive: true, force: true }));

const good = { DATABASE_URL: 'postgres://x@127.0.0.1/x', JWT_SECRET: 'j'.repeat(32), SIGNING_KEY_FILE: key };
const refusal = (change: Readonly<Record<string, string | undefined>>): string => {
  try {
    readConfig({ ...good, ...change });
    return '';
  } catch (error) {
    return error instanceof Error ? error.message : '';
  }
};

describe('the environment', () => {
  it('with the three things that have no default is enough', () => {
    expect(readConfig(good)).toMatchObject({
      port: 4180,
      host: '127.0.0.1',
      public_url: null,
      bcrypt_cost: 12,
    });
  });

  it.each([
    ['without a database', { DATABASE_URL: undefined }, /DATABASE_URL is not set/],
    ['without a secret', { JWT_SECRET: undefined }, /JWT_SECRET is not set/],
    ['with a short secret', { JWT_SECRET: 'short' }, /JWT_SECRET is too short/],
    ['without the name of a key', { SIGNING_KEY_FILE: undefined }, /SIGNING_KEY_FILE is not set/],
    ['without the key', { SIGNING_KEY_FILE: join(home, 'none.pem') }, /SIGNING_KEY_FILE names a file/],
    ['with plain http for others', { PUBLIC_URL: 'http://book.example' }, /PUBLIC_URL has to be https/],
    ['with an address that is none', { PUBLIC_URL: 'book' }, /PUBLIC_URL is the address/],
    ['with a port that is none', { PORT: 'https' }, /PORT is a number/],
  ])('%s is refused, in words', (_name, change, words) => {
    expect(refusal(change)).toMatch(words);
  });

  it('tells everything that is wrong at once, a line each', () => {
    const lines = refusal({ DATABASE_URL: undefined, JWT_SECRET: undefined, PUBLIC_URL: 'book' }).split('\n');
    expect(lines).toHaveLength(3);
    for (const line of lines) expect(line).toMatch(/^- [A-Z_]+ /);
  });

  it.each(['http://127.0.0.1:4180', 'http://localhost:4180', 'https://book.example/'])(
    'takes %s',
    (PUBLIC_URL) => {
      expect(readConfig({ ...good, PUBLIC_URL }).public_url).toBe(PUBLIC_URL.replace(/\/$/, ''));
    },
  );
});
