import { midiOf } from './pitch';

/** One string, or the strings that are tuned together and played as one. */
export interface Course {
  /** The pitch it is built for, `G3`. */
  readonly standard: string;
  /** How many pegs tune it: 2 for a doubled course. */
  readonly pegs: number;
  /**
   * The standing name of its peg: the letter of the standard pitch, whatever it is tuned to. In lower case
   * where short names write it so (a banjo's fifth). Not always unique: `pegName` of words.ts is.
   */
  readonly name: string;
  /** Which string it is, as players count: `4th`, `bass`. Unique within a kind. */
  readonly ordinal: string;
  /**
   * A plain top string, or one as near its limit (a banjo's fifth): the least margin before it breaks.
   * Left out where not known: then the highest course counts as one, to be on the safe side.
   */
  readonly leastMargin?: boolean;
}

export interface InstrumentKind {
  /** `fiddle`, `tenor-banjo`, or the id of a circle's own kind. */
  readonly id: string;
  /** `Fiddle` */
  readonly name: string;
  /** `Fiddles` */
  readonly plural: string;
  /** In the order in which tunings are written. */
  readonly courses: readonly Course[];
}

type CourseRow = readonly [standard: string, ordinal: string, leastMargin?: 'least margin'];

/** Names are the letters of the standard pitches; `pegs` is per course, one number for all or one each. */
function kind(
  id: string,
  name: string,
  pegs: number | readonly number[],
  rows: readonly CourseRow[],
): InstrumentKind {
  const courses = rows.map(([standard, ordinal, margin], index) => ({
    standard,
    pegs: typeof pegs === 'number' ? pegs : pegs[index]!,
    name: standard.slice(0, -1),
    ordinal,
    leastMargin: margin !== undefined,
  }));
  return { id, name, plural: name === 'Bass' ? 'Basses' : `${name}s`, courses };
}

/**
 * Standard pitches are common practice in the trade; the bouzouki's tuning and the dulcimer's octaves are
 * written from memory.
 */
const FIDDLE = kind('fiddle', 'Fiddle', 1, [
  ['G3', '4th'],
  ['D4', '3rd'],
  ['A4', '2nd'],
  ['E5', '1st', 'least margin'],
]);

/** Five strings, the short fifth first; it stands nearest its limit beside the first. */
const BANJO = kind('banjo', 'Banjo', 1, [
  ['G4', '5th', 'least margin'],
  ['D3', '4th'],
  ['G3', '3rd'],
  ['B3', '2nd'],
  ['D4', '1st', 'least margin'],
]);

const GUITAR = kind('guitar', 'Guitar', 1, [
  ['E2', '6th'],
  ['A2', '5th'],
  ['D3', '4th'],
  ['G3', '3rd'],
  ['B3', '2nd'],
  ['E4', '1st', 'least margin'],
]);

const MANDOLIN = kind('mandolin', 'Mandolin', 2, [
  ['G3', '4th'],
  ['D4', '3rd'],
  ['A4', '2nd'],
  ['E5', '1st', 'least margin'],
]);

/** As in Irish use. */
const TENOR_BANJO = kind('tenor-banjo', 'Tenor banjo', 1, [
  ['G2', '4th'],
  ['D3', '3rd'],
  ['A3', '2nd'],
  ['E4', '1st', 'least margin'],
]);

/** Irish bouzouki. */
const BOUZOUKI = kind('bouzouki', 'Bouzouki', 2, [
  ['G2', '4th'],
  ['D3', '3rd'],
  ['A3', '2nd'],
  ['D4', '1st', 'least margin'],
]);

const UKULELE = kind('ukulele', 'Ukulele', 1, [
  ['G4', '4th'],
  ['C4', '3rd'],
  ['E4', '2nd'],
  ['A4', '1st'],
]);

/** Mountain dulcimer: the melody course is doubled. */
const DULCIMER = kind(
  'dulcimer',
  'Dulcimer',
  [1, 1, 2],
  [
    ['D3', 'bass'],
    ['A3', 'middle'],
    ['D4', 'melody', 'least margin'],
  ],
);

/** Double bass. */
const BASS = kind('bass', 'Bass', 1, [
  ['E1', '4th'],
  ['A1', '3rd'],
  ['D2', '2nd'],
  ['G2', '1st'],
]);

/** A banjo's fifth is written in lower case, `gDGBD`. */
const BANJO_AS_WRITTEN: InstrumentKind = {
  ...BANJO,
  courses: BANJO.courses.map((course) => (course.ordinal === '5th' ? { ...course, name: 'g' } : course)),
};

export const BUILT_IN_KINDS: readonly InstrumentKind[] = [
  FIDDLE,
  BANJO_AS_WRITTEN,
  GUITAR,
  MANDOLIN,
  TENOR_BANJO,
  BOUZOUKI,
  UKULELE,
  DULCIMER,
  BASS,
];

/** @example builtInKind('mandolin')?.courses.length // 4 */
export function builtInKind(id: string): InstrumentKind | undefined {
  return BUILT_IN_KINDS.find((kind) => kind.id === id);
}

/** @example standardPitches(fiddle) // ['G3', 'D4', 'A4', 'E5'] */
export function standardPitches(kind: InstrumentKind): readonly string[] {
  return kind.courses.map((course) => course.standard);
}

/** Whether a course has the least margin before it breaks (see `Course.leastMargin`). */
export function hasLeastMargin(kind: InstrumentKind, courseIndex: number): boolean {
  const course = kind.courses[courseIndex];
  if (!course) return false;
  if (course.leastMargin !== undefined) return course.leastMargin;
  const highest = Math.max(...kind.courses.map(({ standard }) => midiOf(standard)));
  return midiOf(course.standard) === highest;
}
