import type { Chair } from '@pegwell/shared/session/evening';
import type { LaneRow } from './lanes-layout';
import { levelOf } from './lanes-layout';

/**
 * How far a semitone lifts a lane, and how far a lane may leave its own ground, as parts of the distance
 * between two lanes: neighbours that both leave it never touch.
 */
const PER_SEMITONE = 0.12;
const MOST = 0.43;
/** Half the length of a step. */
const HALF = 8;

export interface Ground {
  /** Where the lane runs while its string is at its standard pitch. */
  readonly y: number;
  /** Distance between two lanes. */
  readonly between: number;
}

/** The height of a string that stands `level` semitones above its standard pitch. */
export function laneY({ y, between }: Ground, level: number): number {
  return y - between * Math.max(-MOST, Math.min(MOST, level * PER_SEMITONE));
}

/**
 * One string through one row as an SVG path: a line per tune, an S where the peg turns, nothing in a gap
 * and nothing while the kind is free.
 */
export function lanePath(row: LaneRow, column: number, chair: Chair, course: number, ground: Ground): string {
  const commands: string[] = [];
  for (const run of row.runs) {
    let at: number | null = null;
    for (const [index, tune] of run.tunes.entries()) {
      const level = levelOf(chair, course, tune.place);
      if (level === null) {
        if (at !== null) commands.push(`H${tune.x}`);
        at = null;
        continue;
      }
      const here = laneY(ground, level);
      if (index === 0 && run.lead === 'tail') {
        // The row above goes on here: start at the level it ended on.
        const before = levelOf(chair, course, tune.place, 'from');
        if (before !== null) {
          at = laneY(ground, before);
          commands.push(`M${tune.x - 16} ${at}`);
        }
      }
      if (at === null) commands.push(`M${tune.x} ${here}`);
      else if (at !== here) {
        const edge = index === 0 ? tune.x - 4 : tune.x;
        commands.push(`H${edge - HALF}C${edge} ${at} ${edge} ${here} ${edge + HALF} ${here}`);
      }
      at = here;
    }
    const last = run.tunes.at(-1);
    if (at !== null && last) commands.push(`H${last.x + column}`);
  }
  return commands.join('');
}
