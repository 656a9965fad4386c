import type { Chair, Place } from '@pegwell/shared/session/evening';
import { useRef, useState } from 'react';
import { useWidth } from '../lib/use-width';
import type { LanesSet } from './lanes-layout';
import { layoutLanes } from './lanes-layout';
import { LanesRow } from './lanes-row';
import { groupName, lanesSentences, lanesSummary } from './lanes-words';
import styles from './string-lanes.module.css';

interface StringLanesProps {
  /** A group of lanes per kind. A kind that nobody retunes may stand here with the moves worked out alone. */
  readonly chairs: readonly Chair[];
  /** As on the board; empty sets count as none. */
  readonly sets: readonly LanesSet[];
  /** `Scored.places`: one per tune, in playing order. */
  readonly places: readonly Place[];
  /** Whose evening, for a screen reader: "String lanes, as you have it". */
  readonly label?: string;
  /** The tune that is played now or held in the hand. */
  readonly highlight?: string | null;
  /** Leaves room for turns before the first tune, so that two orders stand column under column. */
  readonly roomBefore?: boolean;
}

/**
 * The evening's retuning at a glance. Time runs to the right, each string is a lane, each turned peg a
 * step, each break a gap off the clock; on top of each stop what it costs over all chairs.
 */
export function StringLanes({
  chairs,
  sets,
  places,
  label = 'String lanes',
  highlight,
  roomBefore = false,
}: StringLanesProps) {
  const figure = useRef<HTMLElement>(null);
  const width = useWidth(figure, 1180);
  const [picked, setPicked] = useState<string | null>(null);
  const layout = layoutLanes(sets, places, width, roomBefore);
  const sentences = lanesSentences(chairs, sets, places);

  // Where the evening takes several rows, a phone or a long night, one instrument is shown at a time.
  const oneAtATime = layout.rows.length > 1 && chairs.length > 1;
  const one = chairs.find(({ kind }) => kind.id === picked) ?? chairs[0];
  const shown = oneAtATime && one ? [one] : chairs;

  return (
    <figure className={styles.lanes} ref={figure}>
      <figcaption className="visually-hidden">{`${label}. ${lanesSummary(places)}`}</figcaption>
      {oneAtATime ? (
        <div className={styles.kinds} role="group" aria-label="Lanes of">
          {chairs.map(({ kind, count }) => (
            <button
              key={kind.id}
              type="button"
              aria-pressed={kind.id === one?.kind.id}
              onClick={() => setPicked(kind.id)}
            >
              {groupName({ kind, count })}
            </button>
          ))}
        </div>
      ) : null}
      {layout.rows.map((row) => (
        <LanesRow
          key={row.runs[0]?.tunes[0]?.id}
          row={row}
          column={layout.column}
          width={layout.width}
          chairs={shown}
          named={chairs.length > 1 && !oneAtATime}
          highlight={highlight ?? null}
        />
      ))}
      {sentences.length > 0 ? (
        <ol className="visually-hidden">
          {sentences.map((sentence) => (
            <li key={sentence}>{sentence}</li>
          ))}
        </ol>
      ) : null}
    </figure>
  );
}
