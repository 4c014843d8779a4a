/** Routes of sweeps and refining; each page is loaded when it is opened. */
import type { RouteObject } from 'react-router-dom';
import { paths } from '../../app/paths.ts';

export const refiningRoutes: RouteObject[] = [
  { path: paths.refining, lazy: async () => ({ Component: (await import('./overview.tsx')).RefiningPage }) },
  { path: paths.sweepUp, lazy: async () => ({ Component: (await import('./sweep-up.tsx')).SweepUpPage }) },
  { path: paths.consign, lazy: async () => ({ Component: (await import('./consign.tsx')).ConsignPage }) },
  {
    path: paths.consignment(':id'),
    lazy: async () => ({ Component: (await import('./consignment.tsx')).ConsignmentPage }),
  },
  {
    path: paths.outturn(':id'),
    lazy: async () => ({ Component: (await import('./outturn.tsx')).OutturnPage }),
  },
  {
    path: paths.metalAccounts,
    lazy: async () => ({ Component: (await import('./metal-accounts.tsx')).MetalAccountsPage }),
  },
];
