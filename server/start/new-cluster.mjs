/**
 * Making a cluster: where it lies, who runs it, its passwords and its two roles. PostgreSQL refuses to run as root,
 * so root lends it the user postgres that Debian's package makes.
 */
import { randomBytes } from 'node:crypto';
import { execFileSync } from 'node:child_process';
import { chmodSync, chownSync, existsSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { run } from './run.mjs';
import { giveUp } from './say.mjs';

/** Ids of the user that runs the database, as `spawn` takes them: nobody else's where we are not root. */
export function databaseUser() {
  if (process.getuid?.() !== 0) return {};
  try {
    const id = (flag) => Number(execFileSync('id', [flag, 'postgres'], { encoding: 'utf8', stdio: 'pipe' }));
    return { uid: id('-u'), gid: id('-g') };
  } catch {
    return giveUp(
      'PostgreSQL does not run as root, and there is no user postgres to run it. Start Grainward as an ordinary user.',
    );
  }
}

/** Chooses place and passwords of a new cluster: in `home`, or in the temporary folder where `who` can't enter that. */
export async function newCluster(home, who, throwAway) {
  const inHome = join(home, 'postgres');
  if (!throwAway && existsSync(join(inHome, 'data')))
    giveUp(
      `${inHome} holds a database, but its passwords (cluster.json beside it) are gone. Bring the file back, or move the folder away to begin with a new book.`,
    );
  const dir =
    !throwAway && (await canEnter(inHome, who)) ? inHome : mkdtempSync(join(tmpdir(), 'grainward-'));
  if (who.uid !== undefined) chownSync(dir, who.uid, who.gid);
  chmodSync(dir, 0o700);
  const password = () => randomBytes(24).toString('hex');
  const passwords = { postgres: password(), grainward_owner: password(), grainward_app: password() };
  return { dir, port: 0, ready: false, passwords };
}

/** Whether the database's user can enter a folder: one below a closed home folder it can't. */
async function canEnter(dir, who) {
  mkdirSync(dir, { recursive: true });
  if (who.uid === undefined) return true;
  chownSync(dir, who.uid, who.gid);
  const { code } = await run('test', ['-x', dir], { ...who, cwd: '/', quiet: true });
  return code === 0;
}

/** Makes the empty cluster, with a password for every connection. */
export async function initialise(bin, cluster, who) {
  const file = join(cluster.dir, 'first-password');
  writeFileSync(file, cluster.passwords.postgres, { mode: 0o600 });
  if (who.uid !== undefined) chownSync(file, who.uid, who.gid);
  const settings = [
    '-U',
    'postgres',
    '-E',
    'UTF8',
    '--locale=C.UTF-8',
    '-A',
    'scram-sha-256',
    `--pwfile=${file}`,
  ];
  const { code, output } = await run(join(bin, 'initdb'), ['-D', join(cluster.dir, 'data'), ...settings], {
    ...who,
    cwd: '/',
    quiet: true,
  });
  rmSync(file);
  if (code !== 0) giveUp(`the database could not be made.\n${output}`);
}

/** The owner of the tables, and the role that the program runs as: it owns nothing and passes over nothing. */
export function makeRoles(bin, cluster, env) {
  const { passwords } = cluster;
  const statements = [
    `CREATE ROLE grainward_owner LOGIN CREATEDB NOSUPERUSER NOBYPASSRLS PASSWORD '${passwords.grainward_owner}';`,
    `CREATE ROLE grainward_app LOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE NOBYPASSRLS PASSWORD '${passwords.grainward_app}';`,
    'CREATE DATABASE grainward OWNER grainward_owner;',
  ];
  return psql(bin, cluster, env, statements.join('\n'));
}

/** Runs statements as the cluster's superuser, each by itself. */
export async function psql(bin, { passwords, port }, env, input) {
  const server = ['-h', '127.0.0.1', '-p', String(port), '-U', 'postgres', '-d', 'postgres'];
  const { code, output } = await run(join(bin, 'psql'), [...server, '-v', 'ON_ERROR_STOP=1', '-q'], {
    env: { ...env, PGPASSWORD: passwords.postgres },
    cwd: '/',
    quiet: true,
    input,
  });
  if (code !== 0) giveUp(`the database could not be set up.\n${output.replaceAll(/PASSWORD '\w+'/g, '')}`);
}
