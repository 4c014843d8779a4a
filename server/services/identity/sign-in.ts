/**
 * Sign-in by e-mail address, password and, where the account has one, second factor. Text, status and time are the
 * same whether or not there is an account.
 */
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import { ProblemError } from '../../problem.ts';
import { FREE_TRIES_OF_ADDRESS, easeBrake, pressBrake, releaseBrake } from './brake.ts';
import { absentHash, isPassword } from './passwords.ts';
import { isSecondFactor } from './second-factor-codes.ts';
import type { NewSession } from './sessions.ts';
import { beginSession } from './sessions.ts';

const account = z.object({ id: z.string(), password_hash: z.string(), second_factor: z.boolean() });

const REFUSED =
  'We could not sign you in. The e-mail address and the password do not belong together. After five failed tries in a row, sign-in pauses for 15 minutes.';

export interface SignInTry {
  readonly email: string;
  readonly password: string;
  readonly code: string | null;
  readonly address: string;
}

/** Signs somebody in, into the workshop where he or she was last. Throws as `proveAccount` does. */
export async function signIn(
  context: Pick<AppContext, 'db' | 'config'>,
  who: SignInTry,
): Promise<NewSession & { user_id: string }> {
  const user_id = await proveAccount(context, who);
  return context.db.inScope({ workshop_id: null, user_id }, async (tx) => {
    const last = await tx.maybe(z.object({ workshop_id: z.string() }), LAST_WORKSHOP, [user_id]);
    return { ...(await beginSession(tx, user_id, last?.workshop_id ?? null)), user_id };
  });
}

/**
 * Whose account it is, where password and code are right. Throws `too_many`, `not_signed_in`, and
 * `second_factor_needed` once the password is right and the code is missing or wrong.
 */
export async function proveAccount(
  { db, config }: Pick<AppContext, 'db' | 'config'>,
  who: SignInTry,
): Promise<string> {
  const byAddress = `address ${who.address}`;
  const found = await db.inScope({ workshop_id: null, user_id: null }, async (tx) => {
    await pressBrake(tx, who.email);
    await pressBrake(tx, byAddress, FREE_TRIES_OF_ADDRESS);
    return tx.maybe(
      account,
      'SELECT id::text, password_hash, totp_secret IS NOT NULL AS second_factor FROM user_account WHERE email = $1',
      [who.email],
    );
  });
  const right = await isPassword(who.password, found?.password_hash ?? absentHash(config.bcrypt_cost));
  if (found === null || !right) throw new ProblemError('not_signed_in', REFUSED);
  await db.inScope({ workshop_id: null, user_id: found.id }, async (tx) => {
    if (found.second_factor && !(who.code !== null && (await isSecondFactor(tx, found.id, who.code))))
      throw codeNeeded(who.code);
    await releaseBrake(tx, who.email);
    await easeBrake(tx, byAddress);
  });
  return found.id;
}

function codeNeeded(code: string | null): ProblemError {
  if (code === null) {
    return new ProblemError(
      'second_factor_needed',
      'This account has a second factor. Enter the code of your authenticator, or a recovery code.',
    );
  }
  const sentence = 'That code is wrong, or was used already. Wait for the next one, and enter that.';
  return new ProblemError('second_factor_needed', sentence, { errors: [{ field: 'code', sentence }] });
}

/** Workshops where the role still holds come first, then the one of the newest session. */
const LAST_WORKSHOP = `SELECT p.workshop_id::text FROM person p
  LEFT JOIN LATERAL (SELECT max(s.made_at) AS at FROM session s WHERE s.user_id = p.user_id AND s.workshop_id = p.workshop_id) s ON true
  WHERE p.user_id = $1::uuid AND p.active
  ORDER BY coalesce(p.until >= current_date, true) DESC, s.at DESC NULLS LAST LIMIT 1`;
