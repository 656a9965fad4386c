import type { Evening, EveningTune, Score } from './evening';
import { compareScores, scoreEvening } from './score';

/** What one more tune costs at its cheapest place, and where that is. */
export interface Price {
  /** `pegChanges` with the tune at that place less without it. */
  readonly pegChanges: number;
  /** Counted in the evening's own sets. */
  readonly setIndex: number;
  /** Where in that set the tune would stand. */
  readonly index: number;
}

/**
 * Tries the tune at every place, one place a step, so that a page can do other things between. The cheapest
 * is the one whose whole evening scores best by the evening's goal; of equal ones the last, so that tunes
 * that are free anywhere follow each other.
 *
 * @param without the score of the evening as it is
 * @param tune with an id that no tune of the evening has
 * @param fixed how many tunes at the head of the first set keep their place (while live, the one that is now)
 */
export function* pricing(
  evening: Evening,
  without: Score,
  tune: EveningTune,
  fixed = 0,
): Generator<void, Price | null> {
  let best: { readonly score: Score; readonly setIndex: number; readonly index: number } | null = null;
  const tunes = [...evening.tunes, tune];
  // A board without a set gets its first with its first tune.
  const places: Evening['sets'] = evening.sets.length > 0 ? evening.sets : [[]];
  for (const [setIndex, set] of places.entries()) {
    for (let index = setIndex === 0 ? fixed : 0; index <= set.length; index += 1) {
      const sets = places.map((ids, other) =>
        other === setIndex ? [...ids.slice(0, index), tune.id, ...ids.slice(index)] : ids,
      );
      const { score } = scoreEvening({ ...evening, tunes, sets });
      if (!best || compareScores(score, best.score, evening.goal) <= 0) best = { score, setIndex, index };
      yield;
    }
  }
  return (
    best && {
      pegChanges: best.score.pegChanges - without.pegChanges,
      setIndex: best.setIndex,
      index: best.index,
    }
  );
}

/** The same in one go. */
export function priceOf(evening: Evening, tune: EveningTune, fixed = 0): Price | null {
  const steps = pricing(evening, scoreEvening(evening).score, tune, fixed);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}
