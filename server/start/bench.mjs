/** `npm run bench`: the load of `tests/load/bench.ts` on a cluster of its own that does wait for the disk. */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { startCluster } from './cluster.mjs';
import { npmPackages, postgresPrograms } from './packages.mjs';
import { run, script, whenEnding } from './run.mjs';
import { begin, done } from './say.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '../..');

await script(main, { interrupted: 130 });

async function main() {
  await npmPackages(root, { development: true });
  const bin = await postgresPrograms();
  const home = mkdtempSync(join(tmpdir(), 'grainward-bench-'));
  whenEnding(() => rmSync(home, { recursive: true, force: true }));
  begin('Starting a database for the load');
  const cluster = await startCluster({ bin, home, throwAway: true, durable: true });
  done('Starting a database for the load', `port ${cluster.port}`);
  const env = {
    ...process.env,
    TEST_DATABASE_URL: cluster.url('grainward_owner', 'postgres'),
    TEST_DATABASE_APP_URL: cluster.url('grainward_app', 'postgres'),
    PATH: `${bin}:${process.env.PATH}`,
  };
  return (await run(process.execPath, ['--import', 'tsx', 'tests/load/bench.ts'], { cwd: root, env })).code;
}
