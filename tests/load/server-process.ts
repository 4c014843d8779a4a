/** The program as a process of its own, on the database and with the secrets of a test server. */
import { spawn } from 'node:child_process';
import { rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Config } from '../../server/config.ts';
import { z } from '../../shared/schemas/zod.ts';

const listening = z.object({ listening: z.string() });

/** Starts it and waits until it listens. */
export async function startServerProcess(config: Config) {
  const key = join(tmpdir(), `grainward-bench-key-${process.pid}.pem`);
  writeFileSync(key, config.signing_key_pem, { mode: 0o600 });
  const env = {
    NODE_ENV: 'production',
    PORT: '0',
    DATABASE_URL: config.database_url,
    DATABASE_POOL: String(config.database_pool),
    JWT_SECRET: config.jwt_secret,
    SIGNING_KEY_FILE: key,
    LOG_LEVEL: 'error',
  };
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
    cwd: join(import.meta.dirname, '../..'),
    env,
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
  });
  const port = await new Promise<string>((resolve, reject) => {
    child.once('message', (message) => resolve(new URL(listening.parse(message).listening).port));
    child.once('close', () => reject(new Error('the server ended before it listened')));
  });
  return {
    port,
    close: () =>
      new Promise<void>((resolve) => {
        child.once('close', () => {
          rmSync(key);
          resolve();
        });
        child.kill('SIGTERM');
      }),
  };
}
