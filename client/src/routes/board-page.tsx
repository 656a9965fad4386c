import type { Session, UpdateSession } from '@pegwell/shared/contract/sessions';
import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import { useSearchParams } from 'react-router-dom';
import { useMe } from '../features/accounts/hooks/use-me';
import { SuggestionView } from '../features/ordering/components/suggestion-view';
import type { Taken } from '../features/ordering/taken';
import { sessionKey, updateSession } from '../features/sessions/api/session';
import { Board } from '../features/sessions/components/board';
import { useBoard } from '../features/sessions/hooks/use-board';
import { sentenceOf } from '../lib/problem';
import { useMedia } from '../lib/use-media';
import { Moving } from '../ui/moving';
import { useSay } from '../ui/status';
import { EveningLoaded } from './evening-loaded';
import { useAssumedFor } from './use-assumed-for';

/** Milliseconds for which the old order is seen again before its cards travel to the new one. */
const SETTLE = 600;

/** One evening: built by a host, read by a player. */
export function BoardPage() {
  const accountId = useMe().data?.user.id;
  return (
    <EveningLoaded>
      {(session) =>
        accountId && (
          <Moving>
            <Evening key={session.id} session={session} accountId={accountId} />
          </Moving>
        )
      }
    </EveningLoaded>
  );
}

function Evening({ session, accountId }: { readonly session: Session; readonly accountId: string }) {
  const held = useBoard(session, accountId);
  const queries = useQueryClient();
  const assumedFor = useAssumedFor(session.circleId);
  const say = useSay();
  const [search, setSearch] = useSearchParams();
  const calm = useMedia('(prefers-reduced-motion: reduce)');
  const mayChange = session.can.includes('sessions.change') && session.status !== 'finished';

  const suggesting = search.has('suggest') && mayChange;
  const suggested = useRef(suggesting);
  /** An order that is taken once the board is seen again. */
  const taken = useRef<Taken | null>(null);

  const update = async (changes: UpdateSession) => {
    const changed = await updateSession(session.id, changes);
    queries.setQueryData(sessionKey(session.id), changed);
    held.receive(changed);
  };

  const changeGoal = (goal: Session['goal']) =>
    void update({ goal }).catch((error: unknown) => say(sentenceOf(error)));

  const accept = async ({ label, version, order, goal }: Taken) => {
    const before = session.goal;
    try {
      await held.accept(label, { version, sets: order.map((ids) => [...ids]) });
      // An order is taken with what it was the best for.
      if (goal !== before) await update({ goal });
      const undo = () => {
        held.takeBack();
        if (goal !== before) changeGoal(before);
      };
      say(`${label}.`, { label: 'Undo', onPress: undo });
    } catch (error) {
      say(sentenceOf(error));
    }
  };

  // The keyboard goes along to the suggestion and back to the board.
  useEffect(() => {
    if (suggested.current === suggesting) return;
    suggested.current = suggesting;
    const order = taken.current;
    taken.current = null;
    // Seen in its old order first, so that the cards are seen to travel.
    if (order) setTimeout(() => void accept(order), calm ? 0 : SETTLE);
    document.getElementById('main')?.focus({ preventScroll: true });
    window.scrollTo(0, 0);
  });

  if (suggesting) {
    return (
      <SuggestionView
        session={held.session}
        board={held.board}
        save={held.flush}
        perform={held.perform}
        onTake={(order) => {
          taken.current = order;
          setSearch({}, { replace: true });
        }}
        onKeep={() => setSearch({}, { replace: true })}
      />
    );
  }
  return (
    <Board
      held={held}
      mayChange={mayChange}
      assumedFor={assumedFor}
      onUpdate={update}
      onGoal={changeGoal}
      onSuggest={() => setSearch({ suggest: '' })}
    />
  );
}
