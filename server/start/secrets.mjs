/** Secrets of this installation: made at the first start, kept in a file that only this user can read. */
import { generateKeyPairSync, randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

/** Gives JWT_SECRET and SIGNING_KEY_FILE; the environment's own values win. */
export function secrets(home, env = process.env) {
  mkdirSync(home, { recursive: true });
  const jwtFile = join(home, 'jwt-secret');
  const keyFile = join(home, 'signing-key.pem');
  if (!existsSync(jwtFile)) writeFileSync(jwtFile, randomBytes(64).toString('hex'), { mode: 0o600 });
  if (!existsSync(keyFile)) {
    const { privateKey } = generateKeyPairSync('ed25519');
    writeFileSync(keyFile, privateKey.export({ type: 'pkcs8', format: 'pem' }), { mode: 0o600 });
  }
  return {
    JWT_SECRET: env.JWT_SECRET ?? readFileSync(jwtFile, 'utf8'),
    SIGNING_KEY_FILE: env.SIGNING_KEY_FILE ?? keyFile,
  };
}
