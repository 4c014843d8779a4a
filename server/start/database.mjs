/**
 * Which database is used: the one that the environment names, else a cluster of our own. Where DATABASE_URL alone is
 * named, its role makes the two that Grainward needs (`server/cli/prepare-database.ts`).
 */
import { existsSync, mkdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { startCluster } from './cluster.mjs';
import { postgresPrograms } from './packages.mjs';
import { run } from './run.mjs';
import { begin, done, giveUp } from './say.mjs';

/**
 * Gives the addresses {owner, app} of a database, for the owner of its tables and for the role that the program runs as;
 * of a cluster of our own also `remake`, which empties it.
 */
export async function database({ root, home, throwAway = false, name = 'grainward' }) {
  const { DATABASE_URL: app, DATABASE_OWNER_URL: owner } = process.env;
  if (app && owner) return throwAway ? { app: at(app, name), owner: at(owner, name) } : { app, owner };
  if (owner)
    giveUp('DATABASE_OWNER_URL is set but DATABASE_URL is not. Name the role that the program runs as too.');
  if (app) return prepared(root, join(root, '.grainward'), throwAway ? name : null);
  const step = throwAway ? 'Starting a throw-away database' : 'Starting the database';
  begin(step);
  const cluster = await startCluster({ bin: await postgresPrograms(), home, throwAway });
  done(step, `port ${cluster.port}`);
  const roles = { owner: cluster.url('grainward_owner', name), app: cluster.url('grainward_app', name) };
  return { ...roles, remake: cluster.remake };
}

async function prepared(root, home, name) {
  mkdirSync(home, { recursive: true });
  const file = join(home, 'database.json');
  begin('Preparing the database of DATABASE_URL');
  const { code } = await run(process.execPath, ['--import', 'tsx', 'server/cli/prepare-database.ts', file], {
    cwd: root,
  });
  if (code !== 0 || !existsSync(file))
    giveUp('the database of DATABASE_URL could not be prepared, see above.');
  done('Preparing the database of DATABASE_URL');
  const { owner, app } = JSON.parse(readFileSync(file, 'utf8'));
  return name === null ? { owner, app } : { owner: at(owner, name), app: at(app, name) };
}

function at(address, name) {
  const url = new URL(address);
  url.pathname = `/${name}`;
  return url.href;
}
