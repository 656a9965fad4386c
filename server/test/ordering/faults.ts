import { scoreEvening } from '@pegwell/shared/session/score';
import type { Answer, ClashingRule, OrderingProblem } from '../../src/ordering/engine/ordering-problem';
import { someOrderHolds } from './enumeration';
import { keepsRules } from './host-rules';
import { compareLevels, levelsOf } from './reading';

/**
 * All that is wrong with an answer, in sentences; nothing where it is right.
 * Undecided is right only for a search that was stopped, before it knew any order.
 * @param best the seven levels of the best order, found in another way; null where no order keeps the rules;
 *   left out where not known
 */
export function faultsOf(
  problem: OrderingProblem,
  answer: Answer,
  best?: readonly number[] | null,
): readonly string[] {
  const host = problem.sets.flat();
  if (answer.outcome === 'undecided') {
    return keepsRules(problem, host) ? ["undecided, though the host's order keeps the rules"] : [];
  }
  if (answer.outcome === 'clash') return best ? ['a clash, though there is an order'] : [];
  if (best === null) return ['an order, though the rules clash'];
  const faults: string[] = [];
  const order = answer.sets.flat();
  const alike = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);
  if (!alike([...order].sort(), [...host].sort())) faults.push('not the tunes that were given');
  if (!alike(answer.sets.map(lengthOf), problem.sets.map(lengthOf))) faults.push('sets of other sizes');
  if (!keepsRules(problem, order)) faults.push('a rule is broken');
  const moved = order.filter((id, position) => id !== host[position]);
  if (!alike(moved, answer.moved)) faults.push('not those that moved');
  const { score } = scoreEvening({ ...problem, sets: answer.sets });
  if (!alike(score, answer.score)) faults.push(`the plain score is ${JSON.stringify(score)}`);
  if (answer.stopped === null && !answer.optimal) faults.push('ended by itself, and not proved');
  if (answer.optimal !== (answer.provenLevels === 7)) faults.push('optimal means 7 levels proved');

  const levels = levelsOf(score, problem.goal);
  if (answer.lowerBound > levels[0]!) faults.push('a bound above the answer itself');
  if (keepsRules(problem, host)) {
    const hosts = levelsOf(scoreEvening(problem).score, problem.goal);
    const worse = compareLevels(levels, hosts);
    if (worse > 0) faults.push("worse than the host's order");
    if (worse === 0 && moved.length > 0) faults.push("the host's order is as good, and is not given back");
  }
  if (best === undefined) return faults;
  const better = compareLevels(levels, best);
  if (better < 0) faults.push(`better than can be: ${levels.join()} against ${best.join()}`);
  if (answer.lowerBound > best[0]!) faults.push(`bound ${answer.lowerBound} above ${best[0]}`);
  const proved = answer.provenLevels;
  if (compareLevels(levels.slice(0, proved), best.slice(0, proved)) !== 0) {
    faults.push(`${proved} levels proved of ${levels.join()}, and the best is ${best.join()}`);
  }
  return faults;
}

/** All that is wrong with rules named as clashing: they must clash, and without any one of them must not. */
export function clashFaults(problem: OrderingProblem, clashes: readonly ClashingRule[]): readonly string[] {
  const faults: string[] = [];
  if (someOrderHolds(withRules(problem, clashes))) faults.push('the rules named can all hold');
  for (const rule of clashes) {
    const rest = clashes.filter((other) => other !== rule);
    if (!someOrderHolds(withRules(problem, rest))) {
      faults.push(`${rule.rule} ${rule.ids.join()} can be left out`);
    }
  }
  return faults;
}

function withRules(problem: OrderingProblem, rules: readonly ClashingRule[]): OrderingProblem {
  const ids = (name: ClashingRule['rule']): (readonly string[])[] =>
    rules.filter(({ rule }) => rule === name).map((rule) => rule.ids);
  return {
    ...problem,
    pins: Object.fromEntries(ids('pin').map(([id]) => [id!, problem.pins[id!]!])),
    medleys: ids('medley'),
    befores: ids('before').map(([first, second]) => [first!, second!] as const),
  };
}

const lengthOf = ({ length }: readonly string[]): number => length;
