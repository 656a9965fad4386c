import type { Goal, Score } from './evening';
import { levelsOf, type Level } from './levels';

const NOUNS: Readonly<Record<Level, readonly [one: string, many: string]>> = {
  pegChanges: ['peg', 'pegs'],
  retuneStops: ['stop', 'stops'],
  ruleBreaks: ['broken rule', 'broken rules'],
  secondChoices: ['second choice', 'second choices'],
  capoMoves: ['capo move', 'capo moves'],
  keyChanges: ['key change', 'key changes'],
  semitones: ['half step', 'half steps'],
};

/**
 * What one score has over another: pegs and stops, or, where those are equal, the first level that differs.
 * @returns `words`, empty where no level differs; `levels`: how many, in the goal's order, must be proved
 *   before the words say the most that can be had
 * @example difference({ pegChanges: 34, retuneStops: 4 }, { pegChanges: 40, retuneStops: 5 }, 'pegs')
 *   // { words: '6 pegs and 1 stop fewer', levels: 2 }
 */
export function difference(
  score: Score,
  than: Score,
  goal: Goal,
): { readonly words: string; readonly levels: number } {
  const order = levelsOf(goal);
  const differing = order.filter((level) => score[level] !== than[level]);
  const main = differing.filter((level) => order.indexOf(level) < 2);
  const told = main.length > 0 ? main : differing.slice(0, 1);
  const parts = told.map((level) => {
    const size = Math.abs(score[level] - than[level]);
    const way = score[level] < than[level] ? 'fewer' : 'more';
    return { way, words: `${size} ${NOUNS[level][size === 1 ? 0 : 1]}` };
  });
  const levels = told.length === 0 ? order.length : order.indexOf(told.at(-1)!) + 1;
  const [one, other] = parts;
  if (one && other && one.way === other.way) {
    return { words: `${one.words} and ${other.words} ${one.way}`, levels };
  }
  return { words: parts.map(({ words, way }) => `${words} ${way}`).join(', '), levels };
}
