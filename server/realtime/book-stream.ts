/**
 * Tells open screens that the book has moved on: one LISTEN connection per process, server-sent events to the
 * browsers. Only "something changed, up to this number" goes out, never a figure. Notices of one workshop within a
 * fifth of a second go as one, after the commit, so that posting never waits for them.
 */
import type { Response } from 'express';
import pg from 'pg';
import type { Logger } from 'pino';
import { z } from '../../shared/schemas/zod.ts';

const CHANNEL = 'grainward_book';
const TOGETHER_MS = 200;
const HEARTBEAT_MS = 25_000;
const RETRY_MS = 2_000;
const MOST_SCREENS = 500;
/** The browser opens it again by itself, and is then asked anew who it is: a session that has ended hears no more. */
const LONGEST_MS = 60_000;

export interface BookStream {
  /** Tells every process that a workshop's book reached a sequence. */
  changed(workshop_id: string, sequence: string): void;
  /** Keeps a response open and writes to it. Gives false where too many screens are open. */
  open(workshop_id: string, response: Response): boolean;
  close(): Promise<void>;
}

const notice = z.object({ workshop_id: z.string(), sequence: z.string() });

export function bookStream(database_url: string, log: Logger): BookStream {
  const screens = new Map<Response, string>();
  const waiting = new Map<string, string>();
  let client: pg.Client | null = null;
  let closed = false;
  let flushing: NodeJS.Timeout | null = null;

  const tell = (payload: string) => {
    const { workshop_id, sequence } = notice.parse(JSON.parse(payload));
    for (const [response, of] of screens)
      if (of === workshop_id) response.write(`event: book\ndata: {"sequence":"${sequence}"}\n\n`);
  };
  const listen = async () => {
    const next = new pg.Client({ connectionString: database_url });
    next.on('notification', ({ payload }) => tell(payload ?? ''));
    next.on('error', (error) => {
      log.warn({ err: error }, 'the line to the book was lost');
      client = null;
      if (!closed) setTimeout(retry, RETRY_MS).unref();
    });
    await next.connect();
    await next.query(`LISTEN ${CHANNEL}`);
    client = next;
  };
  const retry = () => {
    if (!closed) listen().catch(() => setTimeout(retry, RETRY_MS).unref());
  };
  const flush = () => {
    flushing = null;
    for (const [workshop_id, sequence] of waiting) {
      client
        ?.query('SELECT pg_notify($1, $2)', [CHANNEL, JSON.stringify({ workshop_id, sequence })])
        .catch(() => undefined);
    }
    waiting.clear();
  };
  const heartbeat = setInterval(() => {
    for (const response of screens.keys()) response.write(': still here\n\n');
  }, HEARTBEAT_MS).unref();
  retry();
  return {
    changed(workshop_id, sequence) {
      waiting.set(workshop_id, sequence);
      flushing ??= setTimeout(flush, TOGETHER_MS).unref();
    },
    open(workshop_id, response) {
      if (screens.size >= MOST_SCREENS) return false;
      response.writeHead(200, { 'Content-Type': 'text/event-stream', 'Cache-Control': 'no-store' });
      response.write(': listening\n\n');
      screens.set(response, workshop_id);
      const longest = setTimeout(() => response.end(), LONGEST_MS).unref();
      response.on('close', () => {
        clearTimeout(longest);
        screens.delete(response);
      });
      return true;
    },
    async close() {
      closed = true;
      clearInterval(heartbeat);
      if (flushing !== null) clearTimeout(flushing);
      for (const response of screens.keys()) response.end();
      await client?.end().catch(() => undefined);
    },
  };
}
