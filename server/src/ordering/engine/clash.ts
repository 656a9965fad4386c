import { canHold } from './feasible';
import type { ClashingRule } from './ordering-problem';
import type { Steps } from './steps';
import type { HostRule, Rules } from './units';

/**
 * Of rules that cannot all hold, some that cannot, and of which none can be left out: each rule in turn is
 * left out for good where the rest still clashes (a deletion filter; Chinneck & Dravnieks 1991).
 * @returns an empty list where all rules can hold
 * @throws OutOfSteps
 */
export function clashing(
  count: number,
  setSizes: readonly number[],
  rules: readonly HostRule[],
  steps: Steps,
): readonly ClashingRule[] {
  if (canHold(rulesOf(count, setSizes, rules), steps)) return [];
  let kept = rules;
  for (const rule of rules) {
    const rest = kept.filter((other) => other !== rule);
    if (!canHold(rulesOf(count, setSizes, rest), steps)) kept = rest;
  }
  return kept.map(({ told }) => told);
}

export function rulesOf(count: number, setSizes: readonly number[], rules: readonly HostRule[]): Rules {
  const pins: (readonly [number, number])[] = [];
  const medleys: (readonly number[])[] = [];
  const befores: (readonly [number, number])[] = [];
  for (const { use } of rules) {
    if ('pin' in use) pins.push(use.pin);
    else if ('medley' in use) medleys.push(use.medley);
    else befores.push(use.before);
  }
  return { count, setSizes, pins, medleys, befores };
}
