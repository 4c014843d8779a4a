/** Lots, vouchers, and the search of the scan field. */
import { readLotCode } from '../../shared/book/lot-code.ts';
import { lotQuery } from '../../shared/schemas/lots.ts';
import { id } from '../../shared/schemas/primitives.ts';
import { voucherQuery } from '../../shared/schemas/vouchers.ts';
import { z } from '../../shared/schemas/zod.ts';
import { ProblemError } from '../problem.ts';
import { sendCsv, wantsCsv } from '../presenters/send-csv.ts';
import { checkQuery } from '../services/events/check-body.ts';
import { lotLabel } from '../services/documents/lot-label.ts';
import { lotList, lotWholeOf } from '../services/reads/lots.ts';
import { search } from '../services/reads/search.ts';
import { voucherList, voucherWholeOf } from '../services/reads/vouchers.ts';
import type { Route } from './route.ts';

/** An id in a path; anything else is simply not there. */
export function pathId(value: string | undefined): string {
  const read = id.safeParse(value);
  if (!read.success) throw new ProblemError('not_found', 'There is nothing at this address.');
  return read.data;
}

const WORKSHOP = `SELECT name, (clock_timestamp() AT TIME ZONE time_zone)::date::text AS today FROM workshop
  WHERE workshop_id = current_workshop()`;

const searchQuery = z.strictObject({ q: z.string().trim().min(1).max(60) });

export const lotAndVoucherRoutes: readonly Route[] = [
  {
    method: 'get',
    path: '/lots',
    allow: 'book.read',
    summary: 'Lots, newest first.',
    async handle({ context, who, query, request, response }) {
      const read = checkQuery(lotQuery, query);
      const page = await context.db.inScope(who, (tx) => lotList(tx, read));
      return wantsCsv(request, read) ? sendCsv(response, 'lots', page.rows) : { body: page };
    },
  },
  {
    method: 'get',
    path: '/lots/by-code/:code',
    allow: 'book.read',
    summary: 'The lot of a code, as typed or scanned.',
    async handle({ context, who, params }) {
      const read = readLotCode(params['code'] ?? '');
      if (!read.ok)
        throw new ProblemError('invalid', read.reason, {
          errors: [{ field: 'code', sentence: read.reason }],
        });
      return { body: await context.db.inScope(who, (tx) => lotWholeOf(tx, { code: read.code })) };
    },
  },
  {
    method: 'get',
    path: '/lots/:id',
    allow: 'book.read',
    summary: 'One lot: composition, where it lies, custody trail, family.',
    handle: async ({ context, who, params }) => ({
      body: await context.db.inScope(who, (tx) => lotWholeOf(tx, { id: pathId(params['id']) })),
    }),
  },
  {
    method: 'get',
    path: '/lots/:id/label',
    allow: 'book.read',
    summary: 'The label of a lot, as a PDF of 62 by 29 mm.',
    async handle({ context, who, params, response }) {
      const [lot, { name, today }] = await context.db.inScope(who, async (tx) => [
        await lotWholeOf(tx, { id: pathId(params['id']) }),
        await tx.one(z.object({ name: z.string(), today: z.string() }), WORKSHOP),
      ]);
      response.attachment(`${lot.code}.pdf`).type('application/pdf');
      response.send(Buffer.from(await lotLabel(lot, name, today)));
      return null;
    },
  },
  {
    method: 'get',
    path: '/vouchers',
    allow: 'book.read',
    summary: 'The register of vouchers, newest first.',
    async handle({ context, who, query, request, response }) {
      const read = checkQuery(voucherQuery, query);
      const page = await context.db.inScope(who, (tx) => voucherList(tx, read));
      return wantsCsv(request, read) ? sendCsv(response, 'vouchers', page.rows) : { body: page };
    },
  },
  {
    method: 'get',
    path: '/vouchers/:id',
    allow: 'book.read',
    summary: 'One voucher or act, by id or number, with entries and hash.',
    async handle({ context, who, params }) {
      const named = params['id'] ?? '';
      const key = /^\d{1,18}$/.test(named) ? named : pathId(named);
      return { body: await context.db.inScope(who, (tx) => voucherWholeOf(tx, key)) };
    },
  },
  {
    method: 'get',
    path: '/search',
    allow: 'book.read',
    summary: 'What the scan field finds: lots, vouchers, jobs, parties.',
    async handle({ context, who, query }) {
      const { q } = checkQuery(searchQuery, query);
      return { body: { hits: await context.db.inScope(who, (tx) => search(tx, q)) } };
    },
  },
];
