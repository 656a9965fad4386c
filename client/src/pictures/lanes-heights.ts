import type { Chair } from '@pegwell/shared/session/evening';
import type { LaneRow } from './lanes-layout';
import { moveOfKind } from './changing-kinds';

/** Distances inside a group of lanes, in px: between strings, around them, and what may stand below. */
const BETWEEN = { alone: 26, among: 21 };
export const AROUND = 16;
export const NAME_ROW = 16;
export const CAPO_ROW = 16;

/** Whether this kind's capo moves anywhere in the row; only then is there a line for it. */
export function capoMoves({ kind }: Chair, row: LaneRow): boolean {
  return row.runs.some((run) =>
    run.tunes.some(({ place }) => {
      const move = moveOfKind(place, kind.id);
      return Boolean(move?.from && move.to && move.from.capo !== move.to.capo);
    }),
  );
}

/** Between two strings; several groups stand closer, so that the board below stays in sight. */
export const betweenStrings = (among: boolean): number => (among ? BETWEEN.among : BETWEEN.alone);

/** @param named true where the group is one of several and says whose it is. */
export function groupHeight(chair: Chair, row: LaneRow, named: boolean): number {
  const strings = (chair.kind.courses.length - 1) * betweenStrings(named) + AROUND * 2;
  return strings + (named ? NAME_ROW : 0) + (capoMoves(chair, row) ? CAPO_ROW : 0);
}
