/**
 * The lowest step of the ladder: a pitch in scientific pitch notation, its MIDI number and frequency.
 *
 * Middle C is C4 = MIDI 60, A4 = MIDI 69 = 440 Hz (ISO 16:1975); f = 440 * 2^((m - 69) / 12)
 * (J. Wolfe, UNSW Physics, "Note names, MIDI numbers and frequencies").
 *
 * Written out rather than taken from tonal, which cannot be taken in parts: 8.4 kB compressed on the phone's
 * page, for these lines. The tests hold every spelling against tonal.
 */
export type Letter = 'C' | 'D' | 'E' | 'F' | 'G' | 'A' | 'B';
export type Accidental = '' | '#' | 'b' | '##' | 'bb';

export interface Pitch {
  /** As spelled, accidentals in ASCII: `Bb3`. */
  readonly name: string;
  readonly letter: Letter;
  readonly accidental: Accidental;
  /** 0 to 9; the octave of the letter, so that `B#3` sounds as `C4`. */
  readonly octave: number;
  /** 0 to 127. */
  readonly midi: number;
}

/** Semitones of each letter above C. */
const LETTER_SEMITONES: Readonly<Record<Letter, number>> = { C: 0, D: 2, E: 4, F: 5, G: 7, A: 9, B: 11 };
const ACCIDENTAL_SEMITONES: Readonly<Record<Accidental, number>> = { '': 0, '#': 1, b: -1, '##': 2, bb: -2 };

const PITCH = /^([A-Ga-g])(##?|bb?)?([0-9])$/;
const TONIC = /^([A-Ga-g])(#|b)?$/;

/** The signs `♯` and `♭` as the keys that stand for them. `C♯5` -> `C#5` */
export function plainAccidentals(text: string): string {
  return text.replaceAll('♯', '#').replaceAll('♭', 'b');
}

/**
 * A pitch as a person writes it, or null. The letter may be of either case.
 * @example parsePitch('Bb3') // { name: 'Bb3', letter: 'B', accidental: 'b', octave: 3, midi: 58 }
 * @example parsePitch('c♯5')?.name // 'C#5'
 * @example parsePitch('H3') // null
 */
export function parsePitch(text: string): Pitch | null {
  const match = PITCH.exec(plainAccidentals(text.trim()));
  if (!match) return null;
  return spell(match[1]!.toUpperCase() as Letter, (match[2] ?? '') as Accidental, Number(match[3]));
}

/** The pitch of a letter, accidental and octave; null outside MIDI 0 to 127 or octaves 0 to 9. */
export function spell(letter: Letter, accidental: Accidental, octave: number): Pitch | null {
  const midi = 12 * (octave + 1) + pitchOffset(letter, accidental);
  if (octave < 0 || octave > 9 || midi < 0 || midi > 127) return null;
  return { name: `${letter}${accidental}${octave}`, letter, accidental, octave, midi };
}

/** Semitones above the C of the letter's own octave: -2 (`Cbb`) to 13 (`B##`). */
export function pitchOffset(letter: Letter, accidental: Accidental): number {
  return LETTER_SEMITONES[letter] + ACCIDENTAL_SEMITONES[accidental];
}

/** A pitch that is known to be well spelled; anything else is a programmer's error and throws. */
export function pitchOf(name: string): Pitch {
  const pitch = parsePitch(name);
  if (!pitch) throw new RangeError(`Not a pitch: ${JSON.stringify(name)}`);
  return pitch;
}

/**
 * @throws RangeError for a name that is no pitch.
 * @example midiOf('C4') // 60
 */
export function midiOf(name: string): number {
  return pitchOf(name).midi;
}

/** The letter and accidental without the octave. `noteOf('C#5') // 'C#'` */
export function noteOf(name: string): string {
  const { letter, accidental } = pitchOf(name);
  return letter + accidental;
}

/**
 * Hertz of a MIDI number in equal temperament; `referenceA` is A4 in hertz (a circle's own, 415 to 466).
 * @example frequencyOf(69) // 440
 */
export function frequencyOf(midi: number, referenceA = 440): number {
  return referenceA * 2 ** ((midi - 69) / 12);
}

/** How far `f2` lies above `f1`, in cents (1200 to the octave): 1200 log2(f2 / f1). */
export function centsBetween(f1: number, f2: number): number {
  return 1200 * Math.log2(f2 / f1);
}

/**
 * The tonic of a key: a letter, sharp or flat or neither. Tonics are equal by `pitchClass` (C is 0):
 * A# and Bb sound alike.
 * @example parseTonic('Bb') // { name: 'Bb', pitchClass: 10 }
 * @example parseTonic('H') // null
 */
export function parseTonic(text: string): { readonly name: string; readonly pitchClass: number } | null {
  const match = TONIC.exec(plainAccidentals(text.trim()));
  if (!match) return null;
  const letter = match[1]!.toUpperCase() as Letter;
  const accidental = (match[2] ?? '') as Accidental;
  return { name: letter + accidental, pitchClass: (pitchOffset(letter, accidental) + 12) % 12 };
}
