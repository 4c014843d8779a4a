/**
 * The two cookies of a session. Over https they carry the `__Host-` and `Secure` marks; on plain http they exist only
 * for the loopback of one's own machine (the start script's default), where nothing crosses a network.
 */
import type { CookieOptions, Request, Response } from 'express';
import { z } from '../../shared/schemas/zod.ts';

const cookies = z.record(z.string(), z.string());

export interface SessionCookies {
  readonly access: string | null;
  readonly refresh: string | null;
}

const REFRESH_S = 7 * 24 * 3600;

function names(secure: boolean) {
  const prefix = secure ? '__Host-' : '';
  return { access: `${prefix}grainward`, refresh: `${prefix}grainward-refresh` };
}

function options(secure: boolean, maxAge: number): CookieOptions {
  return { httpOnly: true, sameSite: 'strict', secure, path: '/', maxAge: maxAge * 1000 };
}

export function readCookies(request: Request, secure: boolean): SessionCookies {
  const read = cookies.safeParse(request.cookies);
  const of = (name: string) => (read.success ? (read.data[name] ?? null) : null);
  return { access: of(names(secure).access), refresh: of(names(secure).refresh) };
}

/** Sets the access token, and the refresh token where there is a new one. */
export function setCookies(
  response: Response,
  secure: boolean,
  access: string,
  refresh: string | null,
): void {
  response.cookie(names(secure).access, access, options(secure, REFRESH_S));
  if (refresh !== null) response.cookie(names(secure).refresh, refresh, options(secure, REFRESH_S));
}

export function clearCookies(response: Response, secure: boolean): void {
  response.clearCookie(names(secure).access, options(secure, 0));
  response.clearCookie(names(secure).refresh, options(secure, 0));
}
