import type { InstrumentKind } from './instrument';
import type { Accidental, Letter, Pitch } from './pitch';
import { midiOf, plainAccidentals, pitchOf, pitchOffset, spell } from './pitch';

/** A letter of a short name with what alters it: `['C', '#']`. */
export type Note = readonly [letter: Letter, accidental: Accidental];

/** @example spelled(['C', '#']) // 'C#' */
export function spelled([letter, accidental]: Note): string {
  return letter + accidental;
}

/** Either the notes, or how far reading came and the part that stopped it. */
export type NoteReading =
  | { readonly ok: true; readonly notes: readonly Note[] }
  | { readonly ok: false; readonly before: readonly Note[]; readonly unread: string };

/**
 * The notes of a short name. Spaces and hyphens stand between notes; letters count in any case.
 *
 * `b` right after a letter alters it: that is the first reading. In small letters it can also be the next
 * string (`gdgbd`); so where the first reading does not give `count` notes, the readings in which fewer `b`
 * alter are tried, those first that alter earlier, and the first that gives `count` is taken.
 * @example readNotes('gDGBbD', 5) // G D G Bb D
 * @example readNotes('gdgbd', 5) // G D G B D
 */
export function readNotes(text: string, count: number): NoteReading {
  const greedy = readGreedily(text);
  if (!greedy.ok || greedy.notes.length === count) return greedy;
  const other = readExactly(text.replace(/[\s-]+/g, ' ').trim(), count);
  return other ? { ok: true, notes: other } : greedy;
}

const NOTE = /[\s-]*([A-Ga-g])([#♯b♭]?)/y;

function readGreedily(text: string): NoteReading {
  const notes: Note[] = [];
  NOTE.lastIndex = 0;
  let end = 0;
  for (let match = NOTE.exec(text); match; match = NOTE.exec(text)) {
    notes.push(noteFrom(match[1]!, match[2]!));
    end = NOTE.lastIndex;
  }
  const rest = text.slice(end).replace(/^[\s-]+|[\s-]+$/g, '');
  if (rest === '') return { ok: true, notes };
  // The part to name: what cannot be read, up to the next letter that can.
  const unread = /^[^A-Ga-g\s]+/.exec(rest)?.[0] ?? rest;
  return { ok: false, before: notes, unread };
}

/**
 * Depth first, a `b` altering before it is a note. What is left and how many notes it must give decide
 * whether it can be read, so each such pair is tried once.
 * @param text notes with single spaces between at most
 */
function readExactly(text: string, count: number, failed = new Set<string>()): readonly Note[] | null {
  const rest = text.trimStart();
  if (rest === '') return count === 0 ? [] : null;
  const key = `${rest.length} ${count}`;
  if (count === 0 || failed.has(key)) return null;
  const letter = rest.charAt(0);
  const sign = /[#♯b♭]/.exec(rest.charAt(1))?.[0] ?? '';
  // Only a small b can be read either way.
  for (const taken of sign === 'b' ? [sign, ''] : [sign]) {
    const following = readExactly(rest.slice(1 + taken.length), count - 1, failed);
    if (following) return [noteFrom(letter, taken), ...following];
  }
  failed.add(key);
  return null;
}

function noteFrom(letter: string, sign: string): Note {
  return [letter.toUpperCase() as Letter, plainAccidentals(sign) as Accidental];
}

/**
 * The pitch of a note nearest to `standard`, at most 6 semitones away; at exactly 6 the lower one. Null only
 * where that lies outside the pitches that can be written.
 * @example nearestPitch(['D', ''], 'G3')?.name // 'D3'
 * @example nearestPitch(['C', '#'], 'G3')?.name // 'C#3', a tritone either way
 */
export function nearestPitch([letter, accidental]: Note, standard: string): Pitch | null {
  const target = midiOf(standard);
  const offset = pitchOffset(letter, accidental);
  // The first such pitch at or above target - 6; the next one is an octave higher, so 6 above never wins.
  const octave = Math.ceil((target - 6 - offset) / 12) - 1;
  return spell(letter, accidental, octave);
}

/**
 * The letters of a tuning in string order, as players say them: a course whose name is in lower case is
 * written so. Whether they read back as the same pitches is another question.
 * @example lettersOf(banjo, ['G4','D3','G3','B3','D4']) // 'gDGBD'
 */
export function lettersOf(kind: InstrumentKind, pitches: readonly string[]): string {
  return pitches
    .map((name, index) => {
      const { letter, accidental } = pitchOf(name);
      const standing = kind.courses[index]?.name ?? letter;
      const small = standing.charAt(0) !== standing.charAt(0).toUpperCase();
      return (small ? letter.toLowerCase() : letter) + accidental;
    })
    .join('');
}
