/**
 * The worker: takes one piece of work at a time out of the queue and does it. Work of a process that died is taken
 * up again after a minute, three times at most; every kind of work must be safe to do twice.
 */
import { setTimeout as pause } from 'node:timers/promises';
import type { Logger } from 'pino';
import { z } from '../../shared/schemas/zod.ts';
import { backgroundJobKind } from '../../shared/schemas/background-job.ts';
import type { BackgroundJobKind } from '../../shared/schemas/background-job.ts';
import type { Database } from '../db/database.ts';

/** What the worker hands to a kind of work. */
export interface WorkOrder {
  readonly workshop_id: string;
  readonly id: string;
  readonly input: unknown;
  readonly made_by: string;
  /** Tells how far the work is; also the sign of life that keeps others from taking it up. */
  progress(step: string, done_parts: number, all_parts: number): Promise<void>;
}

/** Does the work and gives what the asker wants to know of it. */
export type Work = (order: WorkOrder) => Promise<unknown>;

const IDLE_MS = 1_000;
const SENTENCE_OF_FAULT =
  'Something failed on our side. Start it again; quote the number of the work if it happens again.';

const taken = z.object({ workshop_id: z.string(), id: z.string() });
const order = z.object({ kind: backgroundJobKind, input: z.unknown(), made_by: z.string() });

export interface Worker {
  /** Lets the work in hand end, takes no more. */
  stop(): Promise<void>;
}

/** Starts a worker in this process. */
export function startWorker(
  db: Database,
  kinds: Readonly<Record<BackgroundJobKind, Work>>,
  log: Logger,
): Worker {
  const stopping = new AbortController();
  const running = (async () => {
    while (!stopping.signal.aborted) {
      const did = await workOnce(db, kinds, log).catch((error: unknown) => {
        log.warn({ err: error }, 'the queue can’t be read for now');
        return false;
      });
      if (!did) await pause(IDLE_MS, undefined, { signal: stopping.signal }).catch(() => undefined);
    }
  })();
  return {
    async stop() {
      stopping.abort();
      await running;
    },
  };
}

/** Does the next piece of work, if any waits. Gives whether there was one. */
export async function workOnce(
  db: Database,
  kinds: Readonly<Record<BackgroundJobKind, Work>>,
  log: Logger,
): Promise<boolean> {
  const next = await db.inScope(NOBODY, (tx) =>
    tx.maybe(taken, 'SELECT workshop_id::text, id::text FROM take_background_job()'),
  );
  if (next === null) return false;
  const scope = { workshop_id: next.workshop_id, user_id: null };
  const { kind, input, made_by } = await db.inScope(scope, (tx) => tx.one(order, READ, [next.id]));
  const progress = (step: string, done_parts: number, all_parts: number) =>
    db.inScope(scope, (tx) => tx.run(PROGRESS, [next.id, step, done_parts, all_parts]));
  try {
    const result = await kinds[kind]({ ...next, input, made_by, progress });
    await db.inScope(scope, (tx) => tx.run(END, [next.id, 'done', JSON.stringify(result ?? null)]));
  } catch (error) {
    log.error({ err: error, job: next.id, kind }, 'work in the queue failed');
    await db.inScope(scope, (tx) =>
      tx.run(END, [next.id, 'failed', JSON.stringify({ sentence: SENTENCE_OF_FAULT })]),
    );
  }
  return true;
}

const NOBODY = { workshop_id: null, user_id: null };
const READ = `SELECT kind, input, made_by::text FROM background_job WHERE workshop_id = current_workshop() AND id = $1::uuid`;
const PROGRESS = `UPDATE background_job SET step = $2, done_parts = $3, all_parts = $4, heartbeat_at = now()
  WHERE workshop_id = current_workshop() AND id = $1::uuid`;
const END = `UPDATE background_job SET state = $2, result = $3::jsonb, ended_at = now()
  WHERE workshop_id = current_workshop() AND id = $1::uuid`;
