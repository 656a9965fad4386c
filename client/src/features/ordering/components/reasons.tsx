import type { Session } from '@pegwell/shared/contract/sessions';
import { entriesOf, setTitle } from '@pegwell/shared/session/board';
import type { Chair, Goal, Place } from '@pegwell/shared/session/evening';
import { moveWords } from '@pegwell/shared/music/words';
import { useMemo, useState } from 'react';
import { count } from '../../../lib/format';
import { Button } from '../../../ui/button';
import { dearest, movedEntries, type Compared } from '../compare';
import styles from './suggestion.module.css';

interface ReasonsProps {
  readonly session: Session;
  readonly goal: Goal;
  readonly before: Compared;
  readonly after: Compared;
}

const FIRST = 8;

/** What moves, what each stop costs, what holds the order back. */
export function Reasons({ session, goal, before, after }: ReasonsProps) {
  const moved = useMemo(() => movedEntries(before.board, after.board), [before, after]);
  const dear = useMemo(() => dearest(session, after, goal).slice(0, 2), [session, after, goal]);
  const [all, setAll] = useState(false);
  const numbers = new Map(entriesOf(after.board).map(({ id }, index) => [id, index + 1]));
  const costly = after.places.filter(({ pegChanges }) => pegChanges > 0);
  const pinned = entriesOf(after.board).filter((entry) => entry.pinned);
  return (
    <>
      <div className={styles.why}>
        <section>
          <h3>What moves</h3>
          <ol>
            {moved.slice(0, all ? undefined : FIRST).map(({ entry, from, to }) => (
              <li key={entry.id}>
                <span>{entry.title ?? `${entry.key} tunes`}</span>
                <span className={styles.quiet}>
                  {from} <span aria-hidden="true">→</span>
                  <span className="visually-hidden">to</span> {to}
                </span>
              </li>
            ))}
          </ol>
          {moved.length > FIRST && !all ? (
            <Button look="quiet" onClick={() => setAll(true)}>
              {moved.length - FIRST} more
            </Button>
          ) : null}
        </section>
        <section>
          <h3>What each stop costs</h3>
          {costly.length === 0 ? <p>Nobody turns a peg all evening.</p> : null}
          <ol>
            {costly.map((place) => (
              <li key={place.before}>
                <span>
                  before {numbers.get(place.before)}
                  {place.offClock ? ', off the clock' : ''}: {wordsOf(place, after.evening.chairs)}
                </span>
                <span className={styles.price}>{count(place.pegChanges, 'peg')}</span>
              </li>
            ))}
          </ol>
        </section>
        <section>
          <h3>What holds it back</h3>
          <ul>
            {tuningsOf(after).map((sentence) => (
              <li key={sentence}>{sentence}</li>
            ))}
            {dear.map(({ entry, pegChanges }) => (
              <li key={entry.id}>
                Without {entry.title ?? `the ${entry.key} tunes`} this order needs {pegChanges}.
              </li>
            ))}
            <li>
              {pinned.length === 0
                ? 'Nothing is pinned.'
                : `${count(pinned.length, 'tune')} pinned: ${pinned.map(({ title, key }) => title ?? `${key} tunes`).join(', ')}.`}
            </li>
          </ul>
        </section>
      </div>
      <details className={styles.whole}>
        <summary>The whole order</summary>
        <div className={styles.why}>
          {after.board.sets.map((set, index) => (
            <section key={set.id}>
              <h3>{setTitle(set.title, index)}</h3>
              <ol>
                {set.entries.map((entry) => (
                  <li key={entry.id}>
                    <span>
                      {numbers.get(entry.id)} {entry.title ?? `${entry.key} tunes`}
                    </span>
                  </li>
                ))}
              </ol>
            </section>
          ))}
        </div>
      </details>
    </>
  );
}

function wordsOf(place: Place, chairs: readonly Chair[]): string {
  const turning = chairs.flatMap(({ kind }) => {
    const move = place.kinds.find((each) => each.kind === kind.id);
    if (!move?.from || !move.to || move.pegChanges === 0) return [];
    const words = moveWords(kind, move.from, move.to);
    return [chairs.length > 1 ? `${kind.name.toLowerCase()}: ${words}` : words];
  });
  return turning.join('; ');
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
