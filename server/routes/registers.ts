/** The workshop's registers, and the addresses of its parties (which are not in the chain). */
import { email } from '../../shared/schemas/identity.ts';
import { shortText } from '../../shared/schemas/primitives.ts';
import { z } from '../../shared/schemas/zod.ts';
import type { Tx } from '../db/rows.ts';
import { ProblemError } from '../problem.ts';
import { checkBody } from '../services/events/check-body.ts';
import {
  readAccounts,
  readAllowances,
  readAlloys,
  readJobs,
  readParties,
  readPeriods,
  readPrices,
  readSettingRows,
} from '../services/reads/registers.ts';
import { pathId } from './lots-and-vouchers.ts';
import type { Route } from './route.ts';

const register = (path: string, summary: string, read: (tx: Tx) => Promise<unknown[]>): Route => ({
  method: 'get',
  path,
  allow: 'book.read',
  summary,
  handle: async ({ context, who }) => ({ body: { rows: await context.db.inScope(who, read) } }),
});

const contactBody = z.strictObject({
  email: email.nullable(),
  phone: shortText.nullable(),
  address: shortText.nullable(),
});

export const registerRoutes: readonly Route[] = [
  register('/accounts', 'Places and accounts, with what each holds.', readAccounts),
  register('/parties', 'Suppliers, customers, refiners, outworkers, couriers.', readParties),
  register('/alloys', 'The alloy register.', readAlloys),
  register('/prices', 'Metal prices, newest first.', readPrices),
  register('/allowances', 'Allowed losses by operation, newest first.', readAllowances),
  register('/jobs', 'Jobs, newest first.', readJobs),
  register('/periods', 'Closed and re-opened periods.', readPeriods),
  register('/settings', 'Limits and estimates that the workshop has set.', readSettingRows),
  {
    method: 'put',
    path: '/parties/:id/contact',
    allow: 'party.set',
    summary: 'Sets a party’s addresses.',
    async handle({ context, who, params, body }) {
      const contact = checkBody(contactBody, body);
      const done = await context.db.inScope(who, (tx) =>
        tx.maybe(
          z.object({ id: z.string() }),
          `UPDATE party SET email = $2, phone = $3, address = $4 WHERE workshop_id = current_workshop() AND id = $1::uuid
            RETURNING id::text`,
          [pathId(params['id']), contact.email, contact.phone, contact.address],
        ),
      );
      if (done === null)
        throw new ProblemError('not_found', 'There is no such party. Look at the list again.');
      return { status: 204, body: undefined };
    },
  },
];
