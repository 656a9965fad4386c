import type { LiveAction, LiveState, LiveStep } from '@pegwell/shared/contract/live';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { newId } from '../../../lib/new-id';
import { ProblemError } from '../../../lib/problem';
import { getLive, liveKey, postStep } from '../api/live';

/** ms between two looks at what other hosts do, while the page is seen. */
const LOOK = 2_000;
/** ms before a step whose answer was lost is sent again, under the same id: it is taken once. */
const AGAIN = [500, 1_500, 4_000];

const lost = (error: unknown) => error instanceof ProblemError && (error.status === 0 || error.status >= 500);

export interface Live {
  /** Null until it is known. */
  readonly state: LiveState | null;
  readonly error: unknown;
  readonly askAgain: () => void;
  /** The step under way. */
  readonly taking: LiveAction | null;
  /** Rejects with a ProblemError when the step was not taken; the state is the newest by then. */
  readonly step: (action: LiveAction, entryId?: string) => Promise<LiveState>;
}

/** Where the evening stands, and how a host takes the next step. Steps of other hosts are taken in. */
export function useLive(sessionId: string): Live {
  const queries = useQueryClient();
  const key = liveKey(sessionId);
  const live = useQuery({
    queryKey: key,
    queryFn: ({ signal }) => getLive(sessionId, signal),
    refetchInterval: LOOK,
    staleTime: 0,
  });
  const take = useMutation({
    mutationFn: (step: LiveStep) => postStep(sessionId, step),
    retry: (failures, error) => failures < AGAIN.length && lost(error),
    retryDelay: (failures) => AGAIN[failures] ?? 0,
    // A look that was under way may have seen the evening as it was before.
    onMutate: () => queries.cancelQueries({ queryKey: key }),
    onSuccess: (state) => queries.setQueryData(key, state),
    onError: (error) => {
      const current = currentOf(error);
      if (current) queries.setQueryData(key, current);
      else void queries.invalidateQueries({ queryKey: key });
    },
  });
  const liveVersion = live.data?.liveVersion;
  return {
    state: live.data ?? null,
    error: live.error,
    askAgain: () => void live.refetch(),
    taking: take.isPending ? take.variables.action : null,
    step: (action, entryId) =>
      take.mutateAsync({
        action,
        actionId: newId(),
        ...(entryId === undefined ? {} : { entryId }),
        ...(liveVersion === undefined ? {} : { liveVersion }),
      }),
  };
}

/** The state that a 409 carries. */
function currentOf(error: unknown): LiveState | null {
  if (!(error instanceof ProblemError) || error.status !== 409) return null;
  return (error.body as { readonly current?: LiveState } | null)?.current ?? null;
}
