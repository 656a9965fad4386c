import type { TunerState } from './tuner';

/**
 * What a tuner's state says to the player, in a sentence.
 * @param peg of the string that is tuned, `D peg (3rd)`
 */
export function tunerWords({ telling, toGo, wrongPeg }: TunerState, peg: string): string {
  switch (telling) {
    case 'quiet':
      return `Pluck the string of the ${peg}.`;
    case 'tuning':
      return toGo === null ? '' : `${Math.round(Math.abs(toGo))} cents to go, ${toGo > 0 ? 'up' : 'down'}`;
    case 'there':
      return 'There. Let it ring.';
    case 'done':
      return 'In tune.';
    case 'wrong':
      return `That was the string of the ${wrongPeg ?? 'wrong peg'}. Pluck the one of the ${peg}.`;
    case 'still':
      return 'The pitch is not moving: are you turning the right peg?';
    case 'past':
      return 'Stop, past the mark. Go a little under, then up to pitch.';
    case 'danger':
      return 'Stop. The string is far over the mark and can break: let it down.';
    case 'slipped':
      return 'It slips back. Push the peg in a little as you turn.';
    case 'capo':
      return 'It sounds as if the capo were on. Take it off first.';
  }
}
