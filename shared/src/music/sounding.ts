import { Interval, Note } from 'tonal';
import type { InstrumentKind } from './instrument';
import { lettersOf } from './short-name';
import type { Tuned } from './tuning';

/**
 * How strings sound once the capo is on: the pitches raised by its fret, spelled by the interval and never
 * with a double sharp or flat. A banjo's fifth follows by its spike.
 *
 * tonal knows how an interval spells. It cannot be taken in parts (8.4 kB compressed), so this stands apart
 * from the files that a phone page needs.
 * @example soundingPitches({ pitches: ['G4','D3','G3','B3','D4'], capo: 2 }) // ['A4','E3','A3','C#4','E4']
 */
export function soundingPitches({ pitches, capo }: Tuned): readonly string[] {
  if (capo === 0) return pitches;
  const interval = Interval.fromSemitones(capo);
  return pitches.map((name) => {
    const raised = Note.transpose(name, interval);
    return /##|bb/.test(raised) ? Note.simplify(raised) : raised;
  });
}

/**
 * The letters as they sound, the way many banjo players name a tuning with its capo.
 * @example soundsAs(banjo, { pitches: ['G4','C3','G3','C4','D4'], capo: 2 }) // 'aDADE'
 */
export function soundsAs(kind: InstrumentKind, tuned: Tuned): string {
  return lettersOf(kind, soundingPitches(tuned));
}
