/**
 * `npm start`: from a fresh machine to a served workshop. Packages, database, schema, demo workshop, client, server,
 * each only where it is missing. `--dev` serves the client with hot reload and restarts the server on a change.
 */
import { existsSync, mkdirSync, readFileSync, readdirSync, statSync } from 'node:fs';
import { createServer } from 'node:net';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { startCluster } from './cluster.mjs';
import { npmPackages, postgresPrograms } from './packages.mjs';
import { end, run, start, whenEnding } from './run.mjs';
import { begin, done, giveUp } from './say.mjs';
import { secrets } from './secrets.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const home = join(root, '.grainward');
const dev = process.argv.includes('--dev');
const tsx = join(root, 'node_modules/.bin/tsx');
mkdirSync(home, { recursive: true });

await npmPackages(root);
const env = {
  ...process.env,
  ...secrets(home),
  FILES_DIR: process.env.FILES_DIR ?? join(home, 'files'),
  ...(await database()),
};

await step('Bringing the schema up to date', tsx, ['server/cli/migrate.ts']);
await step('Looking for the demo workshop', tsx, ['seed/index.ts']);
if (!dev && clientIsOld())
  await step('Building the client', join(root, 'node_modules/.bin/vite'), ['build', '--logLevel', 'warn']);
await serve();

async function database() {
  if (process.env.DATABASE_URL && process.env.DATABASE_OWNER_URL) return {};
  begin('Starting the database');
  const cluster = await startCluster({ bin: await postgresPrograms(), home });
  whenEnding(() => cluster.stop());
  done('Starting the database');
  return {
    DATABASE_URL: cluster.url('grainward_app', 'grainward'),
    DATABASE_OWNER_URL: cluster.url('grainward_owner', 'grainward'),
  };
}

async function step(words, program, args) {
  begin(words);
  const { code } = await run(program, args, { cwd: root, env });
  if (code !== 0) {
    process.stderr.write(`\n${words}: that failed, see above.\n`);
    await end(1);
  }
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
  return ['src', 'shared', 'fonts', 'index.html', 'package-lock.json'].some((name) =>
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

async function portToUse() {
  if (process.env.PORT) return Number(process.env.PORT);
  for (let port = 4180; port < 4230; port += 1) if (await isFree(port)) return port;
  return giveUp('no port between 4180 and 4229 is free. Name one with PORT.');
}

async function serve() {
  const port = await portToUse();
  const serverEnv = {
    ...env,
    PORT: String(port),
    CLIENT_DIR: join(root, 'dist'),
    LOG_LEVEL: process.env.LOG_LEVEL ?? 'warn',
  };
  const server = start(tsx, [...(dev ? ['watch'] : []), 'server/index.ts'], { cwd: root, env: serverEnv });
  server.on('close', (code) => void end(code ?? 1));
  let address = `http://127.0.0.1:${port}`;
  await answers(`${address}/api/v1/health/ready`);
  if (dev) {
    const pages = (await isFree(5180)) ? 5180 : 5181;
    start(join(root, 'node_modules/.bin/vite'), ['--port', String(pages)], {
      cwd: root,
      env: { ...env, API_PORT: String(port) },
    });
    address = `http://127.0.0.1:${pages}`;
  }
  process.stdout.write(`\nGrainward is open at ${address}\n`);
  signIns();
  process.stdout.write('\nCtrl-C closes it.\n');
}

async function answers(url) {
  for (let tries = 0; tries < 120; tries += 1) {
    const there = await fetch(url)
      .then((response) => response.ok)
      .catch(() => false);
    if (there) return;
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
  giveUp('the server did not answer within 30 seconds.');
}

function signIns() {
  const file = join(home, 'demo-sign-ins.json');
  if (!existsSync(file)) return;
  process.stdout.write('\nThe demo workshop, signed in as:\n');
  for (const { role, name, email, password } of JSON.parse(readFileSync(file, 'utf8'))) {
    process.stdout.write(`  ${role.padEnd(11)} ${name.padEnd(16)} ${email.padEnd(30)} ${password}\n`);
  }
  process.stdout.write('E-mails that the demo sends are shown under /mail.\n');
}
