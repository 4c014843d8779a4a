/** The reports' routes; each page is loaded when it is opened. */
import type { RouteObject } from 'react-router-dom';
import { paths } from '../../app/paths.ts';

export const reportRoutes: RouteObject[] = [
  { path: paths.reports, lazy: async () => ({ Component: (await import('./index-page.tsx')).ReportsPage }) },
  { path: paths.balances, lazy: async () => ({ Component: (await import('./balances.tsx')).BalancesPage }) },
  { path: paths.losses, lazy: async () => ({ Component: (await import('./losses.tsx')).LossesPage }) },
  {
    path: paths.reconciliation,
    lazy: async () => ({ Component: (await import('./reconciliation.tsx')).ReconciliationPage }),
  },
  { path: paths.refiners, lazy: async () => ({ Component: (await import('./refiners.tsx')).RefinersPage }) },
  {
    path: paths.statement,
    lazy: async () => ({ Component: (await import('./statement.tsx')).StatementPage }),
  },
  { path: paths.vouchers, lazy: async () => ({ Component: (await import('./vouchers.tsx')).VouchersPage }) },
  {
    path: paths.voucher(':id'),
    lazy: async () => ({ Component: (await import('./voucher.tsx')).VoucherPage }),
  },
];
