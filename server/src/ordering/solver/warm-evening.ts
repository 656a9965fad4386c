import { builtInKind } from '@pegwell/shared/music/instrument';
import type { Tuned } from '@pegwell/shared/music/tuning';
import type { OrderingProblem } from '../engine/ordering-problem';

const FIDDLE = ['G3 D4 A4 E5', 'A3 D4 A4 E5', 'A3 E4 A4 E5', 'A3 E4 A4 C#5', 'G3 D4 G4 D5', 'D3 D4 A4 D5'];
const BANJO = ['G4 D3 G3 B3 D4', 'G4 D3 G3 C4 D4', 'G4 C3 G3 C4 D4'];

/** A made-up evening of 24 tunes that takes a search through all its parts. */
export function warmEvening(round: number): OrderingProblem {
  const fiddle = (index: number): Tuned => ({ pitches: FIDDLE[index % FIDDLE.length]!.split(' '), capo: 0 });
  const banjo = (index: number): Tuned => ({
    pitches: BANJO[index % BANJO.length]!.split(' '),
    capo: index % 2 === 0 ? 0 : 2,
  });
  const ids = Array.from({ length: 24 }, (_, index) => `${index}`);
  return {
    chairs: [
      { kind: builtInKind('fiddle')!, count: 4 },
      { kind: builtInKind('banjo')!, count: 2 },
    ],
    openings: { fiddle: fiddle(0), banjo: banjo(0) },
    goal: round % 2 === 0 ? 'pegs' : 'stops',
    spacedRhythms: ['waltz'],
    tunes: ids.map((id, index) => ({
      id,
      tonic: [9, 2, 7, 0][(index * (round + 3)) % 4]!,
      rhythm: index % 5 === 0 ? 'waltz' : 'reel',
      accepted: {
        fiddle: index % 4 === 1 ? [fiddle(index * 5 + round), fiddle(index)] : [fiddle(index * 7 + round)],
        banjo: index % 9 === 3 ? 'any' : [banjo(index * 3 + round)],
      },
    })),
    sets: [ids.slice(0, 12), ids.slice(12)],
    medleys: round === 3 ? [['4', '11']] : [],
    pins: round > 1 ? { '7': 7 } : {},
    befores: round === 3 ? [['20', '2']] : [],
  };
}
