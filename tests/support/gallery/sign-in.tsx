/** The sign-in page by itself, for looking at without a server. `?theme=charcoal` shows the other theme. */
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { createRoot } from 'react-dom/client';
import { MemoryRouter } from 'react-router-dom';
import { SignIn } from '../../../src/pages/sign-in/sign-in.tsx';
import '../../../src/styles/main.css';

const theme = new URLSearchParams(location.search).get('theme');
if (theme !== null) document.documentElement.dataset['theme'] = theme;

const root = document.getElementById('root');
if (root !== null)
  createRoot(root).render(
    <QueryClientProvider client={new QueryClient()}>
      <MemoryRouter>
        <SignIn />
      </MemoryRouter>
    </QueryClientProvider>,
  );
