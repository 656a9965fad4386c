import type { InstrumentKind } from './instrument';
import type { Accidental, Letter, Pitch } from './pitch';
import { midiOf, pitchOf, pitchOffset, spell } from './pitch';

/** A letter of a short name with what alters it: `['C', '#']`. */
export type Note = readonly [letter: Letter, accidental: Accidental];

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

const GREEDY = /[\s-]*([A-Ga-g])([#b]?)/y;

function readGreedily(text: string): NoteReading {
  const notes: Note[] = [];
  GREEDY.lastIndex = 0;
  let end = 0;
  for (let match = GREEDY.exec(text); match; match = GREEDY.exec(text)) {
    notes.push(noteFrom(match[1]!, match[2]!));
    end = GREEDY.lastIndex;
  }
  const rest = text.slice(end).replace(/^[\s-]+|[\s-]+$/g, '');
  if (rest === '') return { ok: true, notes };
  // The part to name: what cannot be read, up to the next letter that can.
  const unread = /^[^A-Ga-g\s]+/.exec(rest)?.[0] ?? rest;
  return { ok: false, before: notes, unread };
}

/** Depth first, a `b` altering before it is a note; a rest that cannot give `count` notes is cut off. */
function readExactly(text: string, count: number): readonly Note[] | null {
  const rest = text.startsWith(' ') ? text.slice(1) : text;
  if (rest === '') return count === 0 ? [] : null;
  // Each note takes at most a letter, an accidental and a space.
  if (count === 0 || rest.length > 3 * count) return null;
  const sign = rest[1] === '#' || rest[1] === 'b' ? rest[1] : '';
  if (sign !== '') {
    const altered = readExactly(rest.slice(2), count - 1);
    if (altered) return [noteFrom(rest[0]!, sign), ...altered];
  }
  if (sign === '#') return null;
  const plain = readExactly(rest.slice(1), count - 1);
  return plain && [noteFrom(rest[0]!, ''), ...plain];
}

function noteFrom(letter: string, sign: string): Note {
  return [letter.toUpperCase() as Letter, sign as Accidental];
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
