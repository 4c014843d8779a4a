/** The second factor of one's own account: set up with an authenticator, turned off, and demanded of roles. */
import jwt from 'jsonwebtoken';
import { generateSecret, generateURI } from 'otplib';
import { toDataURL } from 'qrcode';
import type { Role } from '../../../shared/permissions.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import type { SignedIn } from '../../routes/route.ts';
import { ownAccount } from './password-changes.ts';
import { LEAST_CHARACTERS } from './passwords.ts';
import { isSecondFactor, newRecoveryCodes, stepOf } from './second-factor-codes.ts';

const ISSUER = 'grainward';
const AUDIENCE = 'grainward-second-factor';
const SETUP_S = 600;

const setupClaims = z.object({ sub: z.uuid(), secret: z.string() });

/** A new secret for an authenticator. Nothing is kept until its first code comes back. Throws `invalid` for a wrong password. */
export async function beginSecondFactor(context: AppContext, who: SignedIn, password: string) {
  const user = await ownAccount(context, who.user_id, password, 'password');
  const secret = generateSecret();
  const setup = jwt.sign({ secret }, context.config.jwt_secret, {
    algorithm: 'HS256',
    subject: who.user_id,
    issuer: ISSUER,
    audience: AUDIENCE,
    expiresIn: SETUP_S,
  });
  const qr = await toDataURL(generateURI({ issuer: 'Grainward', label: user.email, secret }));
  return { setup, secret, qr };
}

/** Turns the second factor on by its first code; gives the recovery codes, once. Throws `invalid`, `already_done`. */
export async function turnOnSecondFactor(
  context: AppContext,
  who: SignedIn,
  body: { setup: string; code: string },
): Promise<{ recovery_codes: string[] }> {
  const secret = readSetup(context.config.jwt_secret, body.setup, who.user_id);
  const step = await stepOf(secret, body.code.replace(/\s/g, '').padStart(6, '0').slice(0, 6));
  if (step === null) throw wrongCode();
  return context.db.inScope(who, async (tx) => {
    const on = await tx.maybe(
      z.object({ id: z.string() }),
      `UPDATE user_account SET totp_secret = $2, totp_last_step = $3::bigint WHERE id = $1::uuid AND totp_secret IS NULL
        RETURNING id::text`,
      [who.user_id, secret, String(step)],
    );
    if (on === null)
      throw new ProblemError(
        'already_done',
        'The second factor is on already. Turn it off before a new one.',
      );
    return { recovery_codes: await newRecoveryCodes(tx, who.user_id) };
  });
}

/**
 * Turns it off, by password and code. Refuses where the role here demands it, and where the password is too short to
 * stand alone.
 */
export async function turnOffSecondFactor(
  context: AppContext,
  who: SignedIn,
  body: { password: string; code: string },
): Promise<void> {
  await ownAccount(context, who.user_id, body.password, 'password');
  if (Array.from(body.password).length < LEAST_CHARACTERS) {
    const sentence = `Without a second factor a password has at least ${LEAST_CHARACTERS} characters. Change it first.`;
    throw new ProblemError('invalid', sentence, { errors: [{ field: 'password', sentence }] });
  }
  await context.db.inScope(who, async (tx) => {
    if ((await rolesWithSecondFactor(tx)).includes(who.role)) {
      throw new ProblemError(
        'conflict',
        `This workshop asks every ${who.role} for a second factor. Ask the proprietor before you turn yours off.`,
      );
    }
    if (!(await isSecondFactor(tx, who.user_id, body.code))) throw wrongCode();
    await tx.run(
      `UPDATE user_account SET totp_secret = NULL, totp_last_step = NULL, recovery_hashes = '{}' WHERE id = $1::uuid`,
      [who.user_id],
    );
  });
}

/** New recovery codes, by password and code; those before are gone. */
export async function renewRecoveryCodes(
  context: AppContext,
  who: SignedIn,
  body: { password: string; code: string },
): Promise<{ recovery_codes: string[] }> {
  await ownAccount(context, who.user_id, body.password, 'password');
  return context.db.inScope(who, async (tx) => {
    if (!(await isSecondFactor(tx, who.user_id, body.code))) throw wrongCode();
    return { recovery_codes: await newRecoveryCodes(tx, who.user_id) };
  });
}

/** Demands a second factor of roles. Refuses to demand of oneself what one has not set up. */
export async function demandSecondFactor(
  context: AppContext,
  who: SignedIn,
  roles: readonly Role[],
): Promise<void> {
  await context.db.inScope(who, async (tx) => {
    const me = await tx.one(
      z.object({ second_factor: z.boolean() }),
      'SELECT totp_secret IS NOT NULL AS second_factor FROM user_account WHERE id = $1::uuid',
      [who.user_id],
    );
    if (roles.includes(who.role) && !me.second_factor)
      throw new ProblemError(
        'conflict',
        'You have no second factor yourself. Set yours up first, under “My account”.',
      );
    await tx.run(
      'UPDATE workshop SET second_factor_roles = $1::text[] WHERE workshop_id = current_workshop()',
      [[...new Set(roles)]],
    );
  });
}

async function rolesWithSecondFactor(tx: Tx): Promise<readonly string[]> {
  const { second_factor_roles } = await tx.one(
    z.object({ second_factor_roles: z.array(z.string()) }),
    'SELECT second_factor_roles FROM workshop WHERE workshop_id = current_workshop()',
  );
  return second_factor_roles;
}

/** The secret that a setup carries. Throws `invalid` for one that is not this user's, not ours, or has run out. */
function readSetup(jwt_secret: string, setup: string, user_id: string): string {
  try {
    const read = jwt.verify(setup, jwt_secret, {
      algorithms: ['HS256'],
      issuer: ISSUER,
      audience: AUDIENCE,
      subject: user_id,
    });
    return setupClaims.parse(read).secret;
  } catch {
    throw new ProblemError(
      'invalid',
      'The setting up has run out. Begin again, and enter the code within ten minutes.',
    );
  }
}

function wrongCode(): ProblemError {
  const sentence = 'That code is wrong, or was used already. Wait for the next one, and enter that.';
  return new ProblemError('invalid', sentence, { errors: [{ field: 'code', sentence }] });
}
