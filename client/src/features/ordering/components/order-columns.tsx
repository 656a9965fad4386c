import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { showTuned } from '@pegwell/shared/music/tuning';
import { entriesOf, setTitle } from '@pegwell/shared/session/board';
import type { Chair, Place } from '@pegwell/shared/session/evening';
import { explain, type ExplainedPlace } from '@pegwell/shared/session/explain';
import { useMemo, useRef } from 'react';
import { entryTitle } from '../../../music/entry-title';
import { keyWords } from '../../../music/key-words';
import { moveOfKind, partKinds } from '../../../pictures/changing-kinds';
import { TuningText } from '../../../pictures/tuning-text';
import { movedFrom, type Compared } from '../compare';
import type { Scope } from '../hooks/use-suggestions';
import { useTravel } from '../hooks/use-travel';
import { StopLine } from './stop-line';
import styles from './order-columns.module.css';

interface OrderColumnsProps {
  readonly before: Compared;
  readonly after: Compared;
  /** The one set that was put in order; the others are as they were, and not shown. */
  readonly scope: Scope;
}

/**
 * The suggested order, set by set: where each tune stood, and before it what is turned and why that counts.
 * The cards travel here from the host's order.
 */
export function OrderColumns({ before, after, scope }: OrderColumnsProps) {
  const list = useRef<HTMLDivElement>(null);
  const from = useMemo(() => movedFrom(before.board, after.board), [before.board, after.board]);
  const places = useMemo(() => explainedPlaces(after), [after]);
  const { changing } = useMemo(() => partKinds(after.evening, after.places), [after]);
  const ids = (compared: Compared) => entriesOf(compared.board).map(({ id }) => id);
  useTravel(list, ids(before), ids(after));
  const numbers = new Map(ids(after).map((id, index) => [id, index + 1]));
  return (
    <div ref={list} className={styles.sets}>
      {after.board.sets.map((set, index) =>
        set.entries.length === 0 || (scope !== null && set.id !== scope) ? null : (
          <section key={set.id} aria-labelledby={`suggested-${set.id}`}>
            <h3 id={`suggested-${set.id}`}>{setTitle(set.title, index)}</h3>
            <ol>
              {set.entries.map((entry) => (
                <Row
                  key={entry.id}
                  entry={entry}
                  number={numbers.get(entry.id) ?? 0}
                  was={from.get(entry.id)}
                  place={places.get(entry.id)}
                  chairs={changing.length > 0 ? changing : after.evening.chairs.slice(0, 1)}
                />
              ))}
            </ol>
          </section>
        ),
      )}
    </div>
  );
}

interface Explained {
  readonly place: Place;
  readonly why: ExplainedPlace;
}

function explainedPlaces({ board, evening, score, places }: Compared): ReadonlyMap<string, Explained> {
  const entries = new Map(entriesOf(board).map((entry) => [entry.id, entry]));
  const called = (id: string) => {
    const entry = entries.get(id);
    return { title: entry ? entryTitle(entry) : '', key: entry?.key ?? '' };
  };
  const byId = new Map(places.map((place) => [place.before, place]));
  return new Map(
    explain(evening, { score, places }, called).flatMap((why) => {
      const place = byId.get(why.before);
      return place ? [[why.before, { place, why }] as const] : [];
    }),
  );
}

interface RowProps {
  readonly entry: ShownEntry;
  readonly number: number;
  /** The number it has in the host's order; undefined where it stays. */
  readonly was: number | undefined;
  /** Undefined for what was called already. */
  readonly place: Explained | undefined;
  readonly chairs: readonly Chair[];
}

function Row({ entry, number, was, place, chairs }: RowProps) {
  return (
    <li data-entry={entry.id} className={styles.row}>
      {place ? <StopLine why={place.why} /> : null}
      <div className={styles.card}>
        <span className={styles.number}>{number}</span>
        <span className={styles.name}>
          <b>{entryTitle(entry)}</b>
          <small>
            {keyWords(entry.key, entry.mode)}
            {entry.pinned ? ' · pinned' : ''}
            {was === undefined ? '' : ` · was ${was}`}
          </small>
        </span>
        <span className={styles.tunings}>
          {chairs.map(({ kind }) => {
            const tuned = place && moveOfKind(place.place, kind.id)?.to;
            return tuned ? (
              <span key={kind.id}>
                {chairs.length > 1 ? <small>{kind.name} </small> : null}
                <TuningText text={showTuned(kind, tuned)} />
              </span>
            ) : null;
          })}
        </span>
      </div>
    </li>
  );
}
