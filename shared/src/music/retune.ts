import type { InstrumentKind } from './instrument';
import { midiOf } from './pitch';

/** From one tuning of a kind to another, on one instrument. */
export interface Retune {
  /** Signed semitones per course, 0 where the string stays. */
  readonly deltas: readonly number[];
  /** Pegs of the courses whose delta is not 0. */
  readonly pegChanges: number;
  /** Pegs x |delta|, summed over courses. */
  readonly semitones: number;
}

/**
 * Capos play no part: pitches are those without the capo.
 * @param from spelled pitches, one per course
 * @param to spelled pitches, one per course
 * @throws RangeError where the number of pitches is not the kind's number of courses.
 * @example retune(fiddle, ['G3','D4','A4','E5'], ['A3','E4','A4','E5'])
 *   // { deltas: [2, 2, 0, 0], pegChanges: 2, semitones: 4 }
 */
export function retune(kind: InstrumentKind, from: readonly string[], to: readonly string[]): Retune {
  const count = kind.courses.length;
  if (from.length !== count || to.length !== count) {
    throw new RangeError(`A ${kind.id} has ${count} courses: ${from.join(' ')} to ${to.join(' ')}`);
  }
  const deltas = from.map((name, index) => midiOf(to[index]!) - midiOf(name));
  let pegChanges = 0;
  let semitones = 0;
  kind.courses.forEach(({ pegs }, index) => {
    const delta = deltas[index]!;
    if (delta !== 0) pegChanges += pegs;
    semitones += pegs * Math.abs(delta);
  });
  return { deltas, pegChanges, semitones };
}
