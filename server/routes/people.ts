/** Workshops and the people in them: sign-up, invitations, roles, passwords, PINs. */
import {
  acceptInvitationBody,
  changePasswordBody,
  completeResetBody,
  invitationBody,
  invitationTokenBody,
  resetBody,
  roleBody,
  setPinBody,
  signUpBody,
} from '../../shared/schemas/identity.ts';
import { checkBody } from '../services/events/check-body.ts';
import {
  acceptInvitation,
  invitationByToken,
  invite,
  workshopName,
} from '../services/identity/invitations.ts';
import { askForReset, changePassword, completeReset } from '../services/identity/password-changes.ts';
import { setPin } from '../services/identity/pins.ts';
import { changeRole, endRole } from '../services/identity/roles.ts';
import { members } from '../services/identity/session-info.ts';
import { signUp } from '../services/identity/sign-up.ts';
import type { Answer, Route } from './route.ts';
import { beginAndGive } from './session.ts';

const DONE: Answer = { status: 204, body: undefined };

export const peopleRoutes: readonly Route[] = [
  {
    method: 'post',
    path: '/workshops',
    allow: 'public',
    summary: 'Signs up a workshop; who does it is its proprietor.',
    async handle(call) {
      const made = await signUp(call.context, checkBody(signUpBody, call.body));
      await beginAndGive(call, made);
      return { status: 201, body: { workshop_id: made.workshop_id } };
    },
  },
  {
    method: 'get',
    path: '/people',
    allow: 'people.read',
    summary: 'Everybody who has or had a role here.',
    handle: async ({ context, who }) => ({ body: { people: await members(context, who) } }),
  },
  {
    method: 'post',
    path: '/invitations',
    allow: 'people.invite',
    summary: 'Invites somebody by e-mail.',
    async handle({ context, who, body }) {
      const input = checkBody(invitationBody, body);
      return { status: 201, body: await context.db.inScope(who, (tx) => invite(context, tx, input, who)) };
    },
  },
  {
    method: 'post',
    path: '/invitations/read',
    allow: 'public',
    summary: 'What an invitation’s link is for.',
    async handle({ context, body }) {
      const found = await invitationByToken(context, checkBody(invitationTokenBody, body).token);
      const { email, name, role } = found;
      const workshop_name = await workshopName(context, found.workshop_id);
      return { body: { email, name, role, workshop_name, has_account: found.account !== null } };
    },
  },
  {
    method: 'post',
    path: '/invitations/accept',
    allow: 'public',
    summary: 'Takes an invitation.',
    async handle(call) {
      await beginAndGive(
        call,
        await acceptInvitation(call.context, checkBody(acceptInvitationBody, call.body)),
      );
      return DONE;
    },
  },
  {
    method: 'put',
    path: '/people/:id/role',
    allow: 'people.end',
    summary: 'Gives somebody another role or end date.',
    async handle({ context, who, params, body }) {
      const to = checkBody(roleBody, body);
      await context.db.inScope(who, (tx) => changeRole(tx, params['id'] ?? '', to, who));
      return DONE;
    },
  },
  {
    method: 'delete',
    path: '/people/:id/role',
    allow: 'people.end',
    summary: 'Ends somebody’s role at once.',
    async handle({ context, who, params }) {
      await context.db.inScope(who, (tx) => endRole(tx, params['id'] ?? '', who));
      return DONE;
    },
  },
  {
    method: 'post',
    path: '/password-resets',
    allow: 'public',
    summary: 'Asks for a link to set a new password.',
    async handle({ context, body }) {
      await askForReset(context, checkBody(resetBody, body).email);
      return { status: 202, body: {} };
    },
  },
  {
    method: 'post',
    path: '/password-resets/complete',
    allow: 'public',
    summary: 'Sets a new password by a link.',
    async handle({ context, body }) {
      await completeReset(context, checkBody(completeResetBody, body));
      return DONE;
    },
  },
  {
    method: 'put',
    path: '/session/password',
    allow: 'session.read',
    summary: 'Changes one’s own password.',
    async handle({ context, who, body }) {
      await changePassword(context, who, checkBody(changePasswordBody, body));
      return DONE;
    },
  },
  {
    method: 'put',
    path: '/session/pin',
    allow: 'session.read',
    summary: 'Sets one’s own handover PIN.',
    async handle({ context, who, body }) {
      await setPin(context, who, checkBody(setPinBody, body));
      return DONE;
    },
  },
];
