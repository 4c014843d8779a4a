/**
 * F-08, F-42, F-47, S-11: the process starts while the database is away and recovers by itself, refuses a database
 * whose rules could be switched off or whose schema is another, and stops in good order under load.
 */
import { createServer, connect as connectTo } from 'node:net';
import type { AddressInfo, Socket } from 'node:net';
import { setTimeout as pause } from 'node:timers/promises';
import pg from 'pg';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { z } from 'zod';
import type { TestDatabase } from '../support/database.ts';
import { reasonsAgainst } from '../../server/check-database.ts';
import { connect } from '../../server/db/database.ts';
import { createTestDatabase } from '../support/database.ts';
import type { ServerProcess } from '../support/server-process.ts';
import { startServerProcess } from '../support/server-process.ts';

let db: TestDatabase;
let running: ServerProcess | null;

beforeEach(async () => {
  db = await createTestDatabase();
  running = null;
});
afterEach(async () => {
  running?.kill('SIGKILL');
  await running?.ended;
  await db.drop();
});

const start = (more: Readonly<Record<string, string>> = {}): ServerProcess => {
  running = startServerProcess({ DATABASE_URL: db.app_url, ...more });
  return running;
};

const get = async (address: string, path: string) => {
  const answer = await fetch(`${address}/api/v1${path}`);
  return { status: answer.status, retry_after: answer.headers.get('retry-after') };
};

/** Asks until the answer has a status, for at most `most_ms`. */
async function until(address: string, path: string, status: number, most_ms: number): Promise<boolean> {
  const end = Date.now() + most_ms;
  while (Date.now() < end) {
    if ((await get(address, path)).status === status) return true;
    await pause(200);
  }
  return false;
}

/** A door to the database that can be shut and opened. */
async function door(url: string) {
  const to = new URL(url);
  const open = new Set<Socket>();
  let shut = true;
  const server = createServer((socket) => {
    if (shut) return void socket.destroy();
    const inner = connectTo(Number(to.port), to.hostname);
    for (const one of [socket, inner]) {
      open.add(one);
      one.on('error', () => one.destroy()).on('close', () => open.delete(one));
    }
    socket.pipe(inner).pipe(socket);
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port }: Pick<AddressInfo, 'port'> = z.object({ port: z.number() }).parse(server.address());
  const through = new URL(url);
  through.port = String(port);
  return {
    url: through.href,
    setOpen(isOpen: boolean) {
      shut = !isOpen;
      if (shut) for (const socket of open) socket.destroy();
    },
    close: () => {
      for (const socket of open) socket.destroy();
      return new Promise((resolve) => server.close(resolve));
    },
  };
}

describe('while the database is away', () => {
  it('the server is up, says 503 with Retry-After, and is back by itself, at start and later', async () => {
    const between = await door(db.app_url);
    const address = await start({ DATABASE_URL: between.url }).address;
    expect((await get(address, '/health/live')).status).toBe(200);
    expect(await get(address, '/health/ready')).toMatchObject({ status: 503, retry_after: '5' });
    expect((await get(address, '/session')).status).toBe(503);
    between.setOpen(true);
    expect(await until(address, '/health/ready', 200, 20_000)).toBe(true);
    expect((await get(address, '/session')).status).toBe(401);
    between.setOpen(false);
    expect((await get(address, '/health/ready')).status).toBe(503);
    expect((await get(address, '/health/live')).status).toBe(200);
    between.setOpen(true);
    expect(await until(address, '/health/ready', 200, 20_000)).toBe(true);
    await between.close();
  });
});

describe('a database', () => {
  /** The reasons why the program must not serve from it, asked through a role's address. */
  async function reasons(url: string): Promise<string> {
    const database = connect(url, 1);
    try {
      return (await reasonsAgainst(database)).join(' ');
    } finally {
      await database.close();
    }
  }

  it('as it is migrated is served from', async () => {
    expect(await reasons(db.app_url)).toBe('');
  });

  it.each([
    ['whose tables the role owns', 'owner_url', 'SELECT 1', /owns tables/],
    [
      'in which a table has lost its wall',
      'app_url',
      'ALTER TABLE invitation NO FORCE ROW LEVEL SECURITY',
      /invitation/,
    ],
    [
      'that is older than the program',
      'app_url',
      `DELETE FROM schema_migration WHERE name LIKE '%second-factor%'`,
      /older than the program/,
    ],
    [
      'that is newer than the program',
      'app_url',
      `INSERT INTO schema_migration (name) VALUES ('2099-01-01-99-tomorrow')`,
      /newer than the program/,
    ],
  ] as const)('%s is refused, in words', async (_name, as, change, words) => {
    await db.query('owner', change);
    expect(await reasons(db[as])).toMatch(words);
  });

  it('that is refused ends the process with 2 and the reason, before anything is served', async () => {
    const process = start({ DATABASE_URL: db.owner_url });
    const served = process.address.then((address) => get(address, '/session')).catch(() => ({ status: 503 }));
    expect((await served).status).toBe(503);
    expect(await process.ended).toBe(2);
    expect(process.errors()).toMatch(/owns tables/);
  });
});

describe('an orderly stop', () => {
  it('answers what runs, takes nothing new, and ends with 0 within ten seconds', async () => {
    const process = start();
    const address = await process.address;
    expect(await until(address, '/health/ready', 200, 20_000)).toBe(true);
    const held = new pg.Client({ connectionString: db.owner_url });
    await held.connect();
    await held.query('BEGIN; LOCK TABLE sign_in_brake IN ACCESS EXCLUSIVE MODE');
    const waiting = Array.from({ length: 8 }, (_, n) =>
      fetch(`${address}/api/v1/session`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json', 'X-Grainward': '1' },
        body: JSON.stringify({ email: `nobody-${n}@example.test`, password: 'wrong but of a good length' }),
      }).then(({ status }) => status),
    );
    await pause(2_000);
    const begun = Date.now();
    process.kill('SIGTERM');
    await pause(500);
    await expect(fetch(`${address}/api/v1/health/live`)).rejects.toThrow();
    await held.query('COMMIT');
    await held.end();
    expect(await Promise.all(waiting)).toEqual(Array.from({ length: 8 }, () => 401));
    expect(await process.ended).toBe(0);
    expect(Date.now() - begun).toBeLessThan(10_000);
  });
});
