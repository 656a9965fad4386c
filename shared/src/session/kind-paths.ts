import { standardPitches, type InstrumentKind } from '../music/instrument';
import type { Chair, Evening } from './evening';
import { changesOf, standOf, standsFor, type Change, type Stand } from './kind-steps';
import type { OrderPlace } from './running-order';

/** From one stand to the next over a place. */
export interface Step extends Change {
  /** Index among the stands after the place. */
  readonly to: number;
  readonly second: number;
}

/** All ways one kind can go through the evening: a graph in layers, one per place. */
export interface KindPaths {
  readonly kind: InstrumentKind;
  /** `stands[0]` is the opening alone; `stands[i + 1]` the ways to stand for the tune at place i. */
  readonly stands: readonly (readonly Stand[])[];
  /** `steps[i][s]`: from stand s before place i, in the order of the accepted list. */
  readonly steps: readonly (readonly (readonly Step[])[])[];
}

/** What a kind arrives in: standard where nothing is said. */
export function arrivalOf({ openings }: Evening, kind: InstrumentKind): Stand {
  const opening = openings[kind.id];
  return standOf(opening === undefined ? { pitches: standardPitches(kind), capo: 0 } : opening, 0);
}

/** The graph of one kind, every choice still open. */
export function kindPaths(evening: Evening, chair: Chair, places: readonly OrderPlace[]): KindPaths {
  const { kind, count } = chair;
  const changeOf = changesOf(chair);
  const stands: (readonly Stand[])[] = [[arrivalOf(evening, kind)]];
  const steps: (readonly (readonly Step[])[])[] = [];
  for (const place of places) {
    const before = stands[stands.length - 1]!;
    const accepted = place.tune.accepted[kind.id] ?? 'any';
    if (accepted === 'any' || accepted.length === 0) {
      stands.push(before.map((stand) => ({ ...stand, position: 0 })));
      steps.push(before.map((stand, to) => [{ ...changeOf(stand, stand), to, second: 0 }]));
      continue;
    }
    const after = standsFor(accepted);
    stands.push(after);
    steps.push(before.map((from) => after.map((stand, to) => stepTo(from, stand, to, place.offClock))));
  }
  return { kind, stands, steps };

  function stepTo(from: Stand, stand: Stand, to: number, offClock: boolean): Step {
    const change = changeOf(from, stand);
    const second = stand.position > 0 ? count : 0;
    return { ...change, to, second, capo: offClock ? 0 : change.capo };
  }
}

/**
 * Only the paths with the fewest peg changes. They are found kind by kind, because peg changes add up over
 * kinds: where they are the first level, no other path can be part of the best choice.
 */
export function fewestPegs(paths: KindPaths): KindPaths {
  const { stands, steps } = paths;
  const toGo = leastToGo(paths, (step) => step.pegs);
  let reached = new Set([0]);
  const kept = steps.map((layer, place) => {
    const next = new Set<number>();
    const keptLayer = layer.map((from, stand) => {
      if (!reached.has(stand)) return [];
      const best = from.filter((step) => step.pegs + toGo[place + 1]![step.to]! === toGo[place]![stand]!);
      for (const step of best) next.add(step.to);
      return best;
    });
    reached = next;
    return keptLayer;
  });
  return { kind: paths.kind, stands, steps: kept };
}

/** The least sum of a figure from each stand to the end; Infinity for stands that no kept path leaves. */
export function leastToGo({ stands, steps }: KindPaths, figure: (step: Step) => number): readonly number[][] {
  const toGo: number[][] = stands.map((layer) => layer.map(() => 0));
  for (let place = steps.length - 1; place >= 0; place--) {
    steps[place]!.forEach((from, stand) => {
      let least = Infinity;
      for (const step of from) least = Math.min(least, figure(step) + toGo[place + 1]![step.to]!);
      toGo[place]![stand] = least;
    });
  }
  return toGo;
}
