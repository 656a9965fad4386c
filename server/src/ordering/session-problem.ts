import type { Goal } from '@pegwell/shared/session/evening';
import { scoredEvening, type StoredEvening } from '../sessions/evening';
import type { OrderingProblem } from './engine/ordering-problem';

/**
 * A stored evening as a problem. While it is live, what was called keeps its place: the problem begins
 * with the tune that is now, and `before` is what stands ahead of it.
 */
export function problemOf(
  stored: StoredEvening,
  goal: Goal,
): {
  readonly problem: OrderingProblem;
  /** The whole board's sets, from the order of what is left. */
  readonly restore: (sets: readonly (readonly string[])[]) => string[][];
} {
  const evening = scoredEvening(stored);
  const ids = evening.sets.flat();
  const called = new Set(stored.session.status === 'live' ? stored.session.progress?.called : []);
  const keeps = new Set(
    stored.entries.filter(({ id, pinned }) => pinned || called.has(id)).map(({ id }) => id),
  );
  const here = new Set(ids);
  const problem: OrderingProblem = {
    ...evening,
    goal,
    pins: Object.fromEntries(ids.flatMap((id, place) => (keeps.has(id) ? [[id, place]] : []))),
    medleys: evening.medleys
      .map((medley) => medley.filter((id) => here.has(id)))
      .filter((medley) => medley.length > 1),
    befores: stored.session.befores.filter((pair) => pair.every((id) => here.has(id))),
  };
  return {
    problem,
    restore: (sets) => {
      const skipped = stored.sets.length - evening.sets.length;
      return stored.sets.map((set, index) => {
        const all = set.entries.map(({ id }) => id);
        if (index < skipped) return all;
        return [...all.filter((id) => !here.has(id)), ...(sets[index - skipped] ?? [])];
      });
    },
  };
}
