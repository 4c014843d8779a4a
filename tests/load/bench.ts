/**
 * `npm run bench`: how quickly metal is issued over HTTP, as a share of what pgbench reaches with the very same SQL on
 * the same server in the same run; and that balances don't grow with the book. Prints figures, judges nothing.
 */
import { balancesTime, growBook } from './big-book.ts';
import { httpRate } from './http-clients.ts';
import { capturedTransactions } from './captured-sql.ts';
import { pgbenchRate } from './pgbench.ts';
import { startServerProcess } from './server-process.ts';
import { issueRequest, openShops } from './shops.ts';
import { startTestServer } from '../support/server.ts';

const WORKSHOPS = 50;
const CLIENTS = 8;
const ROUNDS = 3;
const SECONDS = 8;
const SMALL_BOOK = 10_000;
const LARGE_BOOK = 1_000_000;

const say = (line: string) => process.stdout.write(`${line}\n`);
const middle = (figures: readonly number[]) =>
  [...figures].sort((a, b) => a - b)[Math.floor(figures.length / 2)] ?? 0;

const server = await startTestServer({ log_level: 'error' });
const program = await startServerProcess(server.config);
try {
  await posting();
  await balances();
} finally {
  await program.close();
  await server.close();
}

async function posting(): Promise<void> {
  say(`Opening ${WORKSHOPS} workshops …`);
  const shops = await openShops(server, WORKSHOPS);
  const transactions = await capturedTransactions(shops);
  const issues = shops.map((shop) => issueRequest(shop));
  say(
    `One issue is ${transactions[0]?.filter((line) => !line.startsWith('\\set')).length ?? 0} statements. ${CLIENTS} clients, ${ROUNDS} rounds of ${SECONDS} s each:`,
  );
  await httpRate(program.port, issues, CLIENTS, SECONDS);
  const rounds: { http: number; sql: number }[] = [];
  for (let round = 1; round <= ROUNDS; round += 1) {
    const http = await httpRate(program.port, issues, CLIENTS, SECONDS);
    const sql = await pgbenchRate(server.config.database_url, transactions, CLIENTS, SECONDS);
    rounds.push({ http, sql });
    say(
      `  round ${round}: ${http.toFixed(0)} issues/s over HTTP, ${sql.toFixed(0)}/s by pgbench, ratio ${(http / sql).toFixed(2)}`,
    );
  }
  say(
    `Posting an issue over HTTP: ${middle(rounds.map(({ http, sql }) => http / sql)).toFixed(2)} of pgbench with the same SQL.`,
  );
}

async function balances(): Promise<void> {
  const [shop] = await openShops(server, 1);
  if (shop === undefined) throw new Error('no workshop was opened');
  const times: number[] = [];
  for (const size of [SMALL_BOOK, LARGE_BOOK]) {
    say(`Growing a book to ${size} entries …`);
    await growBook(server.context.db, shop, size);
    const time = await balancesTime(program.port, shop);
    times.push(time);
    say(`  balances now: ${time.toFixed(1)} ms`);
  }
  say(
    `Balances now of a hundred times the book: ${((times[1] ?? 0) / (times[0] ?? 1)).toFixed(2)} of the time.`,
  );
}
