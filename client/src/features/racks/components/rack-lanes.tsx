import type { RackPlan, Racks } from '@pegwell/shared/contract/racks';
import { useRef } from 'react';
import { useWidth } from '../../../lib/use-width';
import { layoutLanes, type LaneRow } from '../../../pictures/lanes-layout';
import { layRack, LANE, NUMBERS, rackPlaces, TOP, type RackLane } from '../rack-layout';
import { titleOf } from '../rack-words';
import styles from './rack-lanes.module.css';

interface RackLanesProps {
  readonly sets: Racks['evening']['sets'];
  readonly plan: RackPlan;
}

/**
 * The evening of one player at a glance, in step with the string lanes: time runs to the right, a lane per
 * instrument; the strong line lies on the one that is played and swings over where they change; a mark where
 * pegs turn carries how many. The list below says the same in words.
 */
export function RackLanes({ sets, plan }: RackLanesProps) {
  const figure = useRef<HTMLDivElement>(null);
  const width = useWidth(figure, 1180);
  const entries = sets.map((set) => ({
    entries: set.tunes.map((tune) => ({ id: tune.id, title: titleOf(tune) })),
  }));
  const { rows, column } = layoutLanes(entries, rackPlaces(sets, plan), width);
  return (
    <div className={styles.lanes} ref={figure} aria-hidden="true">
      {rows.map((row) => (
        <Row key={row.runs[0]?.tunes[0]?.id} {...{ row, column, width, plan }} />
      ))}
    </div>
  );
}

interface RowProps {
  readonly row: LaneRow;
  readonly column: number;
  readonly width: number;
  readonly plan: RackPlan;
}

function Row({ row, column, width, plan }: RowProps) {
  const { lanes, hand, stops } = layRack(row, column, plan);
  const bottom = TOP + lanes.length * LANE;
  return (
    <svg width={width} height={bottom + NUMBERS} viewBox={`0 0 ${width} ${bottom + NUMBERS}`}>
      {row.runs.flatMap((run) =>
        run.tunes.map(({ id, number, title, x }) => (
          <g key={id}>
            <title>{`${number} ${title}`}</title>
            <rect
              className={styles.shade}
              {...{ x, y: TOP - 4, width: column, height: bottom - TOP + 4 }}
              fillOpacity={number % 2}
            />
            <text className={styles.number} x={x + column / 2} y={bottom + 15} textAnchor="middle">
              {number}
            </text>
          </g>
        )),
      )}
      {stops.map((x) => (
        <rect
          key={x}
          className={styles.band}
          {...{ x: x - 8, y: TOP - 4, width: 16, height: bottom - TOP + 4, rx: 8 }}
        />
      ))}
      {lanes.map((lane) => (
        <line
          key={lane.instrument}
          className={styles.rest}
          x1={lane.start}
          x2={row.end}
          y1={lane.y}
          y2={lane.y}
        />
      ))}
      <path className={styles.hand} d={hand} />
      {lanes.map((lane) => (
        <Lane key={lane.instrument} {...lane} />
      ))}
    </svg>
  );
}

function Lane({ instrument, y, labels, marks }: RackLane) {
  return (
    <g>
      <text className={styles.name} x={18} y={y + 6} textAnchor="middle">
        {instrument + 1}
      </text>
      {labels.map(({ x, text, below }) => (
        <text key={x} className={styles.label} x={x} y={below ? y + 20 : y - 9}>
          {text}
        </text>
      ))}
      {marks.map(({ x, pegs, offClock }) => (
        <g key={x}>
          <rect
            className={offClock ? styles.off : styles.stop}
            {...{ x: x - 10, y: y - 10, width: 20, height: 20, rx: 10 }}
          />
          <text
            className={offClock ? styles.offPrice : styles.stopPrice}
            x={x}
            y={y + 4.2}
            textAnchor="middle"
          >
            {pegs}
          </text>
        </g>
      ))}
    </g>
  );
}
