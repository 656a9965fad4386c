import { builtInKind } from '@pegwell/shared/music/instrument';
import type { Tuned } from '@pegwell/shared/music/tuning';
import type { EveningTune } from '@pegwell/shared/session/evening';
import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';

/** A whole number from 0 to below what is asked: from a seed, or from a property's own draws. */
export type Draw = (below: number) => number;

const POOLS: Record<string, readonly string[]> = {
  fiddle: ['G3 D4 A4 E5', 'A3 D4 A4 E5', 'A3 E4 A4 E5', 'A3 E4 A4 C#5', 'D3 D4 A4 D5'],
  banjo: ['G4 D3 G3 B3 D4', 'G4 D3 G3 C4 D4', 'G4 C3 G3 C4 D4'],
  mandolin: ['G3 D4 A4 E5', 'A3 D4 A4 E5'],
};

/**
 * A small evening that mixes all the model has: one to three kinds of one to three chairs (or none), `any` and
 * silence, lists with repeats and capos, openings of null and of standard, one to three sets (empty ones too),
 * pins (some past the end), medleys that may meet, pairs, spaced rhythms in any case, both goals. Few tunings
 * and keys, so that ties are common; some tunes stand in it twice.
 * @param count of tunes, at least 1
 */
export function randomProblem(draw: Draw, count: number): OrderingProblem {
  const pick = <T>(list: readonly T[]): T => list[draw(list.length)]!;
  const kinds = Object.keys(POOLS).filter((_, index) => index === 0 || draw(2) === 0);
  const capos = draw(2) === 0 ? [0] : [0, 0, 2];
  const tuned = (kind: string): Tuned => ({ pitches: pick(POOLS[kind]!).split(' '), capo: pick(capos) });
  const alternatives = draw(3);
  const unstated = pick([2, 3, 5, 9]);
  const accepted = (kind: string): readonly Tuned[] | 'any' =>
    draw(unstated) === 0
      ? pick(['any', []] as const)
      : Array.from({ length: 1 + (draw(3) < alternatives ? draw(3) : 0) }, () => tuned(kind));
  const tunes = Array.from({ length: count }, (_, index): EveningTune => ({
    id: `t${index}`,
    tonic: pick([2, 7, 9]),
    rhythm: pick([null, 'reel', 'reel', 'Waltz', 'air']),
    accepted: Object.fromEntries(kinds.map((kind) => [kind, accepted(kind)])),
  }));
  for (let index = 1; index < count; index++) {
    if (draw(3) === 0) tunes[index] = { ...tunes[draw(index)]!, id: `t${index}` };
  }
  const ids = tunes.map(({ id }) => id);
  return {
    chairs: kinds.map((kind) => ({ kind: builtInKind(kind)!, count: draw(12) === 0 ? 0 : 1 + draw(3) })),
    openings: Object.fromEntries(
      kinds.flatMap((kind): [string, Tuned | null][] => {
        const how = pick(['said', 'said', 'free', 'standard']);
        return how === 'standard' ? [] : [[kind, how === 'free' ? null : tuned(kind)]];
      }),
    ),
    goal: pick(['pegs', 'stops'] as const),
    spacedRhythms: pick([['waltz', 'air'], ['waltz', 'air'], ['Air'], []]),
    tunes,
    ...setsAndRules(draw, ids),
  };
}

function setsAndRules(
  draw: Draw,
  ids: readonly string[],
): Pick<OrderingProblem, 'sets' | 'pins' | 'medleys' | 'befores'> {
  const pick = <T>(list: readonly T[]): T => list[draw(list.length)]!;
  const cuts = Array.from({ length: draw(4) }, () => draw(ids.length + 1)).sort((a, b) => a - b);
  const starts = [0, ...cuts];
  const sets = starts.map((start, index) => ids.slice(start, starts[index + 1]));
  const pins: Record<string, number> = {};
  for (let left = draw(3); left > 0; left--) {
    // The tune that opens a set is what hosts pin most, and where a bound goes wrong first.
    pins[pick(ids)] = draw(2) === 0 ? draw(ids.length + (draw(6) === 0 ? 1 : 0)) : pick(starts);
  }
  const befores: [string, string][] = [];
  for (let left = Math.max(0, draw(4) - 1); left > 0; left--) {
    const [first, second] = [pick(ids), pick(ids)];
    if (first !== second) befores.push([first, second]);
  }
  const medleys: string[][] = [];
  if (draw(3) === 0) {
    const rest = [...ids];
    const take = (most: number): string[] =>
      Array.from({ length: Math.min(most, rest.length) }, () => rest.splice(draw(rest.length), 1)[0]!);
    medleys.push(take(2 + draw(2)));
    if (draw(3) === 0) medleys.push([...(draw(3) === 0 ? medleys[0]!.slice(-1) : take(1)), ...take(1)]);
  }
  return { sets, pins, befores, medleys: medleys.filter(({ length }) => length > 1) };
}
