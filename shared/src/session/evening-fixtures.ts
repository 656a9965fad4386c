import { builtInKind } from '../music/instrument';
import type { Tuned } from '../music/tuning';
import type { Evening, EveningTune } from './evening';

/* Evenings for the tests of the score and of what is held to it. */

/** A small seeded generator (mulberry32), so that a failing case can be run again. */
export function randomFrom(seed: number): (below: number) => number {
  let state = seed >>> 0;
  return (below) => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return Math.floor((((t ^ (t >>> 14)) >>> 0) / 4294967296) * below);
  };
}

const POOLS: Record<string, readonly string[]> = {
  fiddle: ['G3 D4 A4 E5', 'A3 D4 A4 E5', 'A3 E4 A4 E5', 'G3 E4 A4 E5', 'A3 E4 A4 C#5', 'A3 E4 A4 Db5'],
  banjo: ['G4 D3 G3 B3 D4', 'G4 D3 G3 C4 D4', 'G4 C3 G3 C4 D4'],
  mandolin: ['G3 D4 A4 E5', 'A3 D4 A4 E5'],
};

/** An evening with all that the score knows: `most` tunes of up to three kinds, free openings, medleys, empty sets. */
export function randomEvening(seed: number, most = 5): Evening {
  const random = randomFrom(seed);
  const pick = <T>(list: readonly T[]): T => list[random(list.length)]!;
  const kinds = Object.keys(POOLS).filter((_, index) => index === 0 || random(2) === 0);
  const tuned = (kind: string): Tuned => ({ pitches: pick(POOLS[kind]!).split(' '), capo: pick([0, 0, 2]) });
  const count = 1 + random(most);
  const tunes = Array.from({ length: count }, (_, index): EveningTune => ({
    id: `t${index}`,
    tonic: pick([2, 7, 9]),
    rhythm: pick([null, 'reel', 'Waltz', 'air']),
    accepted: Object.fromEntries(
      kinds.map((kind) => [
        kind,
        random(5) === 0
          ? 'any'
          : Array.from({ length: 1 + random(kinds.length > 2 ? 2 : 3) }, () => tuned(kind)),
      ]),
    ),
  }));
  const ids = tunes.map(({ id }) => id);
  const cut = random(count + 1);
  return {
    chairs: kinds.map((kind) => ({ kind: builtInKind(kind)!, count: 1 + random(3) })),
    openings: Object.fromEntries(kinds.map((kind) => [kind, random(4) === 0 ? null : tuned(kind)])),
    goal: pick(['pegs', 'stops'] as const),
    spacedRhythms: ['waltz', 'air'],
    tunes,
    sets: random(2) === 0 ? [ids] : [ids.slice(0, cut), [], ids.slice(cut)],
    medleys: random(2) === 0 ? [] : [ids.slice(random(count), count)],
  };
}
