/**
 * `npm test`: everything, on a throw-away database. Types, lint and format first, then every test. `npm test -- PATH`
 * runs the tests below a path only. Ends with one line, "N passed, N failed".
 */
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { startCluster } from './cluster.mjs';
import { chromium, npmPackages, postgresPrograms } from './packages.mjs';
import { end, run, whenEnding } from './run.mjs';
import { begin, done } from './say.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const only = process.argv.slice(2);
const bin = (name) => join(root, 'node_modules/.bin', name);
let passed = 0;
let failed = 0;

await npmPackages(root);
await chromium();
const home = mkdtempSync(join(tmpdir(), 'grainward-test-'));
whenEnding(() => rmSync(home, { recursive: true, force: true }));
begin('Starting a throw-away database');
const cluster = await startCluster({ bin: await postgresPrograms(), home, throwAway: true });
whenEnding(async () => {
  await cluster.stop();
  cluster.remove();
});
done('Starting a throw-away database');
const env = {
  ...process.env,
  TEST_DATABASE_URL: cluster.url('grainward_owner', 'postgres'),
  TEST_DATABASE_APP_URL: cluster.url('grainward_app', 'postgres'),
};

if (only.length === 0) {
  await check('Types', bin('tsc'), ['--noEmit']);
  await check('Lint', bin('eslint'), ['.', '--max-warnings', '0']);
  await check('Format', bin('prettier'), ['--check', '.', '--log-level', 'warn']);
  await check('Building the client', bin('vite'), ['build', '--logLevel', 'warn']);
}
await tests();
process.stdout.write(`\n${passed} passed, ${failed} failed\n`);
await end(failed === 0 ? 0 : 1);

async function check(name, program, args) {
  begin(name);
  const { code } = await run(program, args, { cwd: root, env });
  if (code === 0) passed += 1;
  else failed += 1;
  done(name, code === 0 ? 'passed' : 'FAILED');
}

async function tests() {
  begin('Tests');
  const report = join(home, 'report.json');
  const { code } = await run(
    bin('vitest'),
    ['run', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`, ...only],
    { cwd: root, env },
  );
  const counts = existsSync(report) ? JSON.parse(readFileSync(report, 'utf8')) : null;
  passed += counts?.numPassedTests ?? 0;
  failed += counts?.numFailedTests ?? 0;
  // A file that can't be loaded has no test that could fail, yet it has failed.
  if (code !== 0 && (counts?.numFailedTests ?? 0) === 0) failed += 1;
  done('Tests', code === 0 ? 'passed' : 'FAILED');
}
