/** The workshop's own settings: one page for each register. */
import type { RouteObject } from 'react-router-dom';

export const workshopRoutes: RouteObject[] = [
  { path: 'workshop', lazy: async () => ({ Component: (await import('./places.tsx')).Places }) },
  { path: 'workshop/people', lazy: async () => ({ Component: (await import('./people.tsx')).People }) },
  { path: 'workshop/parties', lazy: async () => ({ Component: (await import('./parties.tsx')).Parties }) },
  { path: 'workshop/jobs', lazy: async () => ({ Component: (await import('./jobs.tsx')).Jobs }) },
  { path: 'workshop/alloys', lazy: async () => ({ Component: (await import('./alloys.tsx')).Alloys }) },
  {
    path: 'workshop/allowances',
    lazy: async () => ({ Component: (await import('./allowances.tsx')).Allowances }),
  },
  { path: 'workshop/prices', lazy: async () => ({ Component: (await import('./prices.tsx')).Prices }) },
  { path: 'workshop/settings', lazy: async () => ({ Component: (await import('./settings.tsx')).Settings }) },
  { path: 'workshop/periods', lazy: async () => ({ Component: (await import('./periods.tsx')).Periods }) },
];
