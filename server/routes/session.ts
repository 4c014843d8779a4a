/** Signing in and out, the session, its refresh, and the switch to another workshop. */
import { enterWorkshopBody, signInBody } from '../../shared/schemas/identity.ts';
import type { AppContext } from '../context.ts';
import { clearCookies, readCookies, setCookies } from '../middleware/cookies.ts';
import { isSecure } from '../middleware/router.ts';
import { ProblemError } from '../problem.ts';
import { checkBody } from '../services/events/check-body.ts';
import { signAccessToken } from '../services/identity/access-token.ts';
import { sessionInfo } from '../services/identity/session-info.ts';
import type { NewSession } from '../services/identity/sessions.ts';
import { beginSession, endSession, enterWorkshop, refreshSession } from '../services/identity/sessions.ts';
import { signIn } from '../services/identity/sign-in.ts';
import type { Call, Route, SignedIn } from './route.ts';

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
      const session = await signIn(call.context, { ...body, address });
      call.context.log.info({ event: 'signed_in', user_id: session.user_id, address }, 'signed in');
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
    async handle({ context, who, response }) {
      if (who !== null) await context.db.inScope(who, (tx) => endSession(tx, who.session_id));
      clearCookies(response, isSecure(context));
      return { status: 204, body: undefined };
    },
  },
  {
    method: 'post',
    path: '/session/refresh',
    allow: 'public',
    summary: 'Gives a new access token for the refresh token.',
    async handle({ context, request, response }) {
      const secure = isSecure(context);
      const { refresh } = readCookies(request, secure);
      const next = refresh === null ? null : await refreshed(context, refresh);
      if (next === null) {
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
    async handle({ context, who, body }) {
      const { workshop_id } = checkBody(enterWorkshopBody, body);
      await context.db.inScope({ workshop_id: null, user_id: who.user_id }, (tx) =>
        enterWorkshop(tx, who.session_id, who.user_id, workshop_id),
      );
      return { status: 204, body: undefined };
    },
  },
];

const refreshed = (context: AppContext, token: string) =>
  context.db.inScope({ workshop_id: null, user_id: null }, (tx) => refreshSession(tx, token));
