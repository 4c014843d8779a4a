/** Changing a password, by the old one or by a one-time link. Every other session of the account ends at once. */
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import { ProblemError } from '../../problem.ts';
import { checkPassword, hashPassword, isPassword } from './passwords.ts';
import { endSessionsOf } from './sessions.ts';
import { hashSecret, newSecret } from './tokens.ts';

const NOBODY = { workshop_id: null, user_id: null };
const account = z.object({ id: z.string(), email: z.string(), name: z.string(), password_hash: z.string() });

/** Sends a one-time link, where the address has an account; says the same where it has none. */
export async function askForReset(context: AppContext, email: string): Promise<void> {
  const token = newSecret();
  const asked = await context.db.inScope(NOBODY, (tx) =>
    tx.maybe(
      z.object({ user_id: z.string() }),
      `INSERT INTO password_reset (token_hash, user_id, expires_at)
        SELECT $1, id, now() + interval '1 hour' FROM user_account WHERE email = $2 RETURNING user_id::text`,
      [hashSecret(token), email],
    ),
  );
  if (asked === null) return;
  await context.mail.send({
    to: email,
    subject: 'A new password for Grainward',
    lines: [
      'Somebody, most likely you, asked for a new password. Open this link within an hour; it works once.',
      'If it was not you, nothing has changed and nothing needs doing.',
    ],
    link: `${context.publicUrl()}/reset#${token}`,
  });
}

/** Sets a new password by a link. Throws `not_found` for one that was used, has run out, or never was. */
export async function completeReset(
  context: AppContext,
  body: { token: string; password: string },
): Promise<void> {
  checkPassword(body.password, []);
  const password_hash = await hashPassword(body.password, context.config.bcrypt_cost);
  await context.db.inScope(NOBODY, async (tx) => {
    const used = await tx.maybe(
      z.object({ user_id: z.string() }),
      `UPDATE password_reset SET used_at = now() WHERE token_hash = $1 AND used_at IS NULL AND expires_at > now()
        RETURNING user_id::text`,
      [hashSecret(body.token)],
    );
    if (used === null)
      throw new ProblemError('not_found', 'This link was used or has run out. Ask for a new one.');
    await tx.run('UPDATE user_account SET password_hash = $2 WHERE id = $1::uuid', [
      used.user_id,
      password_hash,
    ]);
    await endSessionsOf(tx, used.user_id, null);
  });
}

/** Changes one's own password; the session at hand goes on. Throws `invalid` for a wrong current one. */
export async function changePassword(
  context: AppContext,
  who: { readonly user_id: string; readonly session_id: string },
  body: { current: string; password: string },
): Promise<void> {
  const user = await ownAccount(context, who.user_id, body.current, 'current');
  checkPassword(body.password, [user.name, user.email.split('@')[0] ?? '']);
  const password_hash = await hashPassword(body.password, context.config.bcrypt_cost);
  await context.db.inScope({ workshop_id: null, user_id: who.user_id }, async (tx) => {
    await tx.run('UPDATE user_account SET password_hash = $2 WHERE id = $1::uuid', [
      who.user_id,
      password_hash,
    ]);
    await endSessionsOf(tx, who.user_id, who.session_id);
  });
}

/** One's own account, after its password was given again. Throws `invalid` beside `field` for a wrong one. */
export async function ownAccount(context: AppContext, user_id: string, password: string, field: string) {
  const user = await context.db.inScope({ workshop_id: null, user_id }, (tx) =>
    tx.one(account, 'SELECT id::text, email, name, password_hash FROM user_account WHERE id = $1::uuid', [
      user_id,
    ]),
  );
  if (await isPassword(password, user.password_hash)) return user;
  const sentence = 'That is not your password. Try again.';
  throw new ProblemError('invalid', sentence, { errors: [{ field, sentence }] });
}
