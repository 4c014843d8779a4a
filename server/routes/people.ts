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
import { securityEvent } from '../security-log.ts';
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
import { holdSignUps, signUp } from '../services/identity/sign-up.ts';
import { pathId } from './lots-and-vouchers.ts';
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
      const body = checkBody(signUpBody, call.body);
      await holdSignUps(call.context, call.request.ip ?? '');
      const made = await signUp(call.context, body);
      securityEvent({ ...call, who: made }, 'workshop_opened');
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
    async handle(call) {
      const { context, who } = call;
      const made = await invite(context, checkBody(invitationBody, call.body), who);
      securityEvent(call, 'invited', { invitation: made.id });
      return { status: 201, body: made };
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
      const body = checkBody(acceptInvitationBody, call.body);
      const joined = await acceptInvitation(call.context, body, call.request.ip ?? '');
      securityEvent({ ...call, who: joined }, 'invitation_taken');
      await beginAndGive(call, joined);
      return DONE;
    },
  },
  {
    method: 'put',
    path: '/people/:id/role',
    allow: 'people.end',
    summary: 'Gives somebody another role or end date.',
    async handle(call) {
      const { context, who } = call;
      const person_id = pathId(call.params['id']);
      const to = checkBody(roleBody, call.body);
      await context.db.inScope(who, (tx) => changeRole(tx, person_id, to, who));
      securityEvent(call, 'role_given', { to_person_id: person_id, role: to.role });
      return DONE;
    },
  },
  {
    method: 'delete',
    path: '/people/:id/role',
    allow: 'people.end',
    summary: 'Ends somebody’s role at once.',
    async handle(call) {
      const { context, who } = call;
      const person_id = pathId(call.params['id']);
      await context.db.inScope(who, (tx) => endRole(tx, person_id, who));
      securityEvent(call, 'role_ended', { to_person_id: person_id });
      return DONE;
    },
  },
  {
    method: 'post',
    path: '/password-resets',
    allow: 'public',
    summary: 'Asks for a link to set a new password.',
    async handle(call) {
      await askForReset(call.context, checkBody(resetBody, call.body).email, call.request.ip ?? '');
      securityEvent(call, 'reset_asked');
      return { status: 202, body: {} };
    },
  },
  {
    method: 'post',
    path: '/password-resets/complete',
    allow: 'public',
    summary: 'Sets a new password by a link.',
    async handle(call) {
      const whose = await completeReset(call.context, checkBody(completeResetBody, call.body));
      securityEvent({ ...call, who: whose }, 'password_changed');
      return DONE;
    },
  },
  {
    method: 'put',
    path: '/session/password',
    allow: 'session.read',
    summary: 'Changes one’s own password.',
    async handle(call) {
      await changePassword(call.context, call.who, checkBody(changePasswordBody, call.body));
      securityEvent(call, 'password_changed');
      return DONE;
    },
  },
  {
    method: 'put',
    path: '/session/pin',
    allow: 'session.read',
    summary: 'Sets one’s own handover PIN.',
    async handle(call) {
      await setPin(call.context, call.who, checkBody(setPinBody, call.body));
      securityEvent(call, 'pin_set');
      return DONE;
    },
  },
];
