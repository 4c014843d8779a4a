/** The handover PIN: set with the own password, hashed like one, and paused after five wrong tries. */
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import { ProblemError } from '../../problem.ts';
import type { SignedIn } from '../../routes/route.ts';
import { ownAccount } from './password-changes.ts';
import { hashPassword, isPassword } from './passwords.ts';

const row = z.object({ name: z.string(), pin_hash: z.string().nullable() });

/** Sets one's own PIN. Throws `invalid` for a wrong password. */
export async function setPin(
  context: AppContext,
  who: SignedIn,
  body: { password: string; pin: string },
): Promise<void> {
  await ownAccount(context, who.user_id, body.password, 'password');
  const pin_hash = await hashPassword(body.pin, context.config.bcrypt_cost);
  await context.db.inScope(who, (tx) =>
    tx.run(
      `UPDATE person SET pin_hash = $2, pin_failures = 0, pin_paused_until = NULL
        WHERE workshop_id = current_workshop() AND id = $1::uuid`,
      [who.person_id, pin_hash],
    ),
  );
}

/**
 * Checks a PIN that somebody types at the counter. A try is counted before it is checked, in a transaction of its own:
 * many at once gain nothing, and a refused act doesn't undo the count. Throws `wrong_pin`, and `too_many` after five wrong tries, for 15 minutes.
 */
export async function checkPin(
  context: AppContext,
  workshop_id: string,
  person_id: string,
  pin: string,
): Promise<void> {
  const scope = { workshop_id, user_id: null };
  const person = await context.db.inScope(scope, (tx) => tx.maybe(row, READ, [person_id]));
  if (person === null) throw new ProblemError('not_found', 'There is no such person here.');
  if (person.pin_hash === null) {
    throw new ProblemError(
      'wrong_pin',
      `${person.name} has set no PIN yet. Acknowledge it in the own session, and set one there.`,
    );
  }
  const counted = await context.db.inScope(scope, (tx) =>
    tx.maybe(z.object({ id: z.string() }), COUNT, [person_id]),
  );
  if (counted === null) {
    throw new ProblemError(
      'too_many',
      `The PIN of ${person.name} pauses after five wrong tries. Acknowledge it in the own session instead.`,
      { retry_after_s: 900 },
    );
  }
  if (!(await isPassword(pin, person.pin_hash)))
    throw new ProblemError('wrong_pin', `That PIN does not belong to ${person.name}.`);
  await context.db.inScope(scope, (tx) => tx.run(FORGET, [person_id]));
}

const READ = `SELECT name, pin_hash FROM person
  WHERE workshop_id = current_workshop() AND id = $1::uuid AND active`;
const FORGET = `UPDATE person SET pin_failures = 0, pin_paused_until = NULL
  WHERE workshop_id = current_workshop() AND id = $1::uuid AND pin_failures > 0`;
const COUNT = `UPDATE person SET pin_failures = pin_failures + 1,
    pin_paused_until = CASE WHEN pin_failures + 1 >= 5 THEN now() + interval '15 minutes' END
  WHERE workshop_id = current_workshop() AND id = $1::uuid AND coalesce(pin_paused_until <= now(), true)
  RETURNING id::text`;
