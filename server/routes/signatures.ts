/** The queue of acts that wait for a second signature. */
import { refuseSignatureBody } from '../../shared/schemas/signature-request.ts';
import { securityEvent } from '../security-log.ts';
import { checkBody } from '../services/events/check-body.ts';
import {
  approveSignature,
  refuseSignature,
  signatureRequestById,
  waitingSignatures,
  withdrawSignature,
} from '../services/signatures/signature-requests.ts';
import { pathId } from './lots-and-vouchers.ts';
import type { Route } from './route.ts';

export const signatureRoutes: readonly Route[] = [
  {
    method: 'get',
    path: '/signature-requests',
    allow: 'book.read',
    summary: 'What waits for a second signature.',
    handle: async ({ context, who }) => ({
      body: { requests: await context.db.inScope(who, waitingSignatures) },
    }),
  },
  {
    method: 'get',
    path: '/signature-requests/:id',
    allow: 'book.read',
    summary: 'One request, with what would be posted.',
    handle: async ({ context, who, params }) => ({
      body: await context.db.inScope(who, (tx) => signatureRequestById(tx, pathId(params['id']))),
    }),
  },
  {
    method: 'post',
    path: '/signature-requests/:id/approve',
    allow: 'signature.give',
    summary: 'Signs a request of somebody else; it is posted then.',
    async handle(call) {
      const { context, who, params } = call;
      const answer = await context.db.inScope(who, (tx) => approveSignature(tx, pathId(params['id']), who));
      const last = answer.records.at(-1);
      if (last !== undefined) context.stream.changed(who.workshop_id, last.sequence);
      securityEvent(call, 'signature_given', { request: params['id'] ?? '' });
      return { status: 201, body: answer };
    },
  },
  {
    method: 'post',
    path: '/signature-requests/:id/refuse',
    allow: 'signature.give',
    summary: 'Refuses a request of somebody else.',
    async handle(call) {
      const { context, who, params } = call;
      const { note } = checkBody(refuseSignatureBody, call.body);
      await context.db.inScope(who, (tx) => refuseSignature(tx, pathId(params['id']), who, note));
      securityEvent(call, 'signature_refused', { request: params['id'] ?? '' });
      return { status: 204, body: undefined };
    },
  },
  {
    method: 'post',
    path: '/signature-requests/:id/withdraw',
    allow: 'signature.give',
    summary: 'Takes one’s own request back.',
    async handle({ context, who, params }) {
      await context.db.inScope(who, (tx) => withdrawSignature(tx, pathId(params['id']), who));
      return { status: 204, body: undefined };
    },
  },
];
