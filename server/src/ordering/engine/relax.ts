import { scoreEvening } from '@pegwell/shared/session/score';
import type { OrderingProblem, RuleName } from './ordering-problem';

/** What is left out of a problem: one rule of the host's, or one tune. */
export interface LeftOut {
  readonly rule: RuleName | 'tune';
  /** Of a medley or a pair all tunes, in their order. */
  readonly ids: readonly string[];
}

export interface Relaxed {
  readonly without: LeftOut;
  readonly problem: OrderingProblem;
  /** Other tunes that could be left out in its place: each as good as this one, with the same left. */
  readonly alike: readonly string[];
}

/**
 * A problem without each of its rules, and without each of its tunes, one at a time. Where `sets` are an order
 * that keeps the rules, it keeps those that are left, and no relaxed answer needs more pegs or stops (the key
 * changes of tunes that are no medley any more do count).
 *
 * @param facts tunes that stay where they are: they cannot be left out, and their places are no rules
 * @param mostTunes of the tunes, those at whose sides most pegs are turned in this order
 */
export function relaxations(
  problem: OrderingProblem,
  facts: ReadonlySet<string>,
  mostTunes: number,
): readonly Relaxed[] {
  const rules = withoutRules(problem, facts).map((relaxed) => ({ ...relaxed, alike: [] }));
  return [...rules, ...withoutTunes(problem, facts, mostTunes)];
}

function withoutRules(problem: OrderingProblem, facts: ReadonlySet<string>): Omit<Relaxed, 'alike'>[] {
  const { pins, medleys, befores } = problem;
  return [
    ...Object.keys(pins)
      .filter((id) => !facts.has(id))
      .map((id) => {
        const others = Object.entries(pins).filter(([other]) => other !== id);
        const without = { rule: 'pin' as const, ids: [id] };
        return { without, problem: { ...problem, pins: Object.fromEntries(others) } };
      }),
    ...medleys.map((ids) => {
      const without = { rule: 'medley' as const, ids };
      return { without, problem: { ...problem, medleys: medleys.filter((other) => other !== ids) } };
    }),
    ...befores.map((ids) => {
      const without = { rule: 'before' as const, ids };
      return { without, problem: { ...problem, befores: befores.filter((other) => other !== ids) } };
    }),
  ];
}

function withoutTunes(
  problem: OrderingProblem,
  facts: ReadonlySet<string>,
  mostTunes: number,
): readonly Relaxed[] {
  const tunes = new Map(problem.tunes.map((tune) => [tune.id, tune]));
  const ruled = new Set([...Object.keys(problem.pins), ...problem.medleys.flat(), ...problem.befores.flat()]);
  const known = new Map<string, Relaxed & { alike: string[] }>();
  for (const id of busiest(problem, mostTunes)) {
    if (facts.has(id)) continue;
    const rest = withoutTune(problem, id);
    const { id: _, ...asks } = tunes.get(id)!;
    const sizes = rest.sets.map(({ length }) => length);
    const key = JSON.stringify(ruled.has(id) ? id : [asks, sizes, Object.entries(rest.pins).sort()]);
    const same = known.get(key);
    if (same) same.alike.push(id);
    else known.set(key, { without: { rule: 'tune', ids: [id] }, problem: rest, alike: [] });
  }
  return [...known.values()];
}

/** Its set has one tune less, and what is pinned behind it moves up by one. */
function withoutTune(problem: OrderingProblem, id: string): OrderingProblem {
  const at = problem.sets.flat().indexOf(id);
  const pins = Object.entries(problem.pins).filter(([pinned]) => pinned !== id);
  return {
    ...problem,
    tunes: problem.tunes.filter((tune) => tune.id !== id),
    sets: problem.sets.map((set) => set.filter((other) => other !== id)),
    pins: Object.fromEntries(
      pins.map(([pinned, position]) => [pinned, position > at ? position - 1 : position]),
    ),
    medleys: problem.medleys.map((ids) => ids.filter((other) => other !== id)),
    befores: problem.befores.filter((pair) => !pair.includes(id)),
  };
}

function busiest(problem: OrderingProblem, most: number): readonly string[] {
  const ids = problem.sets.flat();
  if (ids.length <= most) return ids;
  const { places } = scoreEvening(problem);
  const around = (at: number): number => (places[at]?.pegChanges ?? 0) + (places[at + 1]?.pegChanges ?? 0);
  const order = ids.map((_, at) => at).sort((a, b) => around(b) - around(a));
  return order.slice(0, most).map((at) => ids[at]!);
}
