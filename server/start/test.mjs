/**
 * `npm test`: everything, on a throw-away database. Types, lint, format and build first, then every test;
 * `npm test -- PATH` runs the tests below a path only. Ends with one line, "N passed, N failed".
 */
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { database } from './database.mjs';
import { chromium, npmPackages } from './packages.mjs';
import { run, script, whenEnding } from './run.mjs';
import { begin, done } from './say.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const program = (name) => join(root, 'node_modules/.bin', name);
const only = process.argv.slice(2);
const everything = only.length === 0;
const inBrowser = everything || only.some((path) => path.includes('tests/browser'));
let passed = 0;
let failed = 0;

await script(main, { interrupted: 130 });

async function main() {
  await npmPackages(root, { development: true });
  if (inBrowser) await chromium();
  const home = mkdtempSync(join(tmpdir(), 'grainward-test-'));
  whenEnding(() => rmSync(home, { recursive: true, force: true }));
  const { owner, app } = await database({ root, home, throwAway: true, name: 'postgres' });
  const env = { ...process.env, NODE_ENV: 'test', TEST_DATABASE_URL: owner, TEST_DATABASE_APP_URL: app };
  if (everything) {
    await check('Types', program('tsc'), ['--noEmit'], env);
    await check('Lint', program('eslint'), ['.', '--max-warnings', '0'], env);
    await check('Format', program('prettier'), ['--check', '.', '--log-level', 'warn'], env);
  }
  if (inBrowser) {
    const forPages = { ...env, NODE_ENV: 'production' };
    await check('Building the client', program('vite'), ['build', '--logLevel', 'warn'], forPages);
  }
  await tests(home, env);
  process.stdout.write(`\n${passed} passed, ${failed} failed\n`);
  return failed === 0 ? 0 : 1;
}

async function check(name, path, args, env) {
  begin(name);
  const { code } = await run(path, args, { cwd: root, env });
  if (code === 0) passed += 1;
  else failed += 1;
  done(name, code === 0 ? 'passed' : 'FAILED', code === 0);
}

async function tests(home, env) {
  begin('Tests');
  const report = join(home, 'report.json');
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${report}`];
  const { code } = await run(program('vitest'), ['run', ...reporters, ...only], { cwd: root, env });
  const { testResults = [] } = existsSync(report) ? JSON.parse(readFileSync(report, 'utf8')) : {};
  const inTests = (state) =>
    testResults.flatMap((file) => file.assertionResults).filter((test) => test.status === state).length;
  // A file that can't be loaded has no test that could fail, yet it has failed.
  const broken = testResults.filter(
    (file) => file.status === 'failed' && !file.assertionResults.some((test) => test.status === 'failed'),
  ).length;
  passed += inTests('passed');
  failed += inTests('failed') + broken;
  if (code !== 0 && inTests('failed') + broken === 0) failed += 1;
  done('Tests', code === 0 ? 'passed' : 'FAILED', code === 0);
}
