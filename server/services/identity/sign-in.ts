/** Sign-in by e-mail address and password. Text, status and time are the same whether or not there is an account. */
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import { ProblemError } from '../../problem.ts';
import { checkBrake, pressBrake, releaseBrake } from './brake.ts';
import { hashPassword, isPassword } from './passwords.ts';
import type { NewSession } from './sessions.ts';
import { beginSession } from './sessions.ts';
import { newSecret } from './tokens.ts';

const account = z.object({ id: z.string(), password_hash: z.string() });

const REFUSED =
  'We could not sign you in. The e-mail address and the password do not belong together. After five failed tries in a row, sign-in pauses for 15 minutes.';

/** Signs somebody in, into the workshop where he or she was last. Throws `not_signed_in` and `too_many`. */
export async function signIn(
  context: Pick<AppContext, 'db' | 'config'>,
  who: { readonly email: string; readonly password: string; readonly address: string },
): Promise<NewSession & { user_id: string }> {
  const { db, config } = context;
  const nobody = { workshop_id: null, user_id: null };
  const byAddress = `address ${who.address}`;
  const found = await db.inScope(nobody, async (tx) => {
    await checkBrake(tx, [who.email, byAddress]);
    return tx.maybe(account, 'SELECT id::text, password_hash FROM user_account WHERE email = $1', [
      who.email,
    ]);
  });
  const hash = found?.password_hash ?? (await hashPassword(newSecret(), config.bcrypt_cost));
  const right = await isPassword(who.password, hash);
  if (found === null || !right) {
    await db.inScope(nobody, async (tx) => {
      await pressBrake(tx, who.email);
      await pressBrake(tx, byAddress, 'address');
    });
    throw new ProblemError('not_signed_in', REFUSED);
  }
  return db.inScope({ workshop_id: null, user_id: found.id }, async (tx) => {
    await releaseBrake(tx, who.email);
    const last = await tx.maybe(z.object({ workshop_id: z.string() }), LAST_WORKSHOP, [found.id]);
    return { ...(await beginSession(tx, found.id, last?.workshop_id ?? null)), user_id: found.id };
  });
}

const LAST_WORKSHOP = `SELECT p.workshop_id::text FROM person p
  LEFT JOIN LATERAL (SELECT max(s.made_at) AS at FROM session s WHERE s.user_id = p.user_id AND s.workshop_id = p.workshop_id) s ON true
  WHERE p.user_id = $1::uuid AND p.active ORDER BY s.at DESC NULLS LAST LIMIT 1`;
