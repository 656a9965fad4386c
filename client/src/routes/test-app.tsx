import { QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import { MemoryRouter } from 'react-router-dom';
import { meKey } from '../features/accounts/api/me';
import { makeQueryClient } from '../lib/query-client';
import { AppRoutes } from '../router';
// Loaded before the tests start to count: the desk brings Chakra, which takes seconds to read.
import './desk-routes';
import '../ui/fields';

/** The whole application at an address, as main.tsx puts it up. */
export function renderApp(path: string) {
  const queries = makeQueryClient((client) => client.setQueryData(meKey, null));
  queries.setDefaultOptions({ queries: { retry: false } });
  return render(
    <QueryClientProvider client={queries}>
      <MemoryRouter initialEntries={[path]}>
        <AppRoutes />
      </MemoryRouter>
    </QueryClientProvider>,
  );
}
