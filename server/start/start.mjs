/**
 * `npm start`: from a fresh machine to a served workshop. Packages, database, schema, demo workshop, client, server,
 * each only where it is missing. `--dev` serves the client with hot reload and restarts the server on a change.
 */
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { database } from './database.mjs';
import { npmPackages } from './packages.mjs';
import { end, run, script, start, whenEnding } from './run.mjs';
import { begin, done, giveUp } from './say.mjs';
import { secrets } from './secrets.mjs';

const FIRST_PORT = 4180;
const FIRST_PAGES_PORT = 5180;
const ANSWER_WITHIN_S = 30;

const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const home = join(root, '.grainward');
const dev = process.argv.includes('--dev');
const program = (name) => join(root, 'node_modules/.bin', name);

await script(main, { interrupted: 0 });

async function main() {
  mkdirSync(home, { recursive: true });
  onlyOne();
  await npmPackages(root);
  const { app, owner, remake } = await database({ root, home });
  await withoutHalfADemo(remake);
  const env = {
    ...process.env,
    ...secrets(home),
    FILES_DIR: process.env.FILES_DIR ?? join(home, 'files'),
    DATABASE_URL: app,
    LOG_LEVEL: process.env.LOG_LEVEL ?? 'warn',
  };
  delete env.DATABASE_OWNER_URL;
  const asOwner = { ...env, DATABASE_OWNER_URL: owner };
  await step('Bringing the schema up to date', process.execPath, tsx('server/cli/migrate.ts'), asOwner);
  await step('Looking whether the book is empty', process.execPath, tsx('seed/index.ts'), asOwner);
  if (!dev && clientIsOld())
    await step('Building the client', program('vite'), ['build', '--logLevel', 'warn'], env);
  await serve(env);
}

/** A demo workshop that was broken off is made again from the beginning. */
async function withoutHalfADemo(remake) {
  const unfinished = join(home, 'demo-unfinished');
  if (!existsSync(unfinished)) return;
  if (remake === undefined)
    giveUp(`making the demo workshop was broken off. Empty the database, and remove ${unfinished}.`);
  begin('Clearing away half a demo workshop');
  await remake();
  rmSync(unfinished);
  done('Clearing away half a demo workshop');
}

/** Two starts in one folder would pull the database from under each other. */
function onlyOne() {
  const file = join(home, 'start.pid');
  const other = existsSync(file) ? readFileSync(file, 'utf8').trim() : '';
  const command = `/proc/${other}/cmdline`;
  if (/^\d+$/.test(other) && existsSync(command) && readFileSync(command, 'utf8').includes('start.mjs'))
    giveUp(`it is open already (process ${other}). Close that one first, with Ctrl-C.`);
  writeFileSync(file, String(process.pid));
  whenEnding(() => rmSync(file, { force: true }));
}

function tsx(file) {
  return ['--import', 'tsx', file];
}

async function step(words, path, args, env) {
  begin(words);
  const { code } = await run(path, args, { cwd: root, env });
  if (code !== 0) giveUp(`“${words}” failed, see above.`);
  done(words);
}

/** Whether a source is newer than what was built of it. */
function clientIsOld() {
  const built = join(root, 'dist/index.html');
  if (!existsSync(built)) return true;
  const since = statSync(built).mtimeMs;
  const newer = (path) =>
    statSync(path).isDirectory()
      ? readdirSync(path).some((name) => newer(join(path, name)))
      : statSync(path).mtimeMs > since;
  return ['src', 'shared', 'fonts', 'index.html', 'vite.config.ts', 'package-lock.json'].some((name) =>
    newer(join(root, name)),
  );
}

function isFree(port) {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen(port, '127.0.0.1', () => probe.close(() => resolve(true)));
  });
}

async function freeFrom(first) {
  for (let port = first; port < first + 50; port += 1) if (await isFree(port)) return port;
  return giveUp(`no port between ${first} and ${first + 49} is free. Name one with PORT.`);
}

async function portToUse() {
  const named = process.env.PORT;
  if (named === undefined) return freeFrom(FIRST_PORT);
  if (!/^\d+$/.test(named) || !(await isFree(Number(named))))
    giveUp(`port ${named}, which PORT names, can't be used. Name another, or none.`);
  return Number(named);
}

async function serve(env) {
  const port = await portToUse();
  const serverEnv = { ...env, PORT: String(port), CLIENT_DIR: join(root, 'dist') };
  begin('Opening the book');
  const server = dev
    ? start(program('tsx'), ['watch', 'server/index.ts'], { cwd: root, env: serverEnv })
    : start(process.execPath, tsx('server/index.ts'), {
        cwd: root,
        env: serverEnv,
        stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
      });
  server.on('close', (code) => void end(code ?? 1));
  let address = `http://127.0.0.1:${port}`;
  await answers(`${address}/api/v1/health/ready`);
  done('Opening the book');
  if (dev) {
    const pages = await freeFrom(FIRST_PAGES_PORT);
    const pagesEnv = { ...env, API_PORT: String(port) };
    start(program('vite'), ['--port', String(pages), '--logLevel', 'warn'], { cwd: root, env: pagesEnv });
    address = `http://127.0.0.1:${pages}`;
    await answers(address);
  }
  process.stdout.write(`\nGrainward is open at ${address}\n`);
  signIns();
  process.stdout.write('\nCtrl-C closes it.\n');
}

async function answers(url) {
  const until = Date.now() + ANSWER_WITHIN_S * 1_000;
  while (Date.now() < until) {
    const there = await fetch(url).then(
      (response) => response.ok,
      () => false,
    );
    if (there) return;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  giveUp(`${url} did not answer within ${ANSWER_WITHIN_S} seconds.`);
}

function signIns() {
  const file = join(home, 'demo-sign-ins.json');
  if (!existsSync(file)) return;
  process.stdout.write('\nThe demo workshop, signed in as:\n');
  for (const { role, name, email, password } of JSON.parse(readFileSync(file, 'utf8')))
    process.stdout.write(`  ${role.padEnd(11)} ${name.padEnd(16)} ${email.padEnd(30)} ${password}\n`);
  if (!process.env.SMTP_URL) process.stdout.write('E-mails that the demo sends are shown under /mail.\n');
}
