import { BUILT_IN_KINDS, builtInKind, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { NAMED_TUNINGS } from '@pegwell/shared/music/named-tunings';
import { midiOf } from '@pegwell/shared/music/pitch';
import { HIGHEST_CAPO, parseTuning, sameTuned, sameTuning, type Tuned } from '@pegwell/shared/music/tuning';

/** Tunings that a text speaks of: proposed, never taken without being asked. */
export interface FoundTunings {
  readonly kind: string;
  readonly accepted: readonly Tuned[];
  /** The words they were found in. */
  readonly said: string;
}

/** Semitones that a string is turned from its standard, at most: the farthest of the built-in named tunings, and one more. */
const FARTHEST = 6;
const LONGEST_SAID = 80;

/** One kind a clause: `fiddle AEAE, banjo gDGBD`. */
const CLAUSE = /[^\n;,.()[\]]+/g;
const NOTE = '[A-Ga-g](?:#|b|♯|♭)?';
/** Letters of strings, close together or by hyphens, and a capo. */
const NOTES = new RegExp(
  `(?<![\\p{L}\\d#♯♭])(${NOTE}(?:-?${NOTE}){2,5})(?![\\p{L}\\d#])(?:\\s+capo\\s+(\\d{1,2}))?`,
  'gu',
);
/** `AABB`, `ABAC`: how often which part. */
const PARTS = /^A[ABC]{2,5}$/;
const CAPITALS = /^(?:[A-G](?:#|b|♯|♭)?-?)+$/;
/** `face`, `Added`: letters of notes, but words. */
const WORD = /^[A-Ga-g][a-g]+$/;
/** Kinds whose high string people write small: `gDGBD`, `DAd`. */
const SMALL_HIGH_STRING = new Set(['banjo', 'dulcimer', 'ukulele']);
const SPEAKS_OF_TUNING = /\b(?:re|cross-?)?tun(?:ed|ing|ings)\b/i;

const KIND_WORDS: readonly (readonly [word: RegExp, kind: InstrumentKind])[] = [
  ...BUILT_IN_KINDS.map((kind) => [kind.id.replace('-', '[- ]'), kind] as const),
  ['violin', builtInKind('fiddle')] as const,
]
  // A fiddle with a high bass is no bass.
  .flatMap(([word, kind]) =>
    kind ? [[new RegExp(`(?<!high |low )\\b${word}s?\\b`, 'i'), kind] as const] : [],
  )
  // `tenor banjo` before `banjo`.
  .sort(([, one], [, other]) => other.id.length - one.id.length);

/** Names that mean a tuning wherever they stand. */
const CLEAR_NAME = /^(?:cross|double|gee-dad|dee-dad|sawmill)/;
/** Names that mean one beside an instrument's; the others are words of their own (`Cajun`), or keys. */
const NEARLY_CLEAR_NAME = /^(?:open|mountain)/;

/** `standard` says nothing of its own, and `cross tuning` not in which key. */
const NAMES = BUILT_IN_KINDS.flatMap((kind) =>
  (NAMED_TUNINGS[kind.id] ?? []).flatMap(({ names, pitches }) =>
    names
      .filter((name) => name !== 'standard' && name !== 'cross tuning')
      .map((name) => ({ name: name.toLowerCase(), kind, pitches })),
  ),
);

/**
 * @param text a note, a group, what stands in brackets behind a title
 * @example findTunings('fiddle tuned AEAE, banjo gDGBD capo 2') // one for each
 * @example findTunings('AABB') // none: no built-in named tuning, and nothing says that it is one
 */
export function findTunings(text: string): FoundTunings[] {
  const found = new Map<string, { readonly accepted: Tuned[]; readonly said: string }>();
  for (const [clause] of text.matchAll(CLAUSE)) {
    for (const { kind, tuned } of [...inNotes(clause), ...byName(clause)]) {
      const said = clause.trim().slice(0, LONGEST_SAID);
      const entry = found.get(kind.id) ?? { accepted: [], said };
      if (!entry.accepted.some((other) => sameTuned(other, tuned))) entry.accepted.push(tuned);
      found.set(kind.id, entry);
    }
  }
  return [...found].map(([kind, { accepted, said }]) => ({ kind, accepted, said }));
}

interface Named {
  readonly kind: InstrumentKind;
  readonly tuned: Tuned;
}

function inNotes(clause: string): Named[] {
  const spoken = kindIn(clause);
  const isAboutTuning = spoken !== undefined || SPEAKS_OF_TUNING.test(clause);
  return [...clause.matchAll(NOTES)].flatMap(([, letters = '', capo = '0']) => {
    const kind = spoken ?? kindOf(letters);
    if (!kind || PARTS.test(letters)) return [];
    const tuned = parseTuning(kind, letters.replaceAll('-', ''), Math.min(Number(capo), HIGHEST_CAPO));
    if (!tuned.ok) return [];
    const isWritten = CAPITALS.test(letters) || (SMALL_HIGH_STRING.has(kind.id) && !WORD.test(letters));
    const likely = isNamed(kind, tuned.value)
      ? isWritten || isAboutTuning
      : isWritten && isAboutTuning && isNear(kind, tuned.value);
    return likely ? [{ kind, tuned: tuned.value }] : [];
  });
}

function kindIn(clause: string): InstrumentKind | undefined {
  return KIND_WORDS.find(([word]) => word.test(clause))?.[1];
}

/** Without a word for it: four strings are a fiddle's, five that begin small a banjo's, six a guitar's. */
function kindOf(letters: string): InstrumentKind | undefined {
  const strings = letters.match(new RegExp(NOTE, 'gu'))?.length ?? 0;
  if (strings === 4) return builtInKind('fiddle');
  if (strings === 5 && /^[a-g]/.test(letters)) return builtInKind('banjo');
  return strings === 6 ? builtInKind('guitar') : undefined;
}

function isNamed(kind: InstrumentKind, { pitches }: Tuned): boolean {
  return (NAMED_TUNINGS[kind.id] ?? []).some((named) => sameTuning(named.pitches, pitches));
}

function isNear(kind: InstrumentKind, { pitches }: Tuned): boolean {
  return kind.courses.every(
    ({ standard }, index) => Math.abs(midiOf(pitches[index] ?? standard) - midiOf(standard)) <= FARTHEST,
  );
}

/** `cross-A`, `banjo in sawmill`: names of one tuning, of the kind that is spoken of or of one kind alone. */
function byName(clause: string): Named[] {
  const plain = ` ${clause
    .toLowerCase()
    .replace(/[-\s]+/g, ' ')
    .trim()} `;
  const spoken = kindIn(clause);
  const isTuned = SPEAKS_OF_TUNING.test(clause);
  const found = NAMES.filter(({ name, kind }) => {
    if (spoken !== undefined && kind !== spoken) return false;
    if (!plain.includes(` ${name.replaceAll('-', ' ')} `)) return false;
    return isTuned || CLEAR_NAME.test(name) || (spoken !== undefined && NEARLY_CLEAR_NAME.test(name));
  });
  // `high bass, high counter` says more than `high bass`; a name of two tunings does not tell which.
  const longest = Math.max(0, ...found.map(({ name }) => name.length));
  const [first, ...others] = found.filter(({ name }) => name.length === longest);
  return first && others.every(({ kind, pitches }) => kind === first.kind && pitches === first.pitches)
    ? [{ kind: first.kind, tuned: { pitches: first.pitches, capo: 0 } }]
    : [];
}
