/**
 * Makes the Express router from the table of routes. It finds out who asks, denies what the table doesn't allow, and
 * tells what is refused in the log.
 */
import { Router } from 'express';
import type { Request } from 'express';
import { may } from '../../shared/permissions.ts';
import { z } from '../../shared/schemas/zod.ts';
import type { AppContext } from '../context.ts';
import { ProblemError } from '../problem.ts';
import { securityEvent } from '../security-log.ts';
import type { Route, SignedIn } from '../routes/route.ts';
import { readAccessToken } from '../services/identity/access-token.ts';
import { whoIs } from '../services/identity/sessions.ts';
import { readCookies } from './cookies.ts';

const text = z.record(z.string(), z.string());
const query = z.record(z.string(), z.unknown());

/** Whether the people's side of this server is https: then cookies carry Secure and the __Host- prefix. */
export const isSecure = (context: AppContext): boolean => context.publicUrl().startsWith('https:');

export function apiRouter(context: AppContext, routes: readonly Route[]): Router {
  const router = Router();
  const methods = new Map<string, Set<string>>();
  for (const route of routes) {
    router[route.method](route.path, async (request, response) => {
      const who = await signedIn(context, request, route.allow !== 'public');
      const call = {
        context,
        params: text.parse(request.params),
        query: query.parse(request.query),
        body: z.unknown().parse(request.body),
        request,
        response,
      };
      const answer =
        route.allow === 'public'
          ? await route.handle({ ...call, who })
          : await route.handle({ ...call, who: permitted(context, request, route, who) });
      if (answer === null) return;
      if (answer.body === undefined) response.status(answer.status ?? 204).end();
      else response.status(answer.status ?? 200).json(answer.body);
    });
    methods.set(route.path, new Set([...(methods.get(route.path) ?? []), route.method]));
  }
  for (const [path, known] of methods) {
    router.all(path, (_request, response) => {
      response.setHeader('Allow', [...known].join(', ').toUpperCase());
      throw new ProblemError('wrong_method', `Here only ${[...known].join(', ')} is answered.`);
    });
  }
  return router;
}

async function signedIn(context: AppContext, request: Request, needed: boolean): Promise<SignedIn | null> {
  const { access } = readCookies(request, isSecure(context));
  const token = access === null ? null : readAccessToken(context.config.jwt_secret, access);
  if (token === null) {
    if (access !== null && needed) securityEvent({ context, request, who: null }, 'token_refused');
    return null;
  }
  return needed ? whoIs(context.db, token.session_id, token.user_id) : whoIsOrNull(context, token);
}

/** On a public route a role that has ended is no reason to refuse (one may still sign out). */
async function whoIsOrNull(
  context: AppContext,
  token: { session_id: string; user_id: string },
): Promise<SignedIn | null> {
  try {
    return await whoIs(context.db, token.session_id, token.user_id);
  } catch (error) {
    if (error instanceof ProblemError) return null;
    throw error;
  }
}

/**
 * Whether who asks may. A page names the person that it was opened as: where another tab has signed somebody else in,
 * or has gone into another workshop, nothing is read or written as the wrong one.
 */
function permitted(
  context: AppContext,
  request: Request,
  route: Exclude<Route, { allow: 'public' }>,
  who: SignedIn | null,
): SignedIn {
  if (who === null) throw new ProblemError('not_signed_in', 'Sign in first. What you typed is kept.');
  const opened_as = request.get('x-grainward-person');
  if (opened_as !== undefined && opened_as !== who.person_id) {
    throw new ProblemError(
      'other_person',
      'This page was opened as somebody else, or in another workshop. Nothing was posted; load the page again.',
    );
  }
  if (who.second_factor_missing && route.allow !== 'session.read') {
    throw new ProblemError(
      'second_factor_required',
      `This workshop asks every ${who.role} for a second factor. Set yours up under “My account”.`,
    );
  }
  if (!may(who.role, route.allow)) {
    securityEvent({ context, request, who }, 'not_permitted', { action: route.allow, role: who.role });
    throw new ProblemError(
      'not_permitted',
      `That is not among what a ${who.role} does here. Ask the proprietor.`,
    );
  }
  return who;
}
