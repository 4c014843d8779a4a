/** Invitations: a one-time link by e-mail, for a role in a workshop. Nobody else ever learns the password. */
import { randomUUID } from 'node:crypto';
import { ROLES } from '../../../shared/permissions.ts';
import type { InvitationBody } from '../../../shared/schemas/identity.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import { postRecords } from '../book/post.ts';
import type { PersonInWorkshop } from '../events/person.ts';
import { checkPassword, hashPassword } from './passwords.ts';
import { giveRole, workshopToday } from './roles.ts';
import { proveAccount } from './sign-in.ts';
import { addUser, linkPerson } from './sign-up.ts';
import { hashSecret, newSecret } from './tokens.ts';

const DAYS_OPEN = 7;

/** Invites somebody; the e-mail goes out after the transaction. Refuses an auditor without an end date. */
export async function invite(
  context: AppContext,
  body: InvitationBody,
  by: PersonInWorkshop,
): Promise<{ id: string }> {
  if (body.role === 'auditor' && body.until === null) {
    const sentence = 'An auditor reads until a set date. Enter the last day of the access.';
    throw new ProblemError('invalid', sentence, { errors: [{ field: 'until', sentence }] });
  }
  const id = randomUUID();
  const token = newSecret();
  const { name } = await context.db.inScope({ workshop_id: by.workshop_id, user_id: null }, async (tx) => {
    await tx.run(INVITE, [id, body.email, body.name, body.role, body.until, hashSecret(token), by.person_id]);
    return tx.one(WORKSHOP_NAME.row, WORKSHOP_NAME.sql);
  });
  await context.mail.send({
    to: body.email,
    subject: `${name} invites you to its book of metal, as ${body.role}`,
    lines: [
      `${body.name}, ${name} has invited you to Grainward as ${body.role}.`,
      `Open this link within ${DAYS_OPEN} days and set your password. It works once.`,
    ],
    link: `${context.publicUrl()}/invitation#${token}`,
  });
  return { id };
}

const INVITE = `INSERT INTO invitation (workshop_id, id, email, name, role, until, token_hash, invited_by, expires_at)
  VALUES (current_workshop(), $1::uuid, $2, $3, $4, $5::date, $6, $7::uuid, now() + interval '${DAYS_OPEN} days')`;
const WORKSHOP_NAME = {
  row: z.object({ name: z.string() }),
  sql: 'SELECT name FROM workshop WHERE workshop_id = current_workshop()',
};

const invitation = z.object({
  workshop_id: z.string(),
  id: z.string(),
  email: z.string(),
  name: z.string(),
  role: z.enum(ROLES),
  until: z.string().nullable(),
});

/** What a link is for. Throws `not_found` for one that was used, has run out, or never was. */
export async function invitationByToken(context: AppContext, token: string) {
  return context.db.inScope({ workshop_id: null, user_id: null }, async (tx) => {
    await tx.run("SELECT set_config('grainward.token_hash', $1, true)", [hashSecret(token)]);
    const found = await tx.maybe(
      invitation,
      `SELECT workshop_id::text, id::text, email, name, role, until::text FROM invitation
        WHERE token_hash = $1 AND used_at IS NULL AND expires_at > now()`,
      [hashSecret(token)],
    );
    if (found === null)
      throw new ProblemError('not_found', 'This invitation was used or has run out. Ask for a new one.');
    const account = await tx.maybe(
      z.object({ id: z.string() }),
      'SELECT id::text FROM user_account WHERE email = $1',
      [found.email],
    );
    return { ...found, account };
  });
}

/** The name of the workshop that invites. */
export async function workshopName(context: AppContext, workshop_id: string): Promise<string> {
  const { name } = await context.db.inScope({ workshop_id, user_id: null }, (tx) =>
    tx.one(WORKSHOP_NAME.row, WORKSHOP_NAME.sql),
  );
  return name;
}

/**
 * Takes an invitation: a new account with the password given, or, where the address has an account, by that account's
 * own password and second factor. Gives whom to sign in, and where.
 */
export async function acceptInvitation(
  context: AppContext,
  body: { token: string; password: string; code: string | null },
  address: string,
): Promise<{ user_id: string; workshop_id: string }> {
  const found = await invitationByToken(context, body.token);
  const { workshop_id, email, name } = found;
  if (found.account !== null) {
    const user_id = await proveAccount(context, { email, password: body.password, code: body.code, address });
    await context.db.inScope({ workshop_id, user_id }, (tx) => takeInvitation(tx, found, user_id));
    return { user_id, workshop_id };
  }
  checkPassword(body.password, [name, email.split('@')[0] ?? '', await workshopName(context, workshop_id)]);
  const password_hash = await hashPassword(body.password, context.config.bcrypt_cost);
  const user_id = randomUUID();
  await context.db.inScope({ workshop_id, user_id }, async (tx) => {
    await addUser(tx, { id: user_id, email, name, password_hash });
    await takeInvitation(tx, found, user_id);
  });
  return { user_id, workshop_id };
}

/** Uses the link up and gives the role, to the person that the account was here before, or to a new one. */
async function takeInvitation(tx: Tx, found: z.output<typeof invitation>, user_id: string): Promise<void> {
  const taken = await tx.maybe(
    z.object({ invited_by: z.string() }),
    `UPDATE invitation SET used_at = now() WHERE workshop_id = current_workshop() AND id = $1::uuid AND used_at IS NULL
      RETURNING invited_by::text`,
    [found.id],
  );
  if (taken === null)
    throw new ProblemError('not_found', 'This invitation was used or has run out. Ask for a new one.');
  const before = await tx.maybe(
    z.object({ id: z.string() }),
    'SELECT id::text FROM person WHERE workshop_id = current_workshop() AND user_id = $1::uuid',
    [user_id],
  );
  const person_id = before?.id ?? randomUUID();
  const { name, role, until } = found;
  const draft = giveRole({ person_id, name, role, until }, await workshopToday(tx));
  await postRecords(tx, [draft], { person_id: taken.invited_by, approved_by: null });
  await linkPerson(tx, person_id, user_id);
}
