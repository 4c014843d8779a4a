/** Lots: the list, and one with all that is known of it. */
import type { RouteObject } from 'react-router-dom';

export const lotRoutes: RouteObject[] = [
  { path: 'lots', lazy: async () => ({ Component: (await import('./lots.tsx')).Lots }) },
  { path: 'lots/:id', lazy: async () => ({ Component: (await import('./lot.tsx')).Lot }) },
];
