/**
 * The brake on guessing: after five failures in a row an account (and an address) pauses for 15 minutes, longer with
 * every further one, at most an hour, so that the owner is never locked out for good. It works in every process, since
 * it stands in the database.
 */
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import { hashSecret } from './tokens.ts';

const FREE_TRIES = 5;
/** One address may serve a whole workshop. */
const FREE_TRIES_OF_ADDRESS = 50;

/** Throws `too_many` while a subject pauses. */
export async function checkBrake(tx: Tx, subjects: readonly string[]): Promise<void> {
  const paused = await tx.maybe(
    z.object({ seconds: z.coerce.number() }),
    `SELECT ceil(extract(epoch FROM max(paused_until) - now()))::text AS seconds FROM sign_in_brake
      WHERE subject = ANY ($1::text[]) AND paused_until > now() HAVING max(paused_until) IS NOT NULL`,
    [subjects.map(hashSecret)],
  );
  if (paused === null) return;
  const minutes = Math.ceil(paused.seconds / 60);
  throw new ProblemError('too_many', `Sign-in pauses after failed tries. Try again in ${minutes} min.`, {
    retry_after_s: paused.seconds,
  });
}

/** Counts a failure for an account or address. */
export async function pressBrake(
  tx: Tx,
  subject: string,
  kind: 'account' | 'address' = 'account',
): Promise<void> {
  await tx.run(PRESS, [hashSecret(subject), kind === 'account' ? FREE_TRIES : FREE_TRIES_OF_ADDRESS]);
}

/** A success forgets the failures before it. */
export async function releaseBrake(tx: Tx, subject: string): Promise<void> {
  await tx.run('DELETE FROM sign_in_brake WHERE subject = $1', [hashSecret(subject)]);
}

const PRESS = `INSERT INTO sign_in_brake AS b (subject, failures, last_failure) VALUES ($1, 1, now())
  ON CONFLICT (subject) DO UPDATE SET
    failures = CASE WHEN b.last_failure < now() - interval '1 day' THEN 1 ELSE b.failures + 1 END,
    last_failure = now(),
    paused_until = CASE WHEN b.last_failure >= now() - interval '1 day' AND b.failures + 1 >= $2
      THEN now() + least(interval '15 minutes' * (b.failures + 2 - $2), interval '1 hour') END`;
