import { targetFrequency } from '@pegwell/shared/music/temperament';
import type { OwnStrings } from './hooks/use-own-strings';

/**
 * Hertz that a string is tuned to in this room, as this player tunes.
 * @param midi the pitch's number, a capo's frets added
 * @param referenceA A4 of the room, in hertz
 */
export function frequencyOfString(midi: number, referenceA: number, { pureFifths }: OwnStrings): number {
  return targetFrequency(midi, referenceA, pureFifths ? 'fifths' : 'equal');
}
