/** The check of the whole book, for whoever wants to know now. */
import { checkBook } from '../services/book/check-book.ts';
import type { Route } from './route.ts';

export const bookCheckRoutes: readonly Route[] = [
  {
    method: 'get',
    path: '/book/check',
    allow: 'report.read',
    summary: 'Recomputes hashes, sums, balances and registers from the chain; names each voucher at fault.',
    handle: async ({ context, who }) => ({ body: await context.db.inScope(who, checkBook) }),
  },
];
