import { compareScores, scoreEvening } from '@pegwell/shared/session/score';
import { clashing, rulesOf } from './clash';
import { hostRules } from './host-rules';
import { TooManyWays } from './moves';
import type { Answer, OrderingProblem, Solution } from './ordering-problem';
import { Search, SETTINGS, type Found, type SearchSettings } from './search';
import { OutOfSteps, Steps } from './steps';
import { planOf, type Plan } from './units';

/** About two seconds on the machines this was measured on; most evenings need a hundredth. */
export const STEP_BUDGET = 3_600_000;
const RULE_STEPS = 300_000;

/**
 * The best order of an evening under the host's rules, and how much of that is proved; or the rules that
 * clash; or, where the budget ended before that was known, neither.
 *
 * @param settings for tests and benches
 * @param shouldStop asked now and then; true ends the search with the best so far
 * @throws RangeError where `sets` names an id that no tune has (a programmer's error)
 */
export function solve(
  problem: OrderingProblem,
  shouldStop: () => boolean = () => false,
  settings: SearchSettings = SETTINGS,
): Answer {
  const order = problem.sets.flat();
  const setSizes = problem.sets.map(({ length }) => length).filter((size) => size > 0);
  const steps = new Steps(problem.stepBudget ?? STEP_BUDGET, shouldStop);
  const rules = hostRules(problem, order);
  try {
    const clashes = clashing(order.length, setSizes, rules, new Steps(RULE_STEPS, shouldStop));
    if (clashes.length > 0) return { outcome: 'clash', clashes };
  } catch (error) {
    if (error instanceof OutOfSteps) return { outcome: 'undecided', stopped: error.reason };
    throw error;
  }
  const plan = planOf(rulesOf(order.length, setSizes, rules))!;
  const found = searched(problem, plan, steps, settings);
  if (found === null) return { outcome: 'undecided', stopped: 'steps' };
  return solutionOf(problem, order, found, steps.taken);
}

/** Choices that a thinned evening keeps per list: two where that leaves few ways, else the first alone. */
const choicesKept = (kinds: number): number => (kinds <= 6 ? 2 : 1);

/**
 * Where some tune can be tuned for in thousands of ways, the order is sought with the first choices of each
 * list alone. Nothing is proved then, and the host's order stands where it is as good.
 */
function searched(
  problem: OrderingProblem,
  plan: Plan,
  steps: Steps,
  settings: SearchSettings,
): Found | null {
  try {
    return new Search(problem, plan, steps, settings).run();
  } catch (error) {
    if (!(error instanceof TooManyWays)) throw error;
  }
  const kept = choicesKept(problem.chairs.length);
  const tunes = problem.tunes.map((tune) => ({
    ...tune,
    accepted: Object.fromEntries(
      Object.entries(tune.accepted).map(([kind, list]) => [
        kind,
        list === 'any' ? list : list.slice(0, kept),
      ]),
    ),
  }));
  const found = new Search({ ...problem, tunes }, plan, steps, settings).run();
  if (found === null) return null;
  const host = found.entries.map((_, position) => position);
  const entries = found.hostHolds && !isBetter(problem, found.entries) ? host : found.entries;
  return { ...found, entries, provenLevels: 0, lowerBound: 0, stopped: found.stopped ?? 'steps' };
}

/** Whether an order is better than the host's, all choices allowed. */
function isBetter(problem: OrderingProblem, entries: readonly number[]): boolean {
  const order = problem.sets.flat();
  const ids = entries.map((entry) => order[entry]!);
  const { score } = scoreEvening({ ...problem, sets: inSets(problem, ids) });
  return compareScores(score, scoreEvening(problem).score, problem.goal) < 0;
}

/** Ids in sets of the host's sizes. */
function inSets(problem: OrderingProblem, ids: readonly string[]): string[][] {
  let from = 0;
  return problem.sets.map(({ length }) => ids.slice(from, (from += length)));
}

function solutionOf(
  problem: OrderingProblem,
  order: readonly string[],
  found: Found,
  steps: number,
): Solution {
  const ids = found.entries.map((entry) => order[entry]!);
  const sets = inSets(problem, ids);
  return {
    outcome: 'solution',
    sets,
    // Scored by the plain reference, whatever the search reckons with.
    score: scoreEvening({ ...problem, sets }).score,
    provenLevels: found.provenLevels,
    optimal: found.provenLevels === 7,
    lowerBound: found.lowerBound,
    moved: ids.filter((id, position) => id !== order[position]),
    steps,
    stopped: found.stopped,
  };
}
