/** The second factor: setting it up, turning it off, recovery codes, and what a workshop demands of its roles. */
import {
  beginSecondFactorBody,
  provenByCodeBody,
  secondFactorRolesBody,
  turnOnSecondFactorBody,
} from '../../shared/schemas/identity.ts';
import { securityEvent } from '../security-log.ts';
import { checkBody } from '../services/events/check-body.ts';
import {
  beginSecondFactor,
  demandSecondFactor,
  renewRecoveryCodes,
  turnOffSecondFactor,
  turnOnSecondFactor,
} from '../services/identity/second-factor.ts';
import type { Route } from './route.ts';

export const secondFactorRoutes: readonly Route[] = [
  {
    method: 'post',
    path: '/second-factor/setup',
    allow: 'session.read',
    summary: 'A new secret for one’s own authenticator; nothing is kept until its first code comes back.',
    async handle({ context, who, body }) {
      const { password } = checkBody(beginSecondFactorBody, body);
      return { body: await beginSecondFactor(context, who, password) };
    },
  },
  {
    method: 'post',
    path: '/second-factor',
    allow: 'session.read',
    summary: 'Turns one’s own second factor on by its first code; gives the recovery codes, once.',
    async handle(call) {
      const codes = await turnOnSecondFactor(
        call.context,
        call.who,
        checkBody(turnOnSecondFactorBody, call.body),
      );
      securityEvent(call, 'second_factor_on');
      return { status: 201, body: codes };
    },
  },
  {
    method: 'post',
    path: '/second-factor/off',
    allow: 'session.read',
    summary: 'Turns one’s own second factor off, by password and code.',
    async handle(call) {
      await turnOffSecondFactor(call.context, call.who, checkBody(provenByCodeBody, call.body));
      securityEvent(call, 'second_factor_off');
      return { status: 204, body: undefined };
    },
  },
  {
    method: 'post',
    path: '/second-factor/recovery-codes',
    allow: 'session.read',
    summary: 'New recovery codes, by password and code; those before are gone.',
    async handle(call) {
      const codes = await renewRecoveryCodes(call.context, call.who, checkBody(provenByCodeBody, call.body));
      securityEvent(call, 'recovery_codes_renewed');
      return { status: 201, body: codes };
    },
  },
  {
    method: 'put',
    path: '/workshop/second-factor-roles',
    allow: 'settings.set',
    summary: 'Roles that may do nothing here before they have a second factor.',
    async handle(call) {
      const { roles } = checkBody(secondFactorRolesBody, call.body);
      await demandSecondFactor(call.context, call.who, roles);
      securityEvent(call, 'second_factor_demanded', { roles });
      return { status: 204, body: undefined };
    },
  },
];
