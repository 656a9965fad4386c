import './theme/fonts.css';
import './theme/tokens.css';
import './theme/base.css';
import { QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { BrowserRouter } from 'react-router-dom';
import { meKey } from './features/accounts/api/me';
import { makeQueryClient } from './lib/query-client';
import { AppRoutes } from './router';

// A sign-in that has ended shows the sign-in page, whichever request found out.
const queries = makeQueryClient((client) => client.setQueryData(meKey, null));

const root = document.getElementById('root');
if (!root) throw new Error('index.html has no #root');
createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={queries}>
      <BrowserRouter>
        <AppRoutes />
      </BrowserRouter>
    </QueryClientProvider>
  </StrictMode>,
);
