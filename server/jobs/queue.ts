/** Long work in the database's own queue: asked for here, done by the worker, with progress that anybody may look at. */
import { randomUUID } from 'node:crypto';
import type { BackgroundJob, BackgroundJobKind } from '../../shared/schemas/background-job.ts';
import { backgroundJob } from '../../shared/schemas/background-job.ts';
import type { Tx } from '../db/rows.ts';
import { ProblemError } from '../problem.ts';

/** Puts work into the queue; gives its id. */
export async function enqueue(
  tx: Tx,
  kind: BackgroundJobKind,
  input: unknown,
  person_id: string,
): Promise<string> {
  const id = randomUUID();
  await tx.run(
    `INSERT INTO background_job (workshop_id, id, kind, input, made_by)
      VALUES (current_workshop(), $1::uuid, $2, $3::jsonb, $4::uuid)`,
    [id, kind, JSON.stringify(input), person_id],
  );
  return id;
}

/** One piece of work, as it stands. Throws `not_found`. */
export async function backgroundJobById(tx: Tx, id: string): Promise<BackgroundJob> {
  const found = await tx.maybe(backgroundJob, `${SELECT} AND id = $1::uuid`, [id]);
  if (found === null)
    throw new ProblemError('not_found', 'There is no such work in the queue. Start it again.');
  return found;
}

/** The newest work of a kind, newest first. */
export function backgroundJobsOf(tx: Tx, kind: BackgroundJobKind, limit: number): Promise<BackgroundJob[]> {
  return tx.rows(backgroundJob, `${SELECT} AND kind = $1 ORDER BY made_at DESC LIMIT $2`, [kind, limit]);
}

const SELECT = `SELECT id::text, kind, input, state, step, done_parts, all_parts, result, made_by::text,
    to_char(made_at AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"') AS made_at
  FROM background_job WHERE workshop_id = current_workshop()`;
