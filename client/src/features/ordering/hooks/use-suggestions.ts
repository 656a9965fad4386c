import type { SessionSuggestion } from '@pegwell/shared/contract/ordering';
import type { Goal } from '@pegwell/shared/session/evening';
import { useQueries, type UseQueryResult } from '@tanstack/react-query';
import { useId } from 'react';
import { ProblemError } from '../../../lib/problem';
import { askSuggestion } from '../api/suggestion';

/** `null`: the whole evening; else one set, the others staying as they are. */
export type Scope = string | null;

interface Asking {
  readonly sessionId: string;
  readonly goal: Goal;
  /** Sets of which an order is worth asking for. */
  readonly setIds: readonly string[];
  /** Another number asks again. */
  readonly round: number;
  /** Saves what is not saved yet; false where that cannot be done now. */
  readonly save: () => Promise<boolean>;
}

export type Suggested = UseQueryResult<SessionSuggestion>;

/** The best order of the whole evening and, once that is there, of each set alone. */
export function useSuggestions({ sessionId, goal, setIds, round, save }: Asking): {
  readonly whole: Suggested;
  readonly of: (setId: string) => Suggested | undefined;
} {
  const visit = useId();
  const asked = (scope: Scope, enabled: boolean) => ({
    queryKey: ['suggestion', sessionId, goal, scope, visit, round],
    queryFn: async ({ signal }: { signal: AbortSignal }) => {
      if (!(await save())) throw new ProblemError(OFFLINE);
      return askSuggestion(sessionId, { goal, ...(scope !== null && { setId: scope }) }, signal);
    },
    enabled,
    retry: false,
    staleTime: Infinity,
    gcTime: 0,
    refetchOnWindowFocus: false,
    refetchOnReconnect: false,
  });
  const [whole] = useQueries({ queries: [asked(null, true)] });
  const sets = useQueries({ queries: setIds.map((setId) => asked(setId, whole.isSuccess)) });
  return { whole, of: (setId) => sets[setIds.indexOf(setId)] };
}

const OFFLINE = {
  status: 0,
  code: 'offline',
  detail: 'An order is looked for on the server, and it cannot be reached. Your changes are kept here.',
};
