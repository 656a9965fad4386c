import { Random } from '../../../bench/random';
import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';
import { bestByClassCounts } from './class-counts';
import { randomProblem } from './random-problem';

/** A problem too large to try all orders, and the best seven levels, in the goal's order. */
export interface Mixed {
  readonly seed: number;
  readonly problem: OrderingProblem;
  readonly best: readonly number[];
}

/** Random problems with pins, a break and alternatives whose rules can all hold, from a seed on. */
export function* mixedProblems(
  firstSeed: number,
  many: number,
  count: (seed: number) => number,
): Generator<Mixed> {
  let left = many;
  for (let seed = firstSeed; left > 0; seed++) {
    const random = new Random(seed);
    const problem = randomProblem((below) => random.below(below), count(seed));
    const breaks = problem.sets.filter(({ length }) => length > 0).length - 1;
    const alternatives = problem.tunes.some(({ accepted }) =>
      Object.values(accepted).some((list) => list !== 'any' && list.length > 1),
    );
    if (Object.keys(problem.pins).length === 0 || breaks === 0 || !alternatives) continue;
    const best = bestByClassCounts(problem);
    if (best === null) continue;
    left--;
    yield { seed, problem, best };
  }
}
