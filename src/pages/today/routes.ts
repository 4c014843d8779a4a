/** The first page of those who read the book. */
import type { RouteObject } from 'react-router-dom';

export const todayRoutes: RouteObject[] = [
  { index: true, lazy: async () => ({ Component: (await import('./today.tsx')).Today }) },
];
