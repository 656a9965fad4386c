import { Bound, LARGE_BOUND, SMALL_BOUND, type BoundLimits } from './bound';
import { compile, type Compiled } from './compiled';
import { dealt, dealtApart } from './deal';
import { someOrder } from './feasible';
import { improved } from './improve';
import { orderCost } from './order-cost';
import type { OrderingProblem, Solution } from './ordering-problem';
import { Stage } from './stage';
import { OutOfShare, OutOfSteps, type Steps } from './steps';
import { isLess, NEVER, sweep, sweepBack, type Cost, type SweepOptions, type Swept } from './sweep';
import type { Plan } from './units';
import { weightsFor, type Weights } from './weights';

/** How a search goes about its work; every setting leads to the same scores and, given steps, proofs. */
export interface SearchSettings {
  /** About how many steps a look may take. */
  readonly lookSteps: number;
  /**
   * Bounds to try in turn: how many states are kept per position while looking for a good order under each, the
   * steps that moves of single tunes may take, and those that the first stage may take then.
   */
  readonly bounds: readonly {
    readonly limits: BoundLimits;
    readonly width: number;
    readonly improveSteps: number;
    readonly share: number;
  }[];
  /** States kept per position while looking at a closer stage. */
  readonly closerWidth: number;
  /** Sweeps of fewer steps are cheap: the next may rise further. */
  readonly cheapSweep: number;
}

export const SETTINGS: SearchSettings = {
  lookSteps: 800_000,
  bounds: [
    { limits: SMALL_BOUND, width: 8, improveSteps: 0, share: 60_000 },
    { limits: LARGE_BOUND, width: 200, improveSteps: 600_000, share: Infinity },
  ],
  closerWidth: 24,
  cheapSweep: 5_000,
};

/** What a search has found, and how much of it is certain. */
export interface Found {
  /** Entries (indices in the host's order) in playing order. */
  readonly entries: readonly number[];
  readonly provenLevels: number;
  readonly lowerBound: number;
  /** Whether the host's order keeps the rules. */
  readonly hostHolds: boolean;
  readonly stopped: Solution['stopped'];
}

type Base = Pick<SweepOptions, 'bound' | 'steps' | 'keyWeight'>;

/**
 * Stages, each closer than the one before and bounded by its exact cost to go: tunings alone, then capos, ranks
 * and keys, then spaced rhythms too. Before each, narrow sweeps look for a good order; only what can be better
 * than the best order known is followed, so that an empty sweep is a proof.
 */
export class Search {
  private readonly compiled: Compiled;
  private readonly weights: Weights;
  private readonly all: Stage;
  /** The best order known, which keeps the rules; null until there is one. */
  private best: { readonly entries: readonly number[]; readonly cost: Cost } | null = null;
  /** No order that keeps the rules costs less. */
  private least: Cost = { high: 0, low: 0 };
  private stopped: Solution['stopped'] = null;

  constructor(
    private readonly problem: OrderingProblem,
    private readonly plan: Plan,
    private readonly steps: Steps,
    private readonly settings: SearchSettings,
  ) {
    this.compiled = compile(problem);
    this.weights = weightsFor(this.compiled, problem.goal);
    this.all = new Stage(this.compiled, plan, this.weights, 'all', steps);
  }

  /**
   * @returns null where the budget ended before any order that keeps the rules was known
   * @throws TooManyWays
   */
  run(): Found | null {
    try {
      this.search();
    } catch (error) {
      if (error instanceof OutOfSteps) this.stopped = error.reason;
      else throw error;
    }
    if (this.best === null) return null;
    const [lowerBound] = this.weights.read(this.least.high, this.least.low);
    return {
      entries: this.best.entries,
      provenLevels: this.proven(this.best.cost),
      lowerBound: lowerBound!,
      hostHolds: this.hostUnits() !== null,
      stopped: this.stopped,
    };
  }

