/**
 * Codes of the second factor: six figures from an authenticator (TOTP, RFC 6238: 30 seconds, one step of tolerance to
 * either side) or a recovery code. Each works once, also where it is sent many times at once.
 */
import { randomBytes } from 'node:crypto';
import { verify } from 'otplib';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { hashSecret } from './tokens.ts';

const TOLERANCE_S = 30;
const RECOVERY_CODES = 10;

/** Without letters and figures that look alike, so that a code copied by hand still works. */
const ALPHABET = '0123456789ABCDEFGHJKMNPQRSTVWXYZ';

const factor = z.object({ totp_secret: z.string().nullable(), last_step: z.coerce.number() });

/** Whether a code is right for a user, and not used before; from now on it is used. */
export async function isSecondFactor(tx: Tx, user_id: string, code: string): Promise<boolean> {
  const found = await tx.maybe(
    factor,
    'SELECT totp_secret, coalesce(totp_last_step, 0)::text AS last_step FROM user_account WHERE id = $1::uuid FOR UPDATE',
    [user_id],
  );
  if (found === null || found.totp_secret === null) return false;
  const figures = code.replace(/\s/g, '');
  if (!/^\d{6}$/.test(figures)) return useRecoveryCode(tx, user_id, code);
  const step = await stepOf(found.totp_secret, figures);
  if (step === null || step <= found.last_step) return false;
  await tx.run('UPDATE user_account SET totp_last_step = $2::bigint WHERE id = $1::uuid', [
    user_id,
    String(step),
  ]);
  return true;
}

/** The 30-second step that a code belongs to, or null for a code that is not right now. */
export async function stepOf(secret: string, figures: string): Promise<number | null> {
  const answer = await verify({ secret, token: figures, epochTolerance: TOLERANCE_S });
  return answer.valid && 'timeStep' in answer ? answer.timeStep : null;
}

async function useRecoveryCode(tx: Tx, user_id: string, code: string): Promise<boolean> {
  const used = await tx.maybe(
    z.object({ id: z.string() }),
    `UPDATE user_account SET recovery_hashes = array_remove(recovery_hashes, $2)
      WHERE id = $1::uuid AND $2 = ANY (recovery_hashes) RETURNING id::text`,
    [user_id, hashSecret(bare(code))],
  );
  return used !== null;
}

/** Ten new codes of 80 random bits, for the person to write down; those before are gone. */
export async function newRecoveryCodes(tx: Tx, user_id: string): Promise<string[]> {
  const codes = Array.from({ length: RECOVERY_CODES }, () =>
    Array.from(randomBytes(16), (byte) => ALPHABET[byte % 32]).join(''),
  );
  await tx.run('UPDATE user_account SET recovery_hashes = $2::text[] WHERE id = $1::uuid', [
    user_id,
    codes.map(hashSecret),
  ]);
  return codes.map((code) => code.match(/.{4}/g)?.join('-') ?? code);
}

const bare = (code: string) => code.toUpperCase().replace(/[^0-9A-Z]/g, '');
