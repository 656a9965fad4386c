import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import type { Board } from '@pegwell/shared/session/board';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import { useMemo, useState } from 'react';
import { Button } from '../../../ui/button';
import { PageHeading } from '../../../ui/page';
import { Failing, Loading } from '../../../ui/states';
import { clashesOf } from '../clashes';
import { useSuggestions, type Scope } from '../hooks/use-suggestions';
import type { Taken } from '../taken';
import { ClashView } from './clash-view';
import { Comparison } from './comparison';

interface SuggestionViewProps {
  readonly session: Session;
  readonly board: Board<ShownEntry>;
  /** Saves what is not saved yet; false where that cannot be done now. */
  readonly save: () => Promise<boolean>;
  /** Does away with a rule that clashes. */
  readonly perform: (label: string, operations: readonly BoardOperation<ShownEntry>[]) => boolean;
  readonly onTake: (taken: Taken) => void;
  readonly onKeep: () => void;
}

/** A better order beside the host's own. Nothing changes until it is taken. */
export function SuggestionView({ session, board, save, perform, onTake, onKeep }: SuggestionViewProps) {
  const [goal, setGoal] = useState(session.goal);
  const [scope, setScope] = useState<Scope>(null);
  const [round, setRound] = useState(0);
  const setIds = useMemo(() => setsWorthAsking(session, board), [session, board]);
  const { whole, of } = useSuggestions({ sessionId: session.id, goal, setIds, round, save });
  const again = () => setRound(round + 1);
  const keep = (
    <Button look="outline" onClick={onKeep}>
      Keep mine
    </Button>
  );

  if (whole.isPending) {
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
  if (whole.isError) {
    const clashes = clashesOf(whole.error);
    return clashes ? (
      <ClashView
        {...{ session, board, clashes, perform }}
        sentence={whole.error.message}
        onAgain={again}
        onKeep={onKeep}
      />
    ) : (
      <>
        <PageHeading title={`An order for ${session.title}`} />
        <Failing title="No order could be suggested" error={whole.error} onRetry={again}>
          {keep}
        </Failing>
      </>
    );
  }
  return (
    <Comparison
      {...{ session, board, goal, scope, setIds, of, onTake, onKeep }}
      whole={whole.data}
      onGoal={setGoal}
      onScope={setScope}
      onAskAgain={again}
    />
  );
}

/** Where there are several sets: those with at least two tunes that may change places. */
function setsWorthAsking(session: Session, board: Board<ShownEntry>): readonly string[] {
  const called = new Set(session.status === 'live' ? session.called : []);
  const filled = board.sets.filter(({ entries }) => entries.length > 0);
  if (filled.length < 2) return [];
  const free = (entry: ShownEntry) => !called.has(entry.id) && !entry.pinned;
  return filled.filter(({ entries }) => entries.filter(free).length > 1).map(({ id }) => id);
}
