import { fitsAt, type Plan } from './units';
import { orderCost } from './order-cost';
import type { Stage } from './stage';
import { OutOfShare, type Steps } from './steps';
import { isLess, NEVER, type Cost } from './sweep';

interface Improved {
  readonly order: readonly number[];
  /** {@link NEVER} where the steps did not even last for the order given. */
  readonly cost: Cost;
}

/**
 * An order made better by hand's moves: one unit taken out and put in elsewhere, or two exchanged, as long as
 * that helps (Or 1976; Lin 1965). It proves nothing; it is for evenings too large to be swept, whose best order
 * so far was found with an eye to tunings alone.
 *
 * @param order units in playing order, keeping the rules
 * @returns the last order that helped, when none does any more or the steps run out
 */
export function improved(stage: Stage, order: readonly number[], steps: Steps): Improved {
  const { plan } = stage;
  let best: Improved = { order, cost: NEVER };
  const helps = (tried: readonly number[]): boolean => {
    if (!keepsRules(plan, tried)) return false;
    const cost = orderCost(stage, tried, steps);
    if (!isLess(cost, best.cost)) return false;
    best = { order: tried, cost };
    return true;
  };
  try {
    helps(order);
    for (let helped = true; helped;) {
      helped = false;
      for (let from = 0; from < order.length; from++) {
        for (let to = 0; to < order.length; to++) {
          if (from === to) continue;
          if (helps(moved(best.order, from, to)) || (from < to && helps(exchanged(best.order, from, to)))) {
            helped = true;
          }
        }
      }
    }
  } catch (error) {
    if (!(error instanceof OutOfShare)) throw error;
  }
  return best;
}

function moved(order: readonly number[], from: number, to: number): readonly number[] {
  const left = order.filter((_, index) => index !== from);
  left.splice(to, 0, order[from]!);
  return left;
}

function exchanged(order: readonly number[], a: number, b: number): readonly number[] {
  return order.map((unit, index) => (index === a ? order[b]! : index === b ? order[a]! : unit));
}

function keepsRules(plan: Plan, order: readonly number[]): boolean {
  const placed = new Set<number>();
  let position = 0;
  for (const index of order) {
    const unit = plan.units[index]!;
    if (!fitsAt(plan, unit, position) || unit.after.some((earlier) => !placed.has(earlier))) return false;
    placed.add(index);
    position += unit.entries.length;
  }
  return true;
}
