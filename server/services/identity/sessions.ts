/**
 * Sessions: begun at sign-in, kept alive by a refresh token that changes at every use, ended at once in all processes
 * since every request looks here. A refresh token used twice ends its session: somebody else may have it.
 */
import { randomUUID } from 'node:crypto';
import { ROLES } from '../../../shared/permissions.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Database } from '../../db/database.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import type { SignedIn } from '../../routes/route.ts';
import { hashSecret, newSecret } from './tokens.ts';

/** Idle for eight hours, or older than seven days: sign in again. */
const ALIVE = `s.ended_at IS NULL AND s.rotated_at > now() - interval '8 hours' AND s.made_at > now() - interval '7 days'`;

/** Two tabs may refresh at once; the token before is taken for this long. */
const GRACE = `interval '15 seconds'`;

export interface NewSession {
  readonly session_id: string;
  readonly refresh_token: string;
}

/** Begins a session in a workshop (or in none, for somebody who has no role yet). */
export async function beginSession(tx: Tx, user_id: string, workshop_id: string | null): Promise<NewSession> {
  const session_id = randomUUID();
  const refresh_token = newSecret();
  await tx.run(
    'INSERT INTO session (id, user_id, workshop_id, refresh_hash) VALUES ($1::uuid, $2::uuid, $3::uuid, $4)',
    [session_id, user_id, workshop_id, hashSecret(refresh_token)],
  );
  return { session_id, refresh_token };
}

const found = z.object({ id: z.string(), user_id: z.string(), current: z.boolean(), in_grace: z.boolean() });

/** Changes a refresh token for the next one. Throws `not_signed_in`; a token used again ends its session. */
export async function refreshSession(
  tx: Tx,
  refresh_token: string,
): Promise<{ session_id: string; user_id: string; refresh_token: string | null } | null> {
  const hash = hashSecret(refresh_token);
  const session = await tx.maybe(
    found,
    `SELECT s.id::text, s.user_id::text, s.refresh_hash = $1 AS current, s.rotated_at > now() - ${GRACE} AS in_grace
      FROM session s WHERE (s.refresh_hash = $1 OR s.previous_hash = $1) AND ${ALIVE} FOR UPDATE`,
    [hash],
  );
  if (session === null) return null;
  const { id: session_id, user_id } = session;
  if (!session.current && session.in_grace) return { session_id, user_id, refresh_token: null };
  if (!session.current) {
    await endSession(tx, session_id);
    return null;
  }
  const next = newSecret();
  await tx.run(
    'UPDATE session SET previous_hash = refresh_hash, refresh_hash = $2, rotated_at = now() WHERE id = $1::uuid',
    [session_id, hashSecret(next)],
  );
  return { session_id, user_id, refresh_token: next };
}

const endSession = (tx: Tx, session_id: string): Promise<void> =>
  tx.run('UPDATE session SET ended_at = now() WHERE id = $1::uuid AND ended_at IS NULL', [session_id]);

/** Ends the session that a browser's cookies name, by either of them; gives whose it was, or null where none lives. */
export const endSessionOf = (
  tx: Tx,
  refresh_token: string | null,
  access: { readonly session_id: string } | null,
): Promise<{ user_id: string } | null> =>
  tx.maybe(
    z.object({ user_id: z.string() }),
    `UPDATE session SET ended_at = now() WHERE ended_at IS NULL AND (id = $1::uuid OR refresh_hash = $2 OR previous_hash = $2)
      RETURNING user_id::text`,
    [access?.session_id ?? null, refresh_token === null ? '' : hashSecret(refresh_token)],
  );

/** Ends every session of a user, but for one that may go on. */
export const endSessionsOf = (tx: Tx, user_id: string, but: string | null): Promise<void> =>
  tx.run(
    'UPDATE session SET ended_at = now() WHERE user_id = $1::uuid AND ended_at IS NULL AND id IS DISTINCT FROM $2::uuid',
    [user_id, but],
  );

const signedIn = z.object({
  workshop_id: z.string().nullable(),
  person_id: z.string().nullable(),
  role: z.enum(ROLES).nullable(),
  role_ended: z.boolean().nullable(),
  second_factor_missing: z.boolean().nullable(),
});

/**
 * Who a session is, now: role and workshop as they stand at this request. Null for a session that has ended, and for
 * somebody without a workshop. Throws `role_ended` where the role has ended (an auditor after the end date).
 */
export async function whoIs(db: Database, session_id: string, user_id: string): Promise<SignedIn | null> {
  const [row] = await db.once(
    signedIn,
    'SELECT workshop_id::text, person_id::text, role, role_ended, second_factor_missing FROM who_is($1::uuid, $2::uuid)',
    [session_id, user_id],
  );
  if (row === undefined || row.workshop_id === null || row.person_id === null || row.role === null)
    return null;
  if (row.role_ended === true) {
    throw new ProblemError(
      'role_ended',
      'Your access to this workshop has ended. Ask the proprietor to renew it.',
    );
  }
  return {
    user_id,
    session_id,
    workshop_id: row.workshop_id,
    person_id: row.person_id,
    role: row.role,
    second_factor_missing: row.second_factor_missing === true,
  };
}

/** Puts a session into another workshop in which its user has a role. Throws `not_found` for any other. */
export async function enterWorkshop(
  tx: Tx,
  session_id: string,
  user_id: string,
  workshop_id: string,
): Promise<void> {
  const entered = await tx.maybe(
    z.object({ id: z.string() }),
    `UPDATE session SET workshop_id = $3::uuid WHERE id = $1::uuid AND user_id = $2::uuid AND EXISTS (
       SELECT 1 FROM person p WHERE p.workshop_id = $3::uuid AND p.user_id = $2::uuid AND p.active) RETURNING id::text`,
    [session_id, user_id, workshop_id],
  );
  if (entered === null)
    throw new ProblemError('not_found', 'There is no such workshop. Choose it from the list.');
}
