import type { Evening } from '@pegwell/shared/session/evening';
import { scoreEvening } from '@pegwell/shared/session/score';
import { Bound } from './bound';
import { clashing, rulesOf } from './clash';
import { compile } from './compiled';
import { dealt } from './deal';
import { someOrder } from './feasible';
import { hostRules } from './host-rules';
import { TooManyWays } from './moves';
import { orderCost } from './order-cost';
import type { Answer, OrderingProblem, Solution } from './ordering-problem';
import { Stage } from './stage';
import { OutOfSteps, Steps } from './steps';
import { isLess, NEVER, sweep, sweepBack, type Cost, type Swept } from './sweep';
import { planOf, type Plan } from './units';
import { weightsFor, type Weights } from './weights';

/** About two seconds on the machines this was measured on; most evenings need a hundredth. */
export const STEP_BUDGET = 12_000_000;
const RULE_STEPS = 300_000;

/**
 * The best order of an evening under the host's rules, and how much of that is proved.
 *
 * Three sweeps, each closer than the one before and bounded by its exact cost to go: tunings alone, then
 * capos, ranks and spaced rhythms, then everything. Before each, a narrow sweep looks for a good order;
 * only what can be better than the best order known is followed, so that what is left at the end is proof.
 *
 * @param shouldStop asked now and then; true ends the search with the best so far
 */
export function solve(problem: OrderingProblem, shouldStop: () => boolean = () => false): Answer {
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
  return new Search(problem, order, plan, steps).answer();
}

class Search {
  private readonly compiled;
  private readonly weights: Weights;
  private readonly all: Stage;
  /** Entries in playing order, and their cost; null until an order that keeps the rules is known. */
  private best: { readonly entries: readonly number[]; readonly cost: Cost } | null = null;
  /** No order that keeps the rules costs less. */
  private least: Cost = { high: 0, low: 0 };
  private stopped: Solution['stopped'] = null;

  constructor(
    private readonly problem: OrderingProblem,
    private readonly order: readonly string[],
    private readonly plan: Plan,
    private readonly steps: Steps,
  ) {
    this.compiled = compile(problem);
    this.weights = weightsFor(this.compiled, problem.goal);
    this.all = new Stage(this.compiled, plan, this.weights, 'all');
  }

  answer(): Answer {
    try {
      this.search();
    } catch (error) {
      if (error instanceof OutOfSteps) this.stopped = error.reason;
      else if (error instanceof TooManyWays) this.stopped = 'steps';
      else throw error;
    }
    if (this.best === null) return { outcome: 'undecided', stopped: this.stopped ?? 'steps' };
    return this.solution(this.best.entries);
  }

  private search(): void {
    const start = this.hostUnits() ?? someOrder(this.plan, this.steps)!;
    this.best = { entries: dealt(this.all, start), cost: NEVER };
    this.best = { entries: this.best.entries, cost: orderCost(this.all, start) };
    const { compiled, plan, problem, weights, steps } = this;
    const bound = new Bound(compiled, plan, problem.goal, weights, steps);
    const base = { bound, steps, keyWeight: weights.key };
    const root = new Int32Array(this.all.stride);
    this.all.start(root);
    this.raise({ high: bound.toGo(this.all, root, 0, 0), low: 0 });

    this.look({ ...base, coarse: null }, 24);
    let coarse: Swept | null = null;
    for (const closeness of ['tunings', 'choices', 'all'] as const) {
      if (this.best !== null && !isLess(this.least, this.best.cost)) return;
      const stage = closeness === 'all' ? this.all : new Stage(compiled, plan, weights, closeness);
      const under = this.best?.cost ?? NEVER;
      const swept = sweep({ ...base, stage, coarse, under, width: Infinity });
      this.raise(swept.best ?? under);
      if (closeness === 'all') {
        if (swept.order !== null) this.offer(swept.order);
        return;
      }
      if (swept.best === null) return;
      sweepBack(swept, steps);
      coarse = swept;
      this.look({ ...base, coarse }, 48);
    }
  }

  /** A narrow sweep for a good order; nothing is proved unless it turns out to have left nothing out. */
  private look(
    base: Pick<Parameters<typeof sweep>[0], 'bound' | 'steps' | 'keyWeight' | 'coarse'>,
    width: number,
  ): void {
    const under = this.best?.cost ?? NEVER;
    const swept = sweep({ ...base, stage: this.all, under, width });
    if (swept.order !== null) this.offer(swept.order);
    if (swept.exact) this.raise(swept.best ?? under);
  }

  private offer(units: readonly number[]): void {
    const cost = orderCost(this.all, units);
    if (this.best !== null && !isLess(cost, this.best.cost)) return;
    this.best = { entries: dealt(this.all, units), cost };
  }

  private raise(to: Cost): void {
    if (isLess(this.least, to)) this.least = to;
  }

  /** The host's order in units; null where it breaks a rule. */
  private hostUnits(): number[] | null {
    const { units, unitOf, setEnd } = this.plan;
    const order: number[] = [];
    const placed = units.map(() => false);
    for (let position = 0; position < this.order.length;) {
      const index = unitOf[position]!;
      const unit = units[index]!;
      const inOrder = unit.entries.every((entry, offset) => entry === position + offset);
      if (!inOrder || (unit.fixedAt ?? position) !== position) return null;
      if (position + unit.entries.length > setEnd[position]!) return null;
      if (unit.after.some((earlier) => !placed[earlier])) return null;
      placed[index] = true;
      order.push(index);
      position += unit.entries.length;
    }
    return order;
  }

  private solution(entries: readonly number[]): Solution {
    const ids = entries.map((entry) => this.order[entry]!);
    let from = 0;
    const sets = this.problem.sets.map(({ length }) => ids.slice(from, (from += length)));
    const evening: Evening = { ...this.problem, sets };
    const { score } = scoreEvening(evening);
    const proven = this.proven();
    const [lowerBound] = this.weights.read(this.least.high, this.least.low);
    return {
      outcome: 'solution',
      sets,
      score,
      provenLevels: proven,
      optimal: proven === 7,
      lowerBound: lowerBound ?? 0,
      moved: ids.filter((id, position) => id !== this.order[position]),
      steps: this.steps.taken,
      stopped: this.stopped,
    };
  }

  /** Leading levels on which the bound has reached the best order. */
  private proven(): number {
    const { levels, read } = this.weights;
    const cost = this.best!.cost;
    const bound = read(this.least.high, this.least.low);
    const reached = read(cost.high, cost.low);
    const differs = reached.findIndex((value, level) => value !== bound[level]);
    return Math.min(levels, differs === -1 ? 7 : differs);
  }
}
