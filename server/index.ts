/**
 * The process: reads its configuration, starts listening even while the database is away (answering 503), refuses to
 * serve from a database whose rules could be switched off, and ends in good order.
 */
import { createServer } from 'node:http';
import { setTimeout as pause } from 'node:timers/promises';
import { createApp } from './app.ts';
import { reasonsAgainst } from './check-database.ts';
import { readConfig } from './config.ts';
import { workOf } from './jobs/kinds.ts';
import type { Worker } from './jobs/worker.ts';
import { startWorker } from './jobs/worker.ts';
import { startContext } from './start-context.ts';

const RETRY_MS = 2_000;
const LAST_ANSWERS_MS = 10_000;
const IDLE_LOOK_MS = 50;

const config = (() => {
  try {
    return readConfig(process.env);
  } catch (error) {
    console.error(`Grainward can't start:\n${error instanceof Error ? error.message : String(error)}`);
    process.exit(2);
  }
})();

let address = config.public_url ?? `http://127.0.0.1:${config.port}`;
const started = await startContext(config, () => address);
const { context } = started;
/** Nothing is answered from a database before it has been looked at. */
let checked = false;
let ending = false;
const server = createServer(
  { requestTimeout: 30_000, headersTimeout: 15_000, keepAliveTimeout: 10_000 },
  createApp(context, started.local_mail, () => checked),
);
server.listen(config.port, config.host, () => {
  const bound = server.address();
  if (config.public_url === null && bound !== null && typeof bound === 'object')
    address = `http://127.0.0.1:${bound.port}`;
  context.log.info({ address }, 'listening');
  process.send?.({ listening: address });
});

process.on('SIGTERM', () => void end());
process.on('SIGINT', () => void end());
// Started by another program that is gone: nobody is left to end this one.
process.on('disconnect', () => void end());
process.on('uncaughtException', (error) => {
  context.log.fatal({ err: error }, 'the process can’t go on safely');
  process.exit(1);
});
process.on('unhandledRejection', (error) => {
  context.log.fatal({ err: error }, 'the process can’t go on safely');
  process.exit(1);
});

let worker: Worker | null = null;
await whenReachable();
checked = true;
worker = startWorker(context.db, workOf(context), context.log);

async function whenReachable(): Promise<void> {
  for (;;) {
    const reasons = await reasonsAgainst(context.db).catch(() => null);
    if (reasons === null) {
      context.log.warn('the database can’t be reached yet');
      await pause(RETRY_MS);
      continue;
    }
    if (reasons.length === 0) return;
    console.error(
      `Grainward can't serve from this database:\n${reasons.map((reason) => `- ${reason}`).join('\n')}`,
    );
    process.exit(2);
  }
}

/** No new connection; what runs is answered, within ten seconds; then the parts close, the database last. */
async function end(): Promise<void> {
  if (ending) return;
  ending = true;
  setTimeout(() => process.exit(1), LAST_ANSWERS_MS).unref();
  const answered = new Promise<void>((resolve) => server.close(() => resolve()));
  const idle = setInterval(() => server.closeIdleConnections(), IDLE_LOOK_MS);
  await context.stream.close();
  await worker?.stop();
  await answered;
  clearInterval(idle);
  await started.close();
  process.exit(0);
}
