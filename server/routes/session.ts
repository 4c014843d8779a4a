/** Signing in and out, the session, its refresh, and the switch to another workshop. */
import { enterWorkshopBody, signInBody } from '../../shared/schemas/identity.ts';
import type { AppContext } from '../context.ts';
import { clearCookies, readCookies, setCookies } from '../middleware/cookies.ts';
import { isSecure } from '../middleware/router.ts';
import { ProblemError } from '../problem.ts';
import { securityEvent } from '../security-log.ts';
import { checkBody } from '../services/events/check-body.ts';
import { readAccessToken, signAccessToken } from '../services/identity/access-token.ts';
import { sessionInfo } from '../services/identity/session-info.ts';
import type { NewSession } from '../services/identity/sessions.ts';
import { beginSession, endSessionOf, enterWorkshop, refreshSession } from '../services/identity/sessions.ts';
import { signIn } from '../services/identity/sign-in.ts';
import { hashSecret } from '../services/identity/tokens.ts';
import type { Call, Route, SignedIn } from './route.ts';

const NOBODY = { workshop_id: null, user_id: null };

/** Gives the browser a session that has begun. */
export function giveSession(
  call: Call<SignedIn | null>,
  session: NewSession & { readonly user_id: string },
): void {
  const { config } = call.context;
  const access = signAccessToken(config.jwt_secret, session.user_id, session.session_id);
  setCookies(call.response, isSecure(call.context), access, session.refresh_token);
}

/** Begins a session for somebody who has just proved who he or she is. */
export async function beginAndGive(
  call: Call<SignedIn | null>,
  who: { user_id: string; workshop_id: string },
): Promise<void> {
  const session = await call.context.db.inScope({ workshop_id: null, user_id: who.user_id }, (tx) =>
    beginSession(tx, who.user_id, who.workshop_id),
  );
  giveSession(call, { ...session, user_id: who.user_id });
}

export const sessionRoutes: readonly Route[] = [
  {
    method: 'post',
    path: '/session',
    allow: 'public',
    summary: 'Signs in.',
    async handle(call) {
      const body = checkBody(signInBody, call.body);
      const address = call.request.ip ?? '';
      const session = await signIn(call.context, { ...body, address }).catch((error: unknown) => {
        securityEvent(call, 'sign_in_refused', {
          account: hashSecret(body.email).slice(0, 16),
          code: error instanceof ProblemError ? error.code : 'failed',
        });
        throw error;
      });
      securityEvent({ ...call, who: session }, 'signed_in');
      giveSession(call, session);
      return { status: 204, body: undefined };
    },
  },
  {
    method: 'get',
    path: '/session',
    allow: 'session.read',
    summary: 'Who is signed in, where, and what he or she may do.',
    handle: async ({ context, who }) => ({ body: await sessionInfo(context, who) }),
  },
  {
    method: 'delete',
    path: '/session',
    allow: 'public',
    summary: 'Signs out.',
    async handle(call) {
      const { context, request, response } = call;
      const secure = isSecure(context);
      const { access, refresh } = readCookies(request, secure);
      const ended = await context.db.inScope(NOBODY, (tx) =>
        endSessionOf(
          tx,
          refresh,
          access === null ? null : readAccessToken(context.config.jwt_secret, access),
        ),
      );
      if (ended !== null) securityEvent({ ...call, who: ended }, 'signed_out');
      clearCookies(response, secure);
      return { status: 204, body: undefined };
    },
  },
  {
    method: 'post',
    path: '/session/refresh',
    allow: 'public',
    summary: 'Gives a new access token for the refresh token.',
    async handle(call) {
      const { context, request, response } = call;
      const secure = isSecure(context);
      const { refresh } = readCookies(request, secure);
      const next = refresh === null ? null : await refreshed(context, refresh);
      if (next === null) {
        if (refresh !== null) securityEvent(call, 'refresh_refused');
        clearCookies(response, secure);
        throw new ProblemError(
          'not_signed_in',
          'Your session has ended. Sign in again; what you typed is kept.',
        );
      }
      const access = signAccessToken(context.config.jwt_secret, next.user_id, next.session_id);
      setCookies(response, secure, access, next.refresh_token);
      return { status: 204, body: undefined };
    },
  },
  {
    method: 'post',
    path: '/session/workshop',
    allow: 'session.read',
    summary: 'Goes into another workshop in which one has a role.',
    async handle(call) {
      const { context, who } = call;
      const { workshop_id } = checkBody(enterWorkshopBody, call.body);
      await context.db.inScope({ workshop_id: null, user_id: who.user_id }, (tx) =>
        enterWorkshop(tx, who.session_id, who.user_id, workshop_id),
      );
      securityEvent(call, 'workshop_entered', { entered: workshop_id });
      return { status: 204, body: undefined };
    },
  },
];

const refreshed = (context: AppContext, token: string) =>
  context.db.inScope(NOBODY, (tx) => refreshSession(tx, token));
