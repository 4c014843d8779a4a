/** The route of the queue of second signatures. */
import type { RouteObject } from 'react-router-dom';
import { paths } from '../../app/paths.ts';

export const signatureRoutes: RouteObject[] = [
  { path: paths.signatures, lazy: async () => ({ Component: (await import('./queue.tsx')).SignaturesPage }) },
];
