import type { Steps } from './steps';
import { fitsAt, planOf, type Plan, type Rules } from './units';

/**
 * Whether any order keeps the rules; tunings play no part.
 *
 * A depth-first search over positions. Entries without rules only fill gaps, so a state is the position and
 * which of the others are placed; a state that failed once is not tried again. Units with the nearest
 * deadline are tried first.
 * @throws OutOfSteps
 */
export function canHold(rules: Rules, steps: Steps): boolean {
  const plan = planOf(rules);
  return plan !== null && someOrder(plan, steps) !== null;
}

/**
 * Units in an order that keeps all rules; null where none does.
 * @throws OutOfSteps
 */
export function someOrder(plan: Plan, steps: Steps): readonly number[] | null {
  const { units, fixedUnitAt } = plan;
  const count = fixedUnitAt.length;
  const deadlines = latestStarts(plan);
  if (deadlines === null) return null;
  const latest = deadlines;
  const ruled = units.flatMap((unit, index) => (unit.plain || unit.fixedAt !== null ? [] : [index]));
  ruled.sort((a, b) => latest[a]! - latest[b]! || a - b);
  const placed = units.map(() => false);
  const failed = new Set<string>();
  const plain = units.flatMap((unit, index) => (unit.plain ? [index] : []));
  const order: number[] = [];
  let plainPlaced = 0;
  return from(0) ? order : null;

  function from(position: number): boolean {
    steps.take(1);
    if (position === count) return true;
    const fixed = fixedUnitAt[position]!;
    if (fixed !== -1) return mayCome(fixed) && withPlaced(fixed, position);
    if (ruled.some((unit) => !placed[unit] && latest[unit]! < position)) return false;
    const key = `${position}:${ruled.map((unit) => (placed[unit] ? 1 : 0)).join('')}`;
    if (failed.has(key)) return false;
    steps.take(ruled.length);
    for (const unit of ruled) {
      if (placed[unit] || !mayCome(unit) || !fitsAt(plan, units[unit]!, position)) continue;
      if (withPlaced(unit, position)) return true;
    }
    if (plainPlaced < plain.length) {
      order.push(plain[plainPlaced++]!);
      if (from(position + 1)) return true;
      order.pop();
      plainPlaced--;
    }
    failed.add(key);
    return false;
  }

  function mayCome(unit: number): boolean {
    return units[unit]!.after.every((earlier) => placed[earlier]);
  }

  function withPlaced(unit: number, position: number): boolean {
    placed[unit] = true;
    order.push(unit);
    if (from(position + units[unit]!.entries.length)) return true;
    order.pop();
    placed[unit] = false;
    return false;
  }
}

/**
 * By unit: the last position at which it can start so that all that must come after it still can.
 * @returns null where before/after pairs go round in a circle
 */
export function latestStarts({ units, fixedUnitAt }: Plan): readonly number[] | null {
  const count = fixedUnitAt.length;
  const latest = units.map(({ entries, fixedAt }) => fixedAt ?? count - entries.length);
  // Relaxed as often as there are units: longer chains than that are circles.
  for (let round = 0; round <= units.length; round++) {
    let changed = false;
    for (const [unit, { after }] of units.entries()) {
      for (const earlier of after) {
        const by = latest[unit]! - units[earlier]!.entries.length;
        if (by >= latest[earlier]!) continue;
        latest[earlier] = by;
        changed = true;
      }
    }
    if (!changed) return latest.every((by, unit) => by >= (units[unit]!.fixedAt ?? 0)) ? latest : null;
  }
  return null;
}
