import { midiOf } from '@pegwell/shared/music/pitch';
import type { Chair } from '@pegwell/shared/session/evening';
import { AROUND, NAME_ROW, betweenStrings, capoMoves, groupHeight } from './lanes-heights';
import type { LaneRow, LaneRun, LaneTune } from './lanes-layout';
import { NAMES, levelOf } from './lanes-layout';
import { moveOfKind } from './changing-kinds';
import { groupName } from './lanes-words';
import { lanePath, laneY } from './lanes-path';
import type { Ground } from './lanes-path';
import styles from './string-lanes.module.css';

interface LanesGroupProps {
  readonly chair: Chair;
  readonly row: LaneRow;
  readonly column: number;
  readonly top: number;
  readonly named: boolean;
}

/** The lanes of one kind, the highest-numbered string at the bottom, as the player looks down on them. */
export function LanesGroup({ chair, row, column, top, named }: LanesGroupProps) {
  const { kind } = chair;
  const last = kind.courses.length - 1;
  const first = top + AROUND + (named ? NAME_ROW : 0);
  const between = betweenStrings(named);
  const groundOf = (course: number): Ground => ({ y: first + (last - course) * between, between });
  return (
    <g>
      {named ? (
        <text className={styles.group} x={0} y={top + 17}>
          {groupName(chair)}
        </text>
      ) : null}
      {kind.courses.map((course, index) => {
        const ground = groundOf(index);
        const { y } = ground;
        const path = lanePath(row, column, chair, index, ground);
        return (
          <g key={course.ordinal}>
            <text className={styles.name} x={NAMES - 14} y={y + 4.5} textAnchor="end">
              {course.name}
            </text>
            <line className={styles.ground} x1={NAMES} x2={row.end} y1={y} y2={y} />
            {course.pegs > 1 ? (
              <>
                <path className={styles.lane} d={path} strokeWidth={1.3} transform="translate(0 -1.5)" />
                <path className={styles.lane} d={path} strokeWidth={1.3} transform="translate(0 1.5)" />
              </>
            ) : (
              <path className={styles.lane} d={path} strokeWidth={thickness(chair, index)} />
            )}
          </g>
        );
      })}
      {kind.courses.flatMap((course, index) =>
        row.runs.flatMap((run) =>
          run.tunes.map((tune) => (
            <Turn
              key={`${course.ordinal} ${tune.id}`}
              {...{ chair, run, tune }}
              course={index}
              ground={groundOf(index)}
            />
          )),
        ),
      )}
      {capoMoves(chair, row) ? (
        <Capos chair={chair} row={row} y={top + groupHeight(chair, row, named) - 8} />
      ) : null}
    </g>
  );
}

/** Lower strings are thicker, as they are: 2.6 px for the lowest, 1.5 for the highest. */
function thickness({ kind }: Chair, course: number): number {
  const pitches = kind.courses.map(({ standard }) => midiOf(standard));
  const own = pitches[course] ?? 0;
  const lower = pitches.filter((pitch) => pitch < own).length;
  return 2.6 - (1.1 * lower) / Math.max(1, pitches.length - 1);
}

interface TurnProps {
  readonly chair: Chair;
  readonly run: LaneRun;
  readonly tune: LaneTune;
  readonly course: number;
  readonly ground: Ground;
}

/** Which way and how many semitones, above the lane it leads to. */
function Turn({ chair, run, tune, course, ground }: TurnProps) {
  const delta = moveOfKind(tune.place, chair.kind.id)?.deltas[course] ?? 0;
  if (delta === 0) return null;
  const level = levelOf(chair, course, tune.place) ?? 0;
  const afterGap = run.tunes[0] === tune && (run.lead === 'break' || run.lead === 'opening');
  const x = tune.x + (afterGap ? 3 : 11);
  const at = laneY(ground, level) - 5;
  return (
    <g className={styles.turn} data-turn={delta}>
      <path d={delta > 0 ? `M${x} ${at}h9l-4.5-8z` : `M${x} ${at - 8}h9l-4.5 8z`} />
      <text x={x + 11} y={at}>
        {Math.abs(delta)}
      </text>
    </g>
  );
}

interface CaposProps {
  readonly chair: Chair;
  readonly row: LaneRow;
  readonly y: number;
}

/** Where a capo is put on, moved or taken off: the fret from there on. */
function Capos({ chair, row, y }: CaposProps) {
  return row.runs.flatMap((run) =>
    run.tunes.flatMap((tune) => {
      const move = moveOfKind(tune.place, chair.kind.id);
      if (!move?.from || !move.to || move.from.capo === move.to.capo) return [];
      return [
        <text key={tune.id} className={styles.capo} x={tune.x + 2} y={y}>
          {move.to.capo === 0 ? 'no capo' : `capo ${move.to.capo}`}
        </text>,
      ];
    }),
  );
}
