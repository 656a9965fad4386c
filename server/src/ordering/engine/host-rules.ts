import type { OrderingProblem } from './ordering-problem';
import type { HostRule } from './units';

/**
 * The host's rules by index in the host's order. A medley or pair with an id that is not played says nothing
 * of it.
 */
export function hostRules(problem: OrderingProblem, order: readonly string[]): readonly HostRule[] {
  const entryOf = new Map(order.map((id, entry) => [id, entry]));
  const rules: HostRule[] = [];
  for (const [id, position] of Object.entries(problem.pins)) {
    const entry = entryOf.get(id);
    if (entry === undefined) continue;
    rules.push({ told: { rule: 'pin', ids: [id] }, use: { pin: [entry, position] } });
  }
  for (const ids of problem.medleys) {
    const known = ids.filter((id) => entryOf.has(id));
    if (known.length < 2) continue;
    rules.push({
      told: { rule: 'medley', ids: known },
      use: { medley: known.map((id) => entryOf.get(id)!) },
    });
  }
  for (const [first, second] of problem.befores) {
    const [a, b] = [entryOf.get(first), entryOf.get(second)];
    if (a === undefined || b === undefined) continue;
    rules.push({ told: { rule: 'before', ids: [first, second] }, use: { before: [a, b] } });
  }
  return rules;
}
