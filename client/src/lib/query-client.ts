import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { ProblemError } from './problem';

/** Refusals are answers; only a lost connection or a failing server is worth asking again. */
const worthRetrying = (error: unknown) =>
  !(error instanceof ProblemError) || error.status === 0 || error.status >= 500;

/** `onSignedOut` is called whenever an answer says that the sign-in has ended (401). */
export function makeQueryClient(onSignedOut: (client: QueryClient) => void = () => undefined): QueryClient {
  const watch = (error: unknown) => {
    if (error instanceof ProblemError && error.status === 401) onSignedOut(client);
  };
  const client = new QueryClient({
    queryCache: new QueryCache({ onError: watch }),
    mutationCache: new MutationCache({ onError: watch }),
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        retry: (count, error) => count < 2 && worthRetrying(error),
      },
      mutations: { retry: false },
    },
  });
  return client;
}
