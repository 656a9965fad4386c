import { Random } from '../../../bench/random';
import { Bound, SMALL_BOUND, type BoundLimits } from '../../src/ordering/engine/bound';
import { rulesOf } from '../../src/ordering/engine/clash';
import { compile } from '../../src/ordering/engine/compiled';
import { hostRules } from '../../src/ordering/engine/host-rules';
import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';
import { Stage } from '../../src/ordering/engine/stage';
import { Steps } from '../../src/ordering/engine/steps';
import { NEVER, sweep, sweepBack } from '../../src/ordering/engine/sweep';
import { planOf } from '../../src/ordering/engine/units';
import { weightsFor } from '../../src/ordering/engine/weights';
import { bestOfAll } from './enumeration';
import { randomProblem } from './random-problem';

/** Tables of no size, so that trees must do it; tables too small for some kinds; tables for all. */
const LIMITS: Record<string, BoundLimits> = {
  trees: { joints: 400, whole: 1, together: 1, apart: 1 },
  some: { joints: 400, whole: 60, together: 60, apart: 30 },
  small: SMALL_BOUND,
};

/**
 * The most by which a bound is too high, over every state that an order can pass through; at most 0 where it
 * is a bound. What is really still to come is read from a sweep that leaves nothing out, and that from all
 * orders.
 * @param best the levels of the best of all orders, in the goal's order
 */
function mostTooHigh(
  problem: OrderingProblem,
  limits: BoundLimits,
  [first, second, third]: readonly number[],
): number {
  const order = problem.sets.flat();
  const sizes = problem.sets.map(({ length }) => length).filter((size) => size > 0);
  const plan = planOf(rulesOf(order.length, sizes, hostRules(problem, order)))!;
  const compiled = compile(problem);
  const weights = weightsFor(compiled, problem.goal);
  const steps = new Steps(Infinity, () => false);
  const stage = new Stage(compiled, plan, weights, 'tunings', steps);
  const bound = new Bound(compiled, plan, problem.goal, weights, limits, steps);
  const none = { toGo: () => 0 } as unknown as Bound;
  const all = { stage, under: NEVER, width: Infinity, coarse: null, bound: none, steps, keyWeight: 0 };
  const swept = sweep(all);
  sweepBack(swept, NEVER, steps);

  const { peg, stop, ruleBreak } = weights;
  const [heavier, lighter] = problem.goal === 'pegs' ? [peg, stop] : [stop, peg];
  const cost = first! * heavier + second! * lighter + third! * ruleBreak;
  let most = swept.layers[0]!.toGoHigh![0]! - cost;
  swept.layers.forEach((layer, position) => {
    for (let row = 0; row < layer.size; row++) {
      const over = bound.toGo(stage, layer.rows, row * layer.stride, position) - layer.toGoHigh![row]!;
      if (over > most) most = over;
    }
  });
  return most;
}

// A bound that is too high need not show in an answer: a good order may have been found before it was asked.
describe('the bound of what is still to come', () => {
  it.each(Object.keys(LIMITS))('is nowhere above what the best order from there costs: %s', (name) => {
    for (let seed = 1; seed <= 2000; seed++) {
      const random = new Random(seed);
      const problem = randomProblem((below) => random.below(below), 5 + (seed % 3));
      const best = bestOfAll(problem);
      if (best === null) continue;
      const over = Math.max(0, mostTooHigh(problem, LIMITS[name]!, best.levels));
      expect({ seed, over }).toEqual({ seed, over: 0 });
    }
  });
});
