/** Goldsmiths ask for metal; the counter answers. */
import { z } from '../../shared/schemas/zod.ts';
import { id } from '../../shared/schemas/primitives.ts';
import { may } from '../../shared/permissions.ts';
import { metalRequestBody } from '../../shared/schemas/metal-request.ts';
import { checkBody } from '../services/events/check-body.ts';
import { askForMetal, endRequest, waitingRequests } from '../services/requests/metal-requests.ts';
import { pathId } from './lots-and-vouchers.ts';
import type { Route } from './route.ts';

const answerBody = z.strictObject({ voucher_id: id });

export const metalRequestRoutes: readonly Route[] = [
  {
    method: 'get',
    path: '/metal-requests',
    allow: 'request.make',
    summary: 'Requests for metal that wait; a goldsmith sees the own ones.',
    async handle({ context, who }) {
      const only = may(who.role, 'request.answer') ? null : who.person_id;
      return { body: { requests: await context.db.inScope(who, (tx) => waitingRequests(tx, only)) } };
    },
  },
  {
    method: 'post',
    path: '/metal-requests',
    allow: 'request.make',
    summary: 'Asks for metal to one’s own bench.',
    async handle({ context, who, body }) {
      const input = checkBody(metalRequestBody, body);
      return { status: 201, body: await context.db.inScope(who, (tx) => askForMetal(tx, input, who)) };
    },
  },
  {
    method: 'post',
    path: '/metal-requests/:id/answer',
    allow: 'request.answer',
    summary: 'Marks a request as answered by a voucher.',
    async handle({ context, who, params, body }) {
      const { voucher_id } = checkBody(answerBody, body);
      await context.db.inScope(who, (tx) => endRequest(tx, pathId(params['id']), 'answered', { voucher_id }));
      return { status: 204, body: undefined };
    },
  },
  {
    method: 'post',
    path: '/metal-requests/:id/decline',
    allow: 'request.answer',
    summary: 'Declines a request.',
    async handle({ context, who, params }) {
      await context.db.inScope(who, (tx) => endRequest(tx, pathId(params['id']), 'declined', {}));
      return { status: 204, body: undefined };
    },
  },
  {
    method: 'post',
    path: '/metal-requests/:id/withdraw',
    allow: 'request.make',
    summary: 'Takes one’s own request back.',
    async handle({ context, who, params }) {
      await context.db.inScope(who, (tx) =>
        endRequest(tx, pathId(params['id']), 'withdrawn', { only_of: who.person_id }),
      );
      return { status: 204, body: undefined };
    },
  },
];
