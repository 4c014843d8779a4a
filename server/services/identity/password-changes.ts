/** Changing a password, by the old one or by a one-time link. Every other session of the account ends at once. */
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import { FREE_TRIES_OF_ADDRESS, pressBrake, releaseBrake } from './brake.ts';
import { checkPassword, hashPassword, isPassword } from './passwords.ts';
import { endSessionsOf } from './sessions.ts';
import { hashSecret, newSecret } from './tokens.ts';

const NOBODY = { workshop_id: null, user_id: null };
const account = z.object({
  id: z.string(),
  email: z.string(),
  name: z.string(),
  password_hash: z.string(),
  second_factor: z.boolean(),
});

const ACCOUNT =
  'SELECT id::text, email, name, password_hash, totp_secret IS NOT NULL AS second_factor FROM user_account WHERE id = ';
const BY_LINK = `${ACCOUNT} (SELECT user_id FROM password_reset WHERE token_hash = $1 AND used_at IS NULL AND expires_at > now())`;

/**
 * Sends a one-time link, where the address has an account; says the same, as soon, where it has none. Throws `too_many`
 * for an address that was asked for too often.
 */
export async function askForReset(context: AppContext, email: string, address: string): Promise<void> {
  const token = newSecret();
  const asked = await context.db.inScope(NOBODY, async (tx) => {
    await pressBrake(tx, `reset ${email}`);
    await pressBrake(tx, `resets from ${address}`, FREE_TRIES_OF_ADDRESS);
    return tx.maybe(
      z.object({ user_id: z.string() }),
      `INSERT INTO password_reset (token_hash, user_id, expires_at)
        SELECT $1, id, now() + interval '1 hour' FROM user_account WHERE email = $2 RETURNING user_id::text`,
      [hashSecret(token), email],
    );
  });
  if (asked === null) return;
  // Not waited for: how long a mail server takes must not tell that there is an account.
  void context.mail.send({
    to: email,
    subject: 'A new password for Grainward',
    lines: [
      'Somebody, most likely you, asked for a new password. Open this link within an hour; it works once.',
      'If it was not you, nothing has changed and nothing needs doing.',
    ],
    link: `${context.publicUrl()}/reset#${token}`,
  });
}

/**
 * Sets a new password by a link, and ends what paused sign-in; gives whose it is. Throws `not_found` for a link that was
 * used, has run out, or never was. A weak password is refused without using the link up.
 */
export async function completeReset(
  context: AppContext,
  body: { token: string; password: string },
): Promise<{ user_id: string }> {
  const open = await context.db.inScope(NOBODY, (tx) => tx.maybe(account, BY_LINK, [hashSecret(body.token)]));
  if (open === null) throw linkGone();
  checkPassword(body.password, await namesOf(context, open), open.second_factor);
  const password_hash = await hashPassword(body.password, context.config.bcrypt_cost);
  await context.db.inScope(NOBODY, async (tx) => {
    const used = await tx.maybe(
      z.object({ user_id: z.string() }),
      `UPDATE password_reset SET used_at = now() WHERE token_hash = $1 AND used_at IS NULL AND expires_at > now()
        RETURNING user_id::text`,
      [hashSecret(body.token)],
    );
    if (used === null) throw linkGone();
    await setPassword(tx, open.id, password_hash);
    await endSessionsOf(tx, open.id, null);
    await releaseBrake(tx, open.email);
    await releaseBrake(tx, `reset ${open.email}`);
  });
  return { user_id: open.id };
}

/** Changes one's own password; the session at hand goes on. Throws `invalid` for a wrong current one. */
export async function changePassword(
  context: AppContext,
  who: { readonly user_id: string; readonly session_id: string },
  body: { current: string; password: string },
): Promise<void> {
  const user = await ownAccount(context, who.user_id, body.current, 'current');
  checkPassword(body.password, await namesOf(context, user), user.second_factor);
  const password_hash = await hashPassword(body.password, context.config.bcrypt_cost);
  await context.db.inScope({ workshop_id: null, user_id: who.user_id }, async (tx) => {
    await setPassword(tx, who.user_id, password_hash);
    await endSessionsOf(tx, who.user_id, who.session_id);
  });
}

/**
 * One's own account, after its password was given again. Throws `invalid` beside `field` for a wrong one, and
 * `too_many` after five: whoever found a session open shall not guess here either.
 */
export async function ownAccount(context: AppContext, user_id: string, password: string, field: string) {
  const scope = { workshop_id: null, user_id };
  const brake = `own password of ${user_id}`;
  const user = await context.db.inScope(scope, async (tx) => {
    await pressBrake(tx, brake);
    return tx.one(account, `${ACCOUNT} $1::uuid`, [user_id]);
  });
  if (await isPassword(password, user.password_hash)) {
    await context.db.inScope(scope, (tx) => releaseBrake(tx, brake));
    return user;
  }
  const sentence = 'That is not your password. Try again.';
  throw new ProblemError('invalid', sentence, { errors: [{ field, sentence }] });
}

/** Names that the own password must not be made of: the user's, and those of the workshops that he or she is in. */
async function namesOf(
  context: AppContext,
  user: { id: string; name: string; email: string },
): Promise<string[]> {
  const workshops = await context.db.inScope({ workshop_id: null, user_id: user.id }, (tx) =>
    tx.rows(z.object({ name: z.string() }), 'SELECT name FROM workshop LIMIT 100'),
  );
  return [user.name, user.email.split('@')[0] ?? '', ...workshops.map(({ name }) => name)];
}

const setPassword = (tx: Tx, user_id: string, password_hash: string): Promise<void> =>
  tx.run('UPDATE user_account SET password_hash = $2 WHERE id = $1::uuid', [user_id, password_hash]);

const linkGone = () => new ProblemError('not_found', 'This link was used or has run out. Ask for a new one.');
