/** Opens a workshop with its first person, who is its proprietor, and the accounts that every book begins with. */
import { randomUUID } from 'node:crypto';
import type { SignUpBody } from '../../../shared/schemas/identity.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import { postRecords } from '../book/post.ts';
import { openStartingAccounts } from '../workshop/starting-accounts.ts';
import { pressBrake } from './brake.ts';
import { checkPassword, hashPassword } from './passwords.ts';
import { giveRole } from './roles.ts';

export interface SignedUp {
  readonly user_id: string;
  readonly workshop_id: string;
  readonly person_id: string;
}

/**
 * Signs a workshop up. Refuses a weak password and a time zone that the database does not know; an address that has an
 * account already is told to sign in first. `at` is a seed's own time.
 */
export async function signUp(
  context: Pick<AppContext, 'db' | 'config'>,
  body: SignUpBody,
  at: Date | null = null,
): Promise<SignedUp> {
  checkPassword(body.password, [body.workshop_name, body.name, body.email.split('@')[0] ?? '']);
  const password_hash = await hashPassword(body.password, context.config.bcrypt_cost);
  const ids = { user_id: randomUUID(), workshop_id: randomUUID(), person_id: randomUUID() };
  await context.db.inScope({ workshop_id: ids.workshop_id, user_id: ids.user_id }, async (tx) => {
    await addUser(tx, { id: ids.user_id, email: body.email, name: body.name, password_hash });
    await tx.run('SELECT open_workshop($1, $2, $3)', [body.workshop_name, body.time_zone, body.currency]);
    const day = (at ?? new Date()).toLocaleDateString('en-CA', { timeZone: body.time_zone });
    const role = giveRole(
      { person_id: ids.person_id, name: body.name, role: 'proprietor', until: null },
      day,
    );
    await postRecords(tx, [role], { person_id: ids.person_id, approved_by: null }, { at });
    await linkPerson(tx, ids.person_id, ids.user_id);
    await openStartingAccounts(tx, ids.person_id, day, at);
  });
  return ids;
}

/** Workshops that one address may open in a row. */
const FREE_SIGN_UPS = 200;

/** Holds back an address that opens workshops without end. Throws `too_many`. */
export const holdSignUps = (context: Pick<AppContext, 'db'>, address: string): Promise<void> =>
  context.db.inScope({ workshop_id: null, user_id: null }, (tx) =>
    pressBrake(tx, `sign-ups from ${address}`, FREE_SIGN_UPS),
  );

export interface NewUser {
  readonly id: string;
  readonly email: string;
  readonly name: string;
  readonly password_hash: string;
}

/** Adds a sign-in account. Throws `conflict` where the address has one. */
export async function addUser(tx: Tx, user: NewUser): Promise<void> {
  const added = await tx.maybe(
    z.object({ id: z.string() }),
    `INSERT INTO user_account (id, email, name, password_hash) VALUES ($1::uuid, $2, $3, $4)
      ON CONFLICT (email) DO NOTHING RETURNING id::text`,
    [user.id, user.email, user.name, user.password_hash],
  );
  if (added !== null) return;
  const sentence =
    'That address can’t be used for a new account. Sign in with it, or have its password reset.';
  throw new ProblemError('conflict', sentence, { errors: [{ field: 'email', sentence }] });
}

/** Links a person of the workshop to the account that signs in as him or her. */
export const linkPerson = (tx: Tx, person_id: string, user_id: string): Promise<void> =>
  tx.run('UPDATE person SET user_id = $2::uuid WHERE workshop_id = current_workshop() AND id = $1::uuid', [
    person_id,
    user_id,
  ]);
