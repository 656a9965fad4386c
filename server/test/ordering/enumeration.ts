import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';
import { GrowingOrder } from './host-rules';
import { Reading, type Stand } from './reading';

/** The best of all orders that keep the rules. */
export interface Best {
  /** Seven, in the goal's order. */
  readonly levels: readonly number[];
  readonly order: readonly string[];
}

/**
 * Every order that keeps the rules, one by one, nothing left out for its cost; orders that begin alike are
 * walked together as far as they do.
 * @returns null where no order keeps the rules
 */
export function bestOfAll(problem: OrderingProblem): Best | null {
  const reading = new Reading(problem);
  const rules = new GrowingOrder(problem);
  const { tunes, setStart } = reading;
  const order: number[] = [];
  let best = Infinity;
  let bestOrder: readonly number[] = [];
  from(0, 0, -1, new Map([[reading.start, 0]]));
  if (best === Infinity) return null;
  return { levels: reading.levels(best), order: bestOrder.map((tune) => tunes[tune]!.id) };

  function from(position: number, placed: number, previous: number, costs: ReadonlyMap<Stand, number>): void {
    if (position === tunes.length) {
      const least = Math.min(...costs.values());
      if (!rules.mayEnd(previous) || least >= best) return;
      best = least;
      bestOrder = [...order];
      return;
    }
    for (let tune = 0; tune < tunes.length; tune++) {
      if ((placed & (1 << tune)) !== 0 || !rules.mayCome(tune, position, previous, placed)) continue;
      order.push(tune);
      from(position + 1, placed | (1 << tune), tune, played(tune, position, previous, costs));
      order.pop();
    }
  }

  function played(
    tune: number,
    position: number,
    previous: number,
    costs: ReadonlyMap<Stand, number>,
  ): Map<Stand, number> {
    const after = new Map<Stand, number>();
    const offClock = setStart[position]!;
    const inMedley = rules.inMedley(previous, tune);
    const always = offClock ? 0 : reading.between(tunes[previous]!, tunes[tune]!, inMedley);
    for (const [stand, cost] of costs) {
      for (const way of reading.waysTo(tunes[tune]!, stand, offClock, inMedley)) {
        const all = cost + always + way.cost;
        if (all < (after.get(way.to) ?? Infinity)) after.set(way.to, all);
      }
    }
    return after;
  }
}

/** Whether any order keeps the rules, whatever it costs. */
export function someOrderHolds(problem: OrderingProblem): boolean {
  const rules = new GrowingOrder(problem);
  const count = problem.sets.flat().length;
  return from(0, 0, -1);

  function from(position: number, placed: number, previous: number): boolean {
    if (position === count) return rules.mayEnd(previous);
    for (let tune = 0; tune < count; tune++) {
      if ((placed & (1 << tune)) !== 0 || !rules.mayCome(tune, position, previous, placed)) continue;
      if (from(position + 1, placed | (1 << tune), tune)) return true;
    }
    return false;
  }
}
