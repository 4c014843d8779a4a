/** The first pages: the keeper's day and the goldsmith's bench. */
import { readMyBench } from '../services/reads/my-bench.ts';
import { readToday } from '../services/reads/today.ts';
import type { Route } from './route.ts';

export const todayRoutes: readonly Route[] = [
  {
    method: 'get',
    path: '/today',
    allow: 'book.read',
    summary: 'Who holds what, what waits, where the metal lies.',
    handle: async ({ context, who }) => ({ body: await context.db.inScope(who, readToday) }),
  },
  {
    method: 'get',
    path: '/my-bench',
    allow: 'bench.read_own',
    summary: 'The own benches, what lies there, what waits to be taken over.',
    handle: async ({ context, who }) => ({
      body: await context.db.inScope(who, (tx) => readMyBench(tx, who.person_id)),
    }),
  },
];
