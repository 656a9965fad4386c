import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import type { Board } from '@pegwell/shared/session/board';
import { useQuery } from '@tanstack/react-query';
import { useId } from 'react';
import { ProblemError } from '../../../lib/problem';
import { Button } from '../../../ui/button';
import { PageHeading } from '../../../ui/page';
import { Failing, Loading } from '../../../ui/states';
import { askSuggestion } from '../api/suggestion';
import type { Order } from '../compare';
import { Comparison } from './comparison';

interface SuggestionViewProps {
  readonly session: Session;
  readonly board: Board<ShownEntry>;
  /** Saves what is not saved yet; false where that cannot be done now. */
  readonly save: () => Promise<boolean>;
  readonly onTake: (label: string, version: number, order: Order) => void;
  readonly onKeep: () => void;
}

/** A better order beside the host's own. Nothing changes until it is taken. */
export function SuggestionView({ session, board, save, onTake, onKeep }: SuggestionViewProps) {
  const { goal } = session;
  const asked = useId();
  const suggestion = useQuery({
    queryKey: ['suggestion', session.id, goal, asked],
    queryFn: async ({ signal }) => {
      if (!(await save())) {
        throw new ProblemError({
          status: 0,
          code: 'offline',
          detail:
            'An order is looked for on the server, and it cannot be reached. Your changes are kept here.',
        });
      }
      return askSuggestion(session.id, { goal }, signal);
    },
    retry: false,
    staleTime: Infinity,
    gcTime: 0,
    refetchOnWindowFocus: false,
    refetchOnReconnect: false,
  });
  const again = () => void suggestion.refetch();
  const keep = (
    <Button look="outline" onClick={onKeep}>
      Keep mine
    </Button>
  );

  if (suggestion.isFetching || suggestion.isPending) {
    return (
      <>
        <PageHeading
          title={`An order for ${session.title}`}
          about="Every order that keeps your rules is weighed. It takes a moment, five seconds at most."
        >
          {keep}
        </PageHeading>
        <Loading what="a better order" />
      </>
    );
  }
  if (suggestion.isError) {
    const clash = suggestion.error instanceof ProblemError && suggestion.error.code === 'rules-clash';
    return (
      <>
        <PageHeading title={`An order for ${session.title}`} />
        <Failing
          title={clash ? 'No order keeps all your rules' : 'No order could be suggested'}
          error={suggestion.error}
          {...(clash ? {} : { onRetry: again })}
        >
          {keep}
        </Failing>
      </>
    );
  }
  return (
    <Comparison
      session={session}
      board={board}
      suggestion={suggestion.data}
      onTake={onTake}
      onKeep={onKeep}
      onAskAgain={again}
    />
  );
}
