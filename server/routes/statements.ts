/** Statements beside the reports: an owner's metal, and the consignments to refiners; each as JSON and as CSV. */
import { ownerStatementQuery, refinersQuery } from '../../shared/schemas/statements.ts';
import { sendCsv, wantsCsv } from '../presenters/send-csv.ts';
import { checkQuery } from '../services/events/check-body.ts';
import { readOwnerStatement } from '../services/reports/owner-statement.ts';
import { readRefiners, refinerLines } from '../services/reports/refiners.ts';
import { pathId } from './lots-and-vouchers.ts';
import type { Route } from './route.ts';

export const statementRoutes: readonly Route[] = [
  {
    method: 'get',
    path: '/reports/statements/owner/:party_id',
    allow: 'report.read',
    summary: 'The metal statement of a customer or supplier: movements, loss charged, what is owed.',
    async handle({ context, who, params, query, request, response }) {
      const party_id = pathId(params['party_id']);
      const read = checkQuery(ownerStatementQuery, query);
      const report = await context.db.inScope(who, (tx) => readOwnerStatement(tx, party_id, read));
      return wantsCsv(request, read) ? sendCsv(response, 'statement', report.movements) : { body: report };
    },
  },
  {
    method: 'get',
    path: '/reports/refiners',
    allow: 'report.read',
    summary: 'Consignments to refiners: sent, expected, found, kept, credited, and the days it took.',
    async handle({ context, who, query, request, response }) {
      const read = checkQuery(refinersQuery, query);
      const page = await context.db.inScope(who, (tx) => readRefiners(tx, read));
      return wantsCsv(request, read)
        ? sendCsv(response, 'refiners', refinerLines(page.rows))
        : { body: page };
    },
  },
];
