/** The client's start: theme, query cache, router. */
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router-dom';
import { makeRouter } from './app/router.tsx';
import { applyTheme } from './lib/theme.ts';
import { ApiProblem } from './lib/api-client.ts';
import './styles/main.css';

applyTheme();

const client = new QueryClient({
  defaultOptions: {
    queries: { staleTime: 15_000, retry: (count, error) => !(error instanceof ApiProblem) && count < 2 },
  },
});

const root = document.getElementById('root');
if (root === null) throw new Error('the page has no root');
createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={client}>
      <RouterProvider router={makeRouter(client)} />
    </QueryClientProvider>
  </StrictMode>,
);
