/** The routes: sign-in outside, everything else behind it. Each area brings its own and is loaded when it is opened. */
import type { QueryClient } from '@tanstack/react-query';
import { createBrowserRouter, redirect } from 'react-router-dom';
import type { RouteObject } from 'react-router-dom';
import { ApiProblem } from '../lib/api-client.ts';
import { sessionQuery } from '../queries/session.ts';
import { counterRoutes } from '../pages/counter/routes.ts';
import { insuranceRoutes } from '../pages/insurance/routes.ts';
import { lotRoutes } from '../pages/lots/routes.ts';
import { benchRoutes } from '../pages/my-bench/routes.ts';
import { refiningRoutes } from '../pages/refining/routes.ts';
import { reportRoutes } from '../pages/reports/routes.ts';
import { signInRoutes } from '../pages/sign-in/routes.ts';
import { signatureRoutes } from '../pages/signatures/routes.ts';
import { todayRoutes } from '../pages/today/routes.ts';
import { workshopRoutes } from '../pages/workshop/routes.ts';
import { ErrorPage, NotFound } from './error-page.tsx';
import { Frame } from './frame.tsx';
import { paths } from './paths.ts';

export function makeRouter(client: QueryClient) {
  const inside: RouteObject[] = [
    ...todayRoutes,
    ...counterRoutes,
    ...lotRoutes,
    ...refiningRoutes,
    ...reportRoutes,
    ...insuranceRoutes,
    ...signatureRoutes,
    ...workshopRoutes,
    ...benchRoutes,
  ];
  return createBrowserRouter([
    ...signInRoutes,
    {
      element: <Frame />,
      errorElement: <ErrorPage alone />,
      hydrateFallbackElement: (
        <main>
          <h1 className="opening">Reading the book …</h1>
        </main>
      ),
      loader: ({ request }) => guard(client, request),
      children: [
        { errorElement: <ErrorPage />, children: [...inside, { path: '*', element: <NotFound /> }] },
      ],
    },
  ]);
}

/** Who is not signed in goes to sign-in and comes back; a goldsmith's first page is the own bench. */
async function guard(client: QueryClient, request: Request) {
  const { pathname, search } = new URL(request.url);
  try {
    const session = await client.query({ ...sessionQuery, staleTime: 'static' });
    const { user, workshop, person } = session;
    const missing = workshop.second_factor_roles.includes(person.role) && !user.second_factor;
    if (missing && pathname !== paths.account) return redirect(paths.account);
    if (pathname === paths.today && session.person.role === 'goldsmith') return redirect(paths.myBench);
    return null;
  } catch (error) {
    if (error instanceof ApiProblem && error.status === 401) {
      return redirect(`${paths.signIn}?to=${encodeURIComponent(pathname + search)}`);
    }
    if (error instanceof ApiProblem && error.code === 'role_ended')
      return redirect(`${paths.signIn}?ended=yes`);
    throw error;
  }
}
