/**
 * What a route is: a row in a table that the router and the tests read. Every route is denied unless its row names
 * who may: everybody (`public`), anybody who has signed in, or the roles of an action.
 */
import type { Request, Response } from 'express';
import type { Action } from '../../shared/permissions.ts';
import type { AppContext } from '../context.ts';
import type { PersonInWorkshop } from '../services/events/person.ts';

/** Somebody signed in, in the workshop that the session is in. */
export interface SignedIn extends PersonInWorkshop {
  readonly user_id: string;
  readonly session_id: string;
  /** The workshop asks this role for a second factor, and it is not set up yet. */
  readonly second_factor_missing: boolean;
}

export interface Call<Who> {
  readonly context: AppContext;
  readonly who: Who;
  readonly params: Readonly<Record<string, string>>;
  readonly query: Readonly<Record<string, unknown>>;
  readonly body: unknown;
  readonly request: Request;
  readonly response: Response;
}

/** A JSON answer; null where the handler has written the response itself. */
export type Answer = { readonly status?: number; readonly body: unknown } | null;

interface RouteBase {
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  readonly path: string;
  /** One sentence for the API page. */
  readonly summary: string;
}

export interface PublicRoute extends RouteBase {
  readonly allow: 'public';
  handle(call: Call<SignedIn | null>): Promise<Answer>;
}

export interface GuardedRoute extends RouteBase {
  readonly allow: Action;
  handle(call: Call<SignedIn>): Promise<Answer>;
}

export type Route = PublicRoute | GuardedRoute;
