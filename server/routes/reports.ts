/** Reports on the book: balances, losses, reconciliation; each as JSON and as CSV. */
import { balancesQuery, lossesQuery, reconciliationQuery } from '../../shared/schemas/reports.ts';
import { sendCsv, wantsCsv } from '../presenters/send-csv.ts';
import { checkQuery } from '../services/events/check-body.ts';
import { readBalances } from '../services/reports/balances.ts';
import { readLosses } from '../services/reports/losses.ts';
import { readReconciliation } from '../services/reports/reconciliation.ts';
import type { Route } from './route.ts';

export const reportRoutes: readonly Route[] = [
  {
    method: 'get',
    path: '/reports/balances',
    allow: 'report.read',
    summary: 'Balances by place, metal, owner or lot, now or at the end of a past day.',
    async handle({ context, who, query, request, response }) {
      const read = checkQuery(balancesQuery, query);
      const report = await context.db.inScope(who, (tx) => readBalances(tx, read.by, read.on));
      return wantsCsv(request, read) ? sendCsv(response, 'balances', report.rows) : { body: report };
    },
  },
  {
    method: 'get',
    path: '/reports/losses',
    allow: 'report.read',
    summary: 'Losses of a period by operation, bench, person, alloy, job or month.',
    async handle({ context, who, query, request, response }) {
      const read = checkQuery(lossesQuery, query);
      const report = await context.db.inScope(who, (tx) => readLosses(tx, read));
      return wantsCsv(request, read) ? sendCsv(response, 'losses', report.rows) : { body: report };
    },
  },
  {
    method: 'get',
    path: '/reports/reconciliation',
    allow: 'report.read',
    summary: 'What came, what went, what is lost and what is left of a period.',
    async handle({ context, who, query, request, response }) {
      const read = checkQuery(reconciliationQuery, query);
      const report = await context.db.inScope(who, (tx) => readReconciliation(tx, read));
      return wantsCsv(request, read) ? sendCsv(response, 'reconciliation', report.places) : { body: report };
    },
  },
];
