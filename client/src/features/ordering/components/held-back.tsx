import type { HeldBack as Answer } from '@pegwell/shared/contract/explain';
import type { Session } from '@pegwell/shared/contract/sessions';
import { entriesOf } from '@pegwell/shared/session/board';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { count, listOf } from '../../../lib/format';
import { entryTitle } from '../../../music/entry-title';
import { Button } from '../../../ui/button';
import { Failing, Loading } from '../../../ui/states';
import { askHeldBack } from '../api/suggestion';
import type { Compared, Order } from '../compare';
import type { Scope } from '../hooks/use-suggestions';
import styles from './held-back.module.css';

interface HeldBackProps {
  readonly session: Session;
  readonly scope: Scope;
  readonly order: Order;
  readonly after: Compared;
}

const FIRST = 6;

/** What the order would gain without a pin, a medley, a pair or a tune: asked for, because it takes a while. */
export function HeldBack({ session, scope, order, after }: HeldBackProps) {
  const { goal } = after.evening;
  const key = [
    'held-back',
    session.id,
    session.version,
    goal,
    scope,
    order.map((ids) => ids.join()).join(';'),
  ];
  const [asked, setAsked] = useState<string | null>(null);
  const wanted = asked === key.join();
  const answer = useQuery({
    queryKey: key,
    queryFn: ({ signal }) =>
      askHeldBack(
        session.id,
        { goal, sets: order.map((ids) => [...ids]), ...(scope !== null && { setId: scope }) },
        signal,
      ),
    enabled: wanted,
    retry: false,
    staleTime: Infinity,
  });
  return (
    <section className={styles.back} aria-labelledby="held-back">
      <h3 id="held-back">What holds it back</h3>
      <ul>
        {tuningsOf(after).map((sentence) => (
          <li key={sentence}>{sentence}</li>
        ))}
      </ul>
      {!wanted ? (
        <>
          <p>Tries the order without each pin, medley and tune. It takes a few seconds.</p>
          <Button look="outline" onClick={() => setAsked(key.join())}>
            What holds it back?
          </Button>
        </>
      ) : answer.isPending ? (
        <>
          <p>Every rule and every tune is left out in turn.</p>
          <Loading what="what holds it back" />
          <Button look="quiet" onClick={() => setAsked(null)}>
            Stop
          </Button>
        </>
      ) : answer.isError ? (
        <Failing title="That could not be tried" error={answer.error} onRetry={() => void answer.refetch()} />
      ) : (
        <Gains answer={answer.data} after={after} />
      )}
    </section>
  );
}

function Gains({ answer, after }: { readonly answer: Answer; readonly after: Compared }) {
  const [all, setAll] = useState(false);
  const titles = new Map(entriesOf(after.board).map((entry) => [entry.id, entryTitle(entry)]));
  const gains = answer.items.filter(({ gains: better }) => better);
  const idle = answer.items.filter(({ gains: better }) => !better);
  return (
    <div role="status">
      <ul>
        {gains.slice(0, all ? undefined : FIRST).map(({ rule, ids, alike, words }) => (
          <li key={`${rule} ${ids.join(' ')}`}>
            {words}
            {alike.length > 0 ? (
              <small>The same without {listOf(alike.map((id) => titles.get(id) ?? ''))}.</small>
            ) : null}
          </li>
        ))}
        {idle.map(({ rule, ids, words }) => (
          <li key={`${rule} ${ids.join(' ')}`} className={styles.idle}>
            {words}
          </li>
        ))}
        {gains.length === 0 ? (
          <li>Leaving out any one tune{idle.length > 0 ? ' or rule' : ''} makes it no better.</li>
        ) : null}
      </ul>
      {gains.length > FIRST && !all ? (
        <Button look="quiet" onClick={() => setAll(true)}>
          {gains.length - FIRST} more
        </Button>
      ) : null}
      {answer.untried > 0 ? (
        <p>{count(answer.untried, 'tune')} with few pegs beside them were not tried.</p>
      ) : null}
    </div>
  );
}

/** `5 tunings on the fiddle.` */
function tuningsOf({ evening, places }: Compared): readonly string[] {
  return evening.chairs.flatMap(({ kind }) => {
    const played = places.flatMap(({ kinds }) => {
      const to = kinds.find((move) => move.kind === kind.id)?.to;
      return to ? [to.pitches.join(' ')] : [];
    });
    const different = new Set(played).size;
    return different > 1 ? [`${different} tunings on the ${kind.name.toLowerCase()}.`] : [];
  });
}
