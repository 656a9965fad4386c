import type { Goal } from '@pegwell/shared/session/evening';
import { scoredEvening, type StoredEvening } from '../sessions/evening';
import type { OrderingProblem } from './engine/ordering-problem';

/**
 * A stored evening as a problem. While it is live, what was called keeps its place: the problem begins
 * with the tune that is now, and `before` is what stands ahead of it.
 * @param onlySet the one set whose order is asked for: all others stay as they are, with their rules
 */
export function problemOf(
  stored: StoredEvening,
  goal: Goal,
  onlySet?: string,
): {
  readonly problem: OrderingProblem;
  /** What keeps its place without being pinned there. */
  readonly facts: ReadonlySet<string>;
  /** How many levels of the problem's score are the evening's own: without a medley only pegs and stops are. */
  readonly levelsMeant: number;
  /** The whole board's sets, from the order of what is left. */
  readonly restore: (sets: readonly (readonly string[])[]) => string[][];
} {
  const evening = scoredEvening(stored);
  const ids = evening.sets.flat();
  const here = new Set(ids);
  const called = stored.session.status === 'live' ? (stored.session.progress?.called ?? []) : [];
  const others = onlySet === undefined ? [] : stored.sets.filter(({ id }) => id !== onlySet);
  const elsewhere = new Set(others.flatMap(({ entries }) => entries.map(({ id }) => id)));
  const facts = new Set([...called, ...elsewhere]);
  const keeps = new Set([...facts, ...stored.entries.flatMap(({ id, pinned }) => (pinned ? id : []))]);
  const medleys = evening.medleys
    .map((medley) => medley.filter((id) => here.has(id)))
    .filter((medley) => medley.length > 1);
  // A medley that other sets break already is broken whatever the order of this one.
  const canHold = medleys.filter(
    (medley) => !medley.some((id) => elsewhere.has(id)) || isTogether(medley, evening.sets),
  );
  const problem: OrderingProblem = {
    ...evening,
    goal,
    pins: Object.fromEntries(ids.flatMap((id, place) => (keeps.has(id) ? [[id, place]] : []))),
    medleys: canHold,
    befores: stored.session.befores.filter((pair) => pair.every((id) => here.has(id) && !elsewhere.has(id))),
  };
  return {
    problem,
    facts,
    levelsMeant: canHold.length === medleys.length ? 7 : 2,
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

function isTogether(medley: readonly string[], sets: readonly (readonly string[])[]): boolean {
  return sets.some((set) => {
    const start = set.indexOf(medley[0]!);
    return start >= 0 && medley.every((id, at) => set[start + at] === id);
  });
}
