import type { Goal, Score } from './evening';

/** The levels of a score; `offClockPegChanges` stands beside them and decides nothing. */
export type Level = Exclude<keyof Score, 'offClockPegChanges'>;

const BY_PEGS: readonly Level[] = [
  'pegChanges',
  'retuneStops',
  'ruleBreaks',
  'secondChoices',
  'capoMoves',
  'keyChanges',
  'semitones',
];
const BY_STOPS: readonly Level[] = ['retuneStops', 'pegChanges', ...BY_PEGS.slice(2)];

/** The levels in the order in which they decide. */
export function levelsOf(goal: Goal): readonly Level[] {
  return goal === 'stops' ? BY_STOPS : BY_PEGS;
}

/** Below 0 where `a` is the better score, 0 where they are equal on all levels. */
export function compareScores(a: Score, b: Score, goal: Goal): number {
  for (const level of levelsOf(goal)) {
    if (a[level] !== b[level]) return a[level] - b[level];
  }
  return 0;
}

/** The same for figures in the order of the levels. */
export function compareLevels(a: readonly number[], b: readonly number[]): number {
  for (let level = 0; level < a.length; level++) {
    if (a[level] !== b[level]) return a[level]! - b[level]!;
  }
  return 0;
}
