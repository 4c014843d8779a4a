/** The pages before anybody is signed in. */
import type { RouteObject } from 'react-router-dom';

export const signInRoutes: RouteObject[] = [
  { path: '/sign-in', lazy: async () => ({ Component: (await import('./sign-in.tsx')).SignIn }) },
  { path: '/sign-up', lazy: async () => ({ Component: (await import('./sign-up.tsx')).SignUp }) },
  { path: '/invitation', lazy: async () => ({ Component: (await import('./invitation.tsx')).Invitation }) },
  { path: '/forgotten', lazy: async () => ({ Component: (await import('./forgotten.tsx')).Forgotten }) },
  { path: '/reset', lazy: async () => ({ Component: (await import('./reset.tsx')).Reset }) },
];
