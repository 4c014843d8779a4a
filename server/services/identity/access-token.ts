/**
 * The short-lived access token: who has signed in, in which session. One fixed algorithm, audience and purpose; what
 * somebody may do is read from the database at every request and never from the token.
 */
import jwt from 'jsonwebtoken';
import { z } from '../../../shared/schemas/zod.ts';

/** Ten minutes; then the refresh token gives a new one. */
export const ACCESS_TOKEN_S = 600;
const ISSUER = 'grainward';
const AUDIENCE = 'grainward-session';

const claims = z.object({ sub: z.uuid(), sid: z.uuid() });

export function signAccessToken(secret: string, user_id: string, session_id: string): string {
  return jwt.sign({ sid: session_id }, secret, {
    algorithm: 'HS256',
    subject: user_id,
    issuer: ISSUER,
    audience: AUDIENCE,
    expiresIn: ACCESS_TOKEN_S,
    notBefore: 0,
  });
}

/** The session that a token names, or null for a token that is not ours, not yet or no longer valid. */
export function readAccessToken(
  secret: string,
  token: string,
): { user_id: string; session_id: string } | null {
  try {
    const read = jwt.verify(token, secret, { algorithms: ['HS256'], issuer: ISSUER, audience: AUDIENCE });
    const { sub, sid } = claims.parse(read);
    return { user_id: sub, session_id: sid };
  } catch {
    return null;
  }
}
