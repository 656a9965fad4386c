import { midiOf, noteOf } from './pitch';

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

/** A course named by the letter of its standard pitch, with one peg and a margin, unless `more` says other. */
function course(standard: string, ordinal: string, more: Partial<Course> = {}): Course {
  return { standard, pegs: 1, name: noteOf(standard), ordinal, leastMargin: false, ...more };
}

const TOP: Partial<Course> = { leastMargin: true };
const DOUBLED: Partial<Course> = { pegs: 2 };

/**
 * Those the application knows without being told. Standard pitches are common practice in the trade; the
 * bouzouki's tuning and the dulcimer's octaves are written from memory.
 */
export const BUILT_IN_KINDS: readonly InstrumentKind[] = [
  {
    id: 'fiddle',
    name: 'Fiddle',
    plural: 'Fiddles',
    courses: [course('G3', '4th'), course('D4', '3rd'), course('A4', '2nd'), course('E5', '1st', TOP)],
  },
  {
    // Five strings, the short fifth first.
    id: 'banjo',
    name: 'Banjo',
    plural: 'Banjos',
    courses: [
      course('G4', '5th', { ...TOP, name: 'g' }),
      course('D3', '4th'),
      course('G3', '3rd'),
      course('B3', '2nd'),
      course('D4', '1st', TOP),
    ],
  },
  {
    id: 'guitar',
    name: 'Guitar',
    plural: 'Guitars',
    courses: [
      course('E2', '6th'),
      course('A2', '5th'),
      course('D3', '4th'),
      course('G3', '3rd'),
      course('B3', '2nd'),
      course('E4', '1st', TOP),
    ],
  },
  {
    id: 'mandolin',
    name: 'Mandolin',
    plural: 'Mandolins',
    courses: [
      course('G3', '4th', DOUBLED),
      course('D4', '3rd', DOUBLED),
      course('A4', '2nd', DOUBLED),
      course('E5', '1st', { ...DOUBLED, ...TOP }),
    ],
  },
  {
    // As in Irish use.
    id: 'tenor-banjo',
    name: 'Tenor banjo',
    plural: 'Tenor banjos',
    courses: [course('G2', '4th'), course('D3', '3rd'), course('A3', '2nd'), course('E4', '1st', TOP)],
  },
  {
    // Irish bouzouki.
    id: 'bouzouki',
    name: 'Bouzouki',
    plural: 'Bouzoukis',
    courses: [
      course('G2', '4th', DOUBLED),
      course('D3', '3rd', DOUBLED),
      course('A3', '2nd', DOUBLED),
      course('D4', '1st', { ...DOUBLED, ...TOP }),
    ],
  },
  {
    id: 'ukulele',
    name: 'Ukulele',
    plural: 'Ukuleles',
    courses: [course('G4', '4th'), course('C4', '3rd'), course('E4', '2nd'), course('A4', '1st')],
  },
  {
    // Mountain dulcimer; only its melody course is doubled.
    id: 'dulcimer',
    name: 'Dulcimer',
    plural: 'Dulcimers',
    courses: [course('D3', 'bass'), course('A3', 'middle'), course('D4', 'melody', { ...DOUBLED, ...TOP })],
  },
  {
    // Double bass.
    id: 'bass',
    name: 'Bass',
    plural: 'Basses',
    courses: [course('E1', '4th'), course('A1', '3rd'), course('D2', '2nd'), course('G2', '1st')],
  },
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
