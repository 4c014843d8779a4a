/** Whether the process lives, and whether it can serve; and the stream that tells open screens of changes. */
import { z } from '../../shared/schemas/zod.ts';
import { ProblemError } from '../problem.ts';
import type { Route } from './route.ts';

export const healthRoutes: readonly Route[] = [
  {
    method: 'get',
    path: '/health/live',
    allow: 'public',
    summary: 'Answers while the process lives.',
    handle: () => Promise.resolve({ body: { live: true } }),
  },
  {
    method: 'get',
    path: '/health/ready',
    allow: 'public',
    summary: 'Answers 200 while the book can be reached, 503 while it can’t.',
    async handle({ context }) {
      await context.db.once(z.object({ one: z.number() }), 'SELECT 1 AS one');
      return { body: { ready: true } };
    },
  },
  {
    method: 'get',
    path: '/stream',
    allow: 'session.read',
    summary: 'Server-sent events: the book of this workshop has moved on.',
    handle({ context, who, response }) {
      if (!context.stream.open(who.workshop_id, response)) {
        throw new ProblemError('unavailable', 'Too many screens are open on this server.', {
          retry_after_s: 30,
        });
      }
      return Promise.resolve(null);
    },
  },
];
