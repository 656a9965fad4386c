import { frequencyOf } from './pitch';

/** `equal`: twelve like steps. `fifths`: pure fifths from A, as many fiddlers tune. */
export type Temperament = 'equal' | 'fifths';

/** Cents by which a pure fifth (3:2) is wider than seven equal semitones: 1200 log2(3/2) - 700. */
export const FIFTH_WIDER = 1200 * Math.log2(1.5) - 700;

/** Beyond so many fifths from A the ear asks for something else than a chain of them. */
const FARTHEST = 3;

/**
 * How far a note of this tuning of the room lies from equal temperament, in cents. In pure fifths from A: D one
 * fifth below it, G two, C three; E one above, B two, F# three; all others stay equal.
 * @example centsFromEqual(55, 'fifths') // -3.9, a fiddle's G
 */
export function centsFromEqual(midi: number, temperament: Temperament): number {
  if (temperament === 'equal') return 0;
  // Seven fifths up are one semitone (and octaves): 7 is its own inverse modulo 12.
  const fifths = ((((midi - 69) * 7) % 12) + 12) % 12;
  const signed = fifths > 6 ? fifths - 12 : fifths;
  return Math.abs(signed) <= FARTHEST ? signed * FIFTH_WIDER : 0;
}

/**
 * Hertz that a string is to be tuned to.
 * @param referenceA A4 in hertz, 415 to 466
 */
export function targetFrequency(midi: number, referenceA: number, temperament: Temperament): number {
  return frequencyOf(midi, referenceA) * 2 ** (centsFromEqual(midi, temperament) / 1200);
}
