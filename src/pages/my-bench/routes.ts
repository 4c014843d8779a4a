/** The goldsmith's own pages, and everybody's own account. */
import type { RouteObject } from 'react-router-dom';

export const benchRoutes: RouteObject[] = [
  { path: 'bench', lazy: async () => ({ Component: (await import('./my-bench.tsx')).MyBench }) },
  { path: 'account', lazy: async () => ({ Component: (await import('./my-account.tsx')).MyAccount }) },
];
