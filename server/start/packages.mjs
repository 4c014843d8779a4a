/** What has to be on the machine: npm packages, PostgreSQL, and for the tests Chromium. Installed where it is missing. */
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { begin, done, giveUp } from './say.mjs';
import { run } from './run.mjs';

/** npm packages after the lock file, where they are missing or older than it; `development` ones too, for the tests. */
export async function npmPackages(root, { development = false } = {}) {
  const marker = join(root, 'node_modules/.package-lock.json');
  const lock = join(root, 'package-lock.json');
  const fresh = existsSync(marker) && statSync(marker).mtimeMs >= statSync(lock).mtimeMs - 1000;
  if (fresh && (!development || existsSync(join(root, 'node_modules/vitest')))) return;
  begin('Installing npm packages');
  const include = development ? ['--include=dev'] : [];
  const { code } = await run('npm', ['ci', '--no-audit', '--no-fund', ...include], { cwd: root });
  if (code !== 0) giveUp('npm could not install the packages. Look at its lines above.');
  done('Installing npm packages');
}

/** The folder of the newest PostgreSQL's programs. */
function newestPostgres() {
  const base = '/usr/lib/postgresql';
  if (!existsSync(base)) return null;
  const versions = readdirSync(base).filter((version) => existsSync(join(base, version, 'bin/initdb')));
  versions.sort((a, b) => Number(b) - Number(a));
  return versions[0] === undefined ? null : join(base, versions[0], 'bin');
}

/** Finds PostgreSQL, or installs Debian's package as root. */
export async function postgresPrograms() {
  const found = newestPostgres();
  if (found !== null) return found;
  await debianPackages('PostgreSQL', ['postgresql']);
  return (
    newestPostgres() ?? giveUp('PostgreSQL was installed but its programs are not where Debian puts them.')
  );
}

/** Finds Chromium for the browser tests, or installs Debian's package as root. */
export async function chromium() {
  if (!existsSync('/usr/bin/chromium')) await debianPackages('Chromium', ['chromium']);
}

async function debianPackages(name, packages) {
  if (process.getuid?.() !== 0)
    giveUp(`${name} is missing. Install it with: sudo apt-get install ${packages.join(' ')}`);
  begin(`Installing ${name}`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  await run('apt-get', ['update', '-q'], { env, quiet: true });
  const { code, output } = await run(
    'apt-get',
    ['install', '-y', '-q', '--no-install-recommends', ...packages],
    { env, quiet: true },
  );
  if (code !== 0) giveUp(`${name} could not be installed.\n${output.split('\n').slice(-8).join('\n')}`);
  done(`Installing ${name}`);
}
