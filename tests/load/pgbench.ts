/** PostgreSQL's own load generator, with one script per workshop, each as likely as the others. */
import { execFile } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';

const THREADS = 2;

/** Transactions per second of these scripts by so many clients. */
export async function pgbenchRate(
  database_url: string,
  scripts: readonly (readonly string[])[],
  clients: number,
  seconds: number,
): Promise<number> {
  const folder = mkdtempSync(join(tmpdir(), 'grainward-bench-'));
  const files = scripts.map((lines, index) => {
    const file = join(folder, `${index}.sql`);
    writeFileSync(file, `${lines.join('\n')}\n`);
    return ['-f', file];
  });
  const url = new URL(database_url);
  const server = ['-h', url.hostname, '-p', url.port, '-U', url.username];
  const load = ['-n', '-c', String(clients), '-j', String(THREADS), '-T', String(seconds)];
  try {
    const { stdout } = await promisify(execFile)(
      'pgbench',
      [...server, ...load, ...files.flat(), url.pathname.slice(1)],
      { env: { ...process.env, PGPASSWORD: url.password } },
    );
    const rate = /^tps = ([\d.]+)/m.exec(stdout)?.[1];
    if (rate === undefined || !/number of failed transactions: 0 /.test(stdout)) throw new Error(stdout);
    return Number.parseFloat(rate);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
