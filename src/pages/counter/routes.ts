/** The counter: everything that a keeper weighs, issues, takes back or hands out. */
import type { RouteObject } from 'react-router-dom';

export const counterRoutes: RouteObject[] = [
  { path: 'counter', lazy: async () => ({ Component: (await import('./counter.tsx')).Counter }) },
  { path: 'counter/weigh-in', lazy: async () => ({ Component: (await import('./weigh-in.tsx')).WeighIn }) },
  { path: 'counter/issue', lazy: async () => ({ Component: (await import('./issue.tsx')).Issue }) },
  {
    path: 'counter/weigh-back',
    lazy: async () => ({ Component: (await import('./weigh-back.tsx')).WeighBack }),
  },
  { path: 'counter/opening', lazy: async () => ({ Component: (await import('./opening.tsx')).Opening }) },
  { path: 'counter/move/:what', lazy: async () => ({ Component: (await import('./move.tsx')).Move }) },
  {
    path: 'counter/handover/:id',
    lazy: async () => ({ Component: (await import('./handover.tsx')).Handover }),
  },
  { path: 'counter/explain/:id', lazy: async () => ({ Component: (await import('./explain.tsx')).Explain }) },
];