  private search(): void {
    const { compiled, plan, weights, steps } = this;
    const start = this.hostUnits() ?? someOrder(plan, steps);
    if (start === null) throw new Error('The rules were found to hold');
    const entries = start.flatMap((unit) => plan.units[unit]!.entries);
    this.best = { entries, cost: NEVER };
    this.best = { entries, cost: orderCost(this.all, start, steps) };

    const tunings = new Stage(compiled, plan, weights, 'tunings', steps);
    const swept = this.tuningsSwept(tunings);
    if (swept === null) return;
    sweepBack(swept.swept, this.best.cost, steps);
    const keys = new Stage(compiled, plan, weights, 'keys', steps);
    const byTunings = { ...swept.base, coarse: swept.swept };
    this.look({ ...byTunings, stage: keys }, this.settings.closerWidth);
    if (this.deepened({ ...byTunings, stage: keys, together: true }) === null) return;
    if (!isLess(this.least, this.best.cost)) return;

    // Only spaced rhythms stand between the bound and the best order known.
    const apart = this.least.high < this.best.cost.high;
    const coarse = apart ? this.rhythmsSwept(byTunings) : this.deepened({ ...byTunings, stage: keys });
    if (coarse === null || !isLess(this.least, this.best.cost)) return;
    sweepBack(coarse, this.best.cost, steps);
    const bySomething = { ...swept.base, coarse };
    this.look({ ...bySomething, stage: this.all }, this.settings.closerWidth);
    this.deepened({ ...bySomething, stage: this.all, together: true });
  }

  /**
   * Where every order may have to break a rule, the breaks are settled with tunings and spaced rhythms alone:
   * keys and capos would spread the many orders that tie until then over far more states.
   */
  private rhythmsSwept(byTunings: Base & Pick<SweepOptions, 'coarse'>): Swept | null {
    const byKeys = this.least;
    const rhythms = new Stage(this.compiled, this.plan, this.weights, 'rhythms', this.steps);
    this.look({ ...byTunings, stage: rhythms }, this.settings.closerWidth);
    const swept = this.deepened({ ...byTunings, stage: rhythms });
    // An order with those breaks and the pegs and turning places of the stage of keys has at least its low too.
    const breaks = this.least.high - byKeys.high;
    if (breaks < Math.min(this.weights.peg, this.weights.stop)) {
      this.raise({ high: this.least.high, low: byKeys.low });
    }
    return swept;
  }

  /** The first stage, under a bound that is quickly made, and where that leaves too much, a better one. */
  private tuningsSwept(stage: Stage): { readonly swept: Swept; readonly base: Base } | null {
    const { compiled, plan, problem, weights, steps } = this;
    let bound: Bound | null = null;
    for (const { limits, width, improveSteps, share } of this.settings.bounds) {
      if (!bound?.full) bound = new Bound(compiled, plan, problem.goal, weights, limits, steps);
      const root = new Int32Array(stage.stride);
      stage.start(root);
      this.raise({ high: bound.toGo(stage, root, 0, 0), low: 0 });
      const base: Base = { bound, steps, keyWeight: weights.key };
      this.look({ ...base, stage, coarse: null }, width);
      this.improve(improveSteps);
      try {
        const swept = this.deepened({ ...base, steps: steps.within(share), stage, coarse: null });
        return swept && { swept, base };
      } catch (error) {
        if (!(error instanceof OutOfShare)) throw error;
      }
    }
    return null;
  }

