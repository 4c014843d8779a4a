/** Routes of the audit export and of checking one; each page is loaded when it is opened. */
import type { RouteObject } from 'react-router-dom';
import { paths } from '../../app/paths.ts';

export const insuranceRoutes: RouteObject[] = [
  {
    path: paths.insurance,
    lazy: async () => ({ Component: (await import('./audit-export.tsx')).AuditExportPage }),
  },
  { path: paths.verify, lazy: async () => ({ Component: (await import('./verify.tsx')).VerifyPage }) },
];
