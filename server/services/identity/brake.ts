/**
 * The brake on guessing: after five tries without success an account (and, after fifty, an address) pauses for 15
 * minutes, longer with every further one, at most an hour, so that the owner is never locked out for good; a reset by
 * e-mail ends the pause. It stands in the database and so holds in every process. A try is counted before it is
 * checked: many sent at once gain nothing.
 */
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import { hashSecret } from './tokens.ts';

/** Tries before the first pause. One address may serve a whole workshop. */
export const FREE_TRIES = 5;
export const FREE_TRIES_OF_ADDRESS = 50;

const state = z.object({ seconds: z.coerce.number() });

/** Counts a try, and holds back those that come at once. Throws `too_many` while the subject pauses. */
export async function pressBrake(tx: Tx, subject: string, free = FREE_TRIES): Promise<void> {
  const hash = hashSecret(subject);
  await tx.run(
    'INSERT INTO sign_in_brake (subject, failures, last_failure) VALUES ($1, 0, now()) ON CONFLICT (subject) DO NOTHING',
    [hash],
  );
  const { seconds } = await tx.one(
    state,
    `SELECT greatest(0, ceil(extract(epoch FROM coalesce(paused_until, now()) - now())))::text AS seconds
      FROM sign_in_brake WHERE subject = $1 FOR UPDATE`,
    [hash],
  );
  if (seconds > 0) {
    const minutes = Math.ceil(seconds / 60);
    throw new ProblemError('too_many', `Too many tries without success. Try again in ${minutes} min.`, {
      retry_after_s: seconds,
    });
  }
  await tx.run(PRESS, [hash, free]);
}

/** A success forgets the tries before it. */
export async function releaseBrake(tx: Tx, subject: string): Promise<void> {
  await tx.run('DELETE FROM sign_in_brake WHERE subject = $1', [hashSecret(subject)]);
}

/** A success takes its own try back from an address, and leaves what others failed from there. */
export async function easeBrake(tx: Tx, subject: string): Promise<void> {
  await tx.run('UPDATE sign_in_brake SET failures = greatest(failures - 1, 0) WHERE subject = $1', [
    hashSecret(subject),
  ]);
}

const PRESS = `UPDATE sign_in_brake SET
    failures = CASE WHEN last_failure < now() - interval '1 day' THEN 1 ELSE failures + 1 END,
    last_failure = now(),
    paused_until = CASE WHEN last_failure >= now() - interval '1 day' AND failures + 1 >= $2
      THEN now() + least(interval '15 minutes' * (failures + 2 - $2), interval '1 hour') END
  WHERE subject = $1`;
