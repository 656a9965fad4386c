import type { Chair, Place } from '@pegwell/shared/session/evening';
import { LanesGroup } from './lanes-group';
import type { LaneRow } from './lanes-layout';
import { GAP, NAMES, stopX } from './lanes-layout';
import { moveOfKind } from './changing-kinds';
import { NAME_ROW, groupHeight } from './lanes-heights';
import styles from './string-lanes.module.css';

interface LanesRowProps {
  readonly row: LaneRow;
  readonly column: number;
  readonly width: number;
  readonly chairs: readonly Chair[];
  /** Whether each group says whose it is. */
  readonly named: boolean;
  readonly highlight: string | null;
}

const STOPS = 24;
const NUMBERS = 20;

interface Group {
  readonly chair: Chair;
  readonly top: number;
  readonly bottom: number;
}

/** The groups under each other, below the line of stops. */
function stack(chairs: readonly Chair[], row: LaneRow, named: boolean): readonly Group[] {
  let top = STOPS;
  return chairs.map((chair) => {
    const group = { chair, top, bottom: top + groupHeight(chair, row, named) };
    top = group.bottom;
    return group;
  });
}

/** Room for "off the clock" along the lanes, in px. */
const OFF_WORDS = 80;

/**
 * The middle of the words beside a gap: in the group with most room, below its name, which may be longer than
 * the strings' names and reach into the gap.
 */
function offWordsY(groups: readonly Group[], named: boolean): number {
  const nameBelow = named ? NAME_ROW + 6 : 0;
  const [widest] = [...groups].sort((a, b) => b.bottom - b.top - (a.bottom - a.top));
  const { top, bottom } = widest ?? { top: STOPS, bottom: STOPS };
  return Math.max((top + nameBelow + bottom) / 2, top + nameBelow + OFF_WORDS / 2);
}

/** One row of the picture: stops with their prices on top, a group per kind, the tunes' numbers below. */
export function LanesRow({ row, column, width, chairs, named, highlight }: LanesRowProps) {
  const groups = stack(chairs, row, named);
  const bottom = groups.at(-1)?.bottom ?? STOPS;
  return (
    <svg
      width={width}
      height={bottom + NUMBERS}
      viewBox={`0 0 ${width} ${bottom + NUMBERS}`}
      aria-hidden="true"
    >
      {row.runs.flatMap((run) =>
        run.tunes.map((tune) => (
          <g key={tune.id}>
            <title>{`${tune.number} ${tune.title}`}</title>
            <rect
              className={tune.id === highlight ? styles.hereShade : styles.shade}
              x={tune.x}
              y={STOPS - 6}
              width={column}
              height={bottom - STOPS + 6}
              fillOpacity={tune.number % 2 === 1 || tune.id === highlight ? 1 : 0}
            />
            <text
              className={`${styles.number} ${tune.id === highlight ? styles.here : ''}`}
              x={tune.x + column / 2}
              y={bottom + 15}
              textAnchor="middle"
            >
              {tune.number}
            </text>
          </g>
        )),
      )}
      {row.runs.map((run) =>
        run.lead === 'break' || (run.lead === 'opening' && run.tunes[0]?.place.pegChanges) ? (
          <text
            key={run.x}
            className={styles.offWords}
            textAnchor="middle"
            transform={`translate(${run.x - GAP / 2 + 4} ${offWordsY(groups, named)}) rotate(-90)`}
          >
            off the clock
          </text>
        ) : null,
      )}
      {groups.map(({ chair, top }) => (
        <LanesGroup key={chair.kind.id} {...{ chair, row, column, top, named }} />
      ))}
      {row.runs.flatMap((run) =>
        run.tunes
          .filter((tune) => tune.place.pegChanges > 0)
          .map((tune) => <Stop key={tune.id} x={stopX(run, tune)} place={tune.place} groups={groups} />),
      )}
      {groups.slice(1).map(({ top }) => (
        <line key={top} x1={NAMES} x2={row.end} y1={top + 1} y2={top + 1} stroke="var(--line)" />
      ))}
    </svg>
  );
}

interface StopProps {
  readonly x: number;
  readonly place: Place;
  readonly groups: readonly Group[];
}

/**
 * On the clock a filled mark with a band through the lanes of those who turn; off the clock an outline,
 * for it costs no time. The price counts all chairs.
 */
function Stop({ x, place, groups }: StopProps) {
  const { offClock, pegChanges } = place;
  const half = pegChanges > 99 ? 14 : 10;
  const mark = { x: x - half, y: 2, width: half * 2, height: 20, rx: 10 };
  const foot = groups.at(-1)?.bottom ?? STOPS;
  const turning = groups.filter(({ chair }) => (moveOfKind(place, chair.kind.id)?.pegChanges ?? 0) > 0);
  return (
    <g>
      {offClock || turning.length === groups.length ? null : (
        <line className={styles.stem} x1={x} x2={x} y1={STOPS - 2} y2={foot} />
      )}
      {offClock
        ? null
        : turning.map(({ chair, top, bottom }) => (
            <rect
              key={chair.kind.id}
              className={styles.band}
              x={x - 8}
              y={top === STOPS ? 8 : top + 5}
              width={16}
              height={bottom - (top === STOPS ? 8 : top + 5) - 2}
              rx={8}
            />
          ))}
      <rect className={offClock ? styles.off : styles.stop} {...mark} />
      <text className={offClock ? styles.offPrice : styles.stopPrice} x={x} y={16.2} textAnchor="middle">
        {pegChanges}
      </text>
    </g>
  );
}
