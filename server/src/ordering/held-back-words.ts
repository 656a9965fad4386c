import type { Goal, Score } from '@pegwell/shared/session/evening';
import { difference } from '@pegwell/shared/session/score-words';
import type { LeftOut } from './engine/relax';

/** What an order would be without a rule or a tune, against what it is. */
export interface Compared {
  readonly score: Score;
  readonly than: Score;
  readonly goal: Goal;
  /** How many levels of `score`, in the goal's order, no order betters. */
  readonly provenLevels: number;
}

/**
 * "Without the pin on Sally Johnson: 6 pegs and 1 stop fewer." What is not proved is said as what it is: at
 * least so much.
 * @returns whether the words are all that can be had
 */
export function heldBackWords(
  { rule, ids }: LeftOut,
  { score, than, goal, provenLevels }: Compared,
  nameOf: (id: string) => string,
): { readonly words: string; readonly proved: boolean } {
  const names = ids.map(nameOf);
  const what = {
    pin: `Without the pin on ${names[0]}`,
    medley: `If ${listed(names)} were no medley`,
    before: `If ${names[0]} need not come before ${names[1]}`,
    tune: `Without ${names[0]}`,
  }[rule];
  const { words, levels } = difference(score, than, goal);
  const proved = provenLevels >= levels;
  if (words === '') return { words: `${what}: ${proved ? 'no better' : 'nothing better found'}.`, proved };
  return { words: `${what}: ${proved ? '' : 'at least '}${words}.`, proved };
}

/** "A, B and C" */
function listed(names: readonly string[]): string {
  return names.length > 1 ? `${names.slice(0, -1).join(', ')} and ${names.at(-1)}` : (names[0] ?? '');
}
