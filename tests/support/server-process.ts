/** The program as a process of its own, for tests that start, stop and starve it. */
import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { generateKeyPairSync } from 'node:crypto';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { z } from 'zod';

const listening = z.object({ listening: z.string() });

export interface ServerProcess {
  /** Where it listens; rejected where it ended before. */
  readonly address: Promise<string>;
  /** Its exit code, once it has ended. */
  readonly ended: Promise<number | null>;
  /** What it wrote to the standard error. */
  errors(): string;
  kill(signal: NodeJS.Signals): void;
}

/** Starts the program with an environment; what is not given is fit for a test. */
export function startServerProcess(more: Readonly<Record<string, string>>): ServerProcess {
  const home = mkdtempSync(join(tmpdir(), 'grainward-process-'));
  const key = join(home, 'key.pem');
  const { privateKey } = generateKeyPairSync('ed25519');
  writeFileSync(key, privateKey.export({ type: 'pkcs8', format: 'pem' }), { mode: 0o600 });
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
    cwd: join(import.meta.dirname, '../..'),
    env: {
      PORT: '0',
      JWT_SECRET: 'j'.repeat(48),
      SIGNING_KEY_FILE: key,
      FILES_DIR: home,
      LOG_LEVEL: 'silent',
      BCRYPT_COST: '4',
      ...more,
    },
    stdio: ['ignore', 'ignore', 'pipe', 'ipc'],
  });
  let errors = '';
  child.stderr?.on('data', (part: Buffer) => {
    errors += part.toString();
  });
  const ended = new Promise<number | null>((resolve) => {
    child.once('close', (code) => {
      rmSync(home, { recursive: true, force: true });
      resolve(code);
    });
  });
  const address = new Promise<string>((resolve, reject) => {
    child.once('message', (message) => resolve(listening.parse(message).listening));
    child.once('close', () => reject(new Error(`ended before it listened: ${errors}`)));
  });
  address.catch(() => undefined);
  return { address, ended, errors: () => errors, kill: (signal) => void child.kill(signal) };
}