  /**
   * Sweeps all states of a stage that can lead to less than the best order known. Where the bound is far from
   * that order, with lower ceilings first: what lies under a ceiling that nothing reaches must be looked at
   * anyway to prove the best, and each such ceiling raises the bound (Korf 1985, iterative deepening).
   *
   * @returns null where nothing at this stage can cost less than the best order
   */
  private deepened(base: Base & Pick<SweepOptions, 'stage' | 'coarse' | 'together'>): Swept | null {
    const { peg, stop } = this.weights;
    const large = Math.max(peg, stop);
    let rise = Math.min(peg, stop);
    let dearest = this.settings.cheapSweep;
    for (;;) {
      const best = this.best!.cost;
      if (!isLess(this.least, best)) return null;
      const before = this.steps.taken;
      const ceiling: Cost = { high: this.least.high + rise, low: 0 };
      const under = isLess(ceiling, best) ? ceiling : best;
      const swept = sweep({ ...base, under, width: Infinity });
      if (swept.best === null) {
        this.raise(isLess(swept.nextLeast, under) ? under : swept.nextLeast);
        if (under === best) return null;
        // Where a higher ceiling cost little more, the next rises further; and where the best order known is near,
        // it is reached in a leap or two.
        const took = this.steps.taken - before;
        const gap = best.high - this.least.high;
        rise = took < 3 * dearest ? 3 * rise : rise;
        if (gap <= 3 * large) rise = Math.max(rise, gap / 3);
        dearest = Math.max(dearest, took);
        continue;
      }
      this.raise(swept.best);
      this.offer(base.stage, swept.order!);
      // The table must hold all that can still be better than the best order.
      if (base.together || under === best || !isLess(under, this.best!.cost)) return swept;
      if (!isLess(this.least, this.best!.cost)) return null;
      return sweep({ ...base, under: this.best!.cost, width: Infinity });
    }
  }

  /**
   * The best order known, looked at with all levels in mind: the closer stages may never be reached. Done at a
   * fixed point of the search, so that a larger budget goes on from where a smaller one ends.
   */
  private improve(share: number): void {
    if (!isLess(this.least, this.best!.cost)) return;
    const units = unitsOf(this.plan, this.best!.entries);
    const { order, cost } = improved(this.all, units, this.steps.within(share));
    if (isLess(cost, this.best!.cost)) {
      this.best = { entries: order.flatMap((unit) => this.plan.units[unit]!.entries), cost };
    }
  }

  /** A narrow sweep for a good order; nothing is proved unless it turns out to have left nothing out. */
  private look(base: Base & Pick<SweepOptions, 'stage' | 'coarse'>, width: number): void {
    if (!isLess(this.least, this.best!.cost)) return;
    const under = this.best!.cost;
    // Long evenings of many classes are looked at more narrowly, or looking would take all the steps.
    const { members, effort } = base.stage;
    const each = this.plan.setStart.length * members.length * effort;
    const affordable = Math.max(1, Math.floor(this.settings.lookSteps / each));
    const swept = sweep({ ...base, under, width: Math.min(width, affordable) });
    if (swept.exact) this.raise(swept.best ?? under);
    if (swept.order !== null) this.offer(base.stage, swept.order);
  }

  /** @param order units in playing order, each of which stands for its class of that stage */
  private offer(stage: Stage, order: readonly number[]): void {
    this.offerEntries(dealt(stage, order));
    if (stage === this.all) return;
    const { entries } = this.compiled;
    this.offerEntries(
      dealtApart(stage, order, (unit) => entries[this.plan.units[unit]!.entries.at(-1)!]!.spaced),
    );
  }

  private offerEntries(entries: readonly number[]): void {
    const cost = orderCost(this.all, unitsOf(this.plan, entries), this.steps);
    if (isLess(cost, this.best!.cost)) this.best = { entries, cost };
  }

  /** Never above the best order known: what a sweep proves beyond it is not asked. */
  private raise(to: Cost): void {
    const best = this.best!.cost;
    const most = isLess(best, to) ? best : to;
    if (isLess(this.least, most)) this.least = most;
  }

  /** Leading levels on which the bound has reached the best order. */
  private proven(cost: Cost): number {
    const { weights } = this;
    if (cost.high === Infinity) return 0;
    const bound = weights.read(this.least.high, this.least.low);
    const differs = weights.read(cost.high, cost.low).findIndex((value, level) => value !== bound[level]);
    return Math.min(weights.levels, differs === -1 ? 7 : differs);
  }

  /** The host's order in units; null where it breaks a rule. */
  private hostUnits(): number[] | null {
    const { units, unitOf, setEnd } = this.plan;
    const order: number[] = [];
    const placed = units.map(() => false);
    for (let position = 0; position < unitOf.length;) {
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
}

function unitsOf({ units, unitOf }: Plan, entries: readonly number[]): number[] {
  const order: number[] = [];
  for (let position = 0; position < entries.length; position += units[order.at(-1)!]!.entries.length) {
    order.push(unitOf[entries[position]!]!);
  }
  return order;
}
