import { leastToGo, type KindPaths, type Step } from './kind-paths';
import type { Level } from './levels';
import type { OrderPlace } from './running-order';

/** What is still to come, at least, from a half-made choice; per level in the order given. */
export interface ChoiceBounds {
  /**
   * @param kind the kind that chooses next at this place; those before it have chosen (their stand is one
   *   after the place), the others not yet
   */
  toGo(place: number, kind: number, stands: readonly number[], turned: boolean, broken: boolean): number[];
}

/**
 * No kind can do better than alone, and its figures add up over kinds: pegs, second choices, capo moves and
 * semitones are bounded so. Places where *some* kind turns are shared, so they are bounded by holding on:
 * each kind knows how far it can go without turning, somebody must turn by the nearest of those places, and
 * after a stop all are generously let go on from wherever suits them best.
 */
export function choiceBounds(
  kinds: readonly KindPaths[],
  places: readonly OrderPlace[],
  order: readonly Level[],
): ChoiceBounds {
  const sums: Partial<Record<Level, readonly (readonly number[][])[]>> = {
    pegChanges: kinds.map((paths) => leastToGo(paths, (step) => step.pegs)),
    secondChoices: kinds.map((paths) => leastToGo(paths, (step) => step.second)),
    capoMoves: kinds.map((paths) => leastToGo(paths, (step) => step.capo)),
    semitones: kinds.map((paths) => leastToGo(paths, (step) => step.semitones)),
  };
  const stops = holdingOn(
    kinds,
    places.map(({ offClock }) => !offClock),
    (step) => step.turns,
  );
  const breaks = holdingOn(
    kinds,
    places.map(({ inMedley }) => inMedley),
    (step) => step.changes,
  );
  return {
    toGo: (place, kind, stands, turned, broken) =>
      order.map((level) => {
        if (level === 'retuneStops') return stops(place, kind, stands, turned);
        if (level === 'ruleBreaks') return breaks(place, kind, stands, broken);
        const tables = sums[level];
        if (tables === undefined) return 0;
        return stands.reduce((sum, stand, k) => sum + tables[k]![k < kind ? place + 1 : place]![stand]!, 0);
      }),
  };
}

type PlacesToGo = (place: number, kind: number, stands: readonly number[], already: boolean) => number;

/** The least number of counted places, here or later, at which a step of some kind hits. */
function holdingOn(
  kinds: readonly KindPaths[],
  counted: readonly boolean[],
  hits: (step: Step) => boolean,
): PlacesToGo {
  // far[k][i][s]: the last place by which kind k, standing at s before place i, must hit; Infinity: never.
  const far = kinds.map(({ stands, steps }) => {
    const table: number[][] = stands.map((layer) => layer.map(() => Infinity));
    for (let place = steps.length - 1; place >= 0; place--) {
      steps[place]!.forEach((from, stand) => {
        let farthest = -1;
        for (const step of from) {
          const by = counted[place] && hits(step) ? place : table[place + 1]![step.to]!;
          farthest = Math.max(farthest, by);
        }
        table[place]![stand] = farthest;
      });
    }
    return table;
  });
  // after[i]: how many more places must be hit once place i was, wherever that let each kind go on from.
  const after: number[] = counted.map(() => 0);
  for (let place = counted.length - 1; place >= 0; place--) {
    const by = Math.min(...far.map((table) => Math.max(...table[place + 1]!)));
    after[place] = by === Infinity || by <= place ? 0 : 1 + after[by]!;
  }
  return (place, kind, stands, already) => {
    let by = Infinity;
    stands.forEach((stand, k) => {
      if (k < kind) by = Math.min(by, far[k]![place + 1]![stand]!);
      else if (!already) by = Math.min(by, far[k]![place]![stand]!);
    });
    return by === Infinity || by < 0 ? 0 : 1 + after[by]!;
  };
}
