/**
 * One line in the log for each event of security: time (UTC, by the logger), event, user, person, workshop, address,
 * request. Never a password, token, key or cookie (OWASP ASVS 5.0, 16.2 and 16.3).
 */
import type { Request } from 'express';
import type { AppContext } from './context.ts';

export type SecurityEvent =
  | 'workshop_opened'
  | 'signed_in'
  | 'sign_in_refused'
  | 'signed_out'
  | 'refresh_refused'
  | 'workshop_entered'
  | 'token_refused'
  | 'not_permitted'
  | 'invited'
  | 'invitation_taken'
  | 'role_given'
  | 'role_ended'
  | 'reset_asked'
  | 'password_changed'
  | 'pin_set'
  | 'second_factor_on'
  | 'second_factor_off'
  | 'recovery_codes_renewed'
  | 'second_factor_demanded'
  | 'signature_given'
  | 'signature_refused'
  | 'export_asked';

interface Who {
  readonly user_id: string;
  readonly person_id?: string;
  readonly workshop_id?: string;
}

/** The id that the request has in the log. */
export const requestId = (request: Request): string | null =>
  typeof request.id === 'string' ? request.id : null;

/** Tells the log. `more` holds ids and words of closed lists only. */
export function securityEvent(
  call: { readonly context: AppContext; readonly request: Request; readonly who: Who | null },
  event: SecurityEvent,
  more: Readonly<Record<string, string | readonly string[] | null>> = {},
): void {
  const { context, request, who } = call;
  const line = {
    security: event,
    user_id: who?.user_id ?? null,
    person_id: who?.person_id ?? null,
    workshop_id: who?.workshop_id ?? null,
    address: request.ip ?? null,
    request_id: requestId(request),
    ...more,
  };
  if (REFUSALS.has(event)) context.log.warn(line, event);
  else context.log.info(line, event);
}

const REFUSALS: ReadonlySet<SecurityEvent> = new Set([
  'sign_in_refused',
  'refresh_refused',
  'token_refused',
  'not_permitted',
]);
