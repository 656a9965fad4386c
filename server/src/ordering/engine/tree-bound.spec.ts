import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning, type Tuned } from '@pegwell/shared/music/tuning';
import { BARE } from '../../../test/ordering/settings';
import type { OrderingProblem } from './ordering-problem';
import { solve } from './solve';

const fiddle = builtInKind('fiddle')!;
const banjo = builtInKind('banjo')!;

function tuned(kind: typeof fiddle, text: string): Tuned {
  const parsed = parseTuning(kind, text);
  if (!parsed.ok) throw new Error(parsed.reason);
  return parsed.value;
}

it('takes no tree for more pegs than a stop outweighs, where stops come first', () => {
  const tune = (id: string, fiddles: string, banjos?: string) => ({
    id,
    tonic: 0,
    rhythm: null,
    accepted: { fiddle: [tuned(fiddle, fiddles)], banjo: banjos ? [tuned(banjo, banjos)] : ('any' as const) },
  });
  const problem: OrderingProblem = {
    chairs: [
      { kind: fiddle, count: 1 },
      { kind: banjo, count: 2 },
    ],
    openings: { fiddle: null, banjo: tuned(banjo, 'gCGCD') },
    goal: 'stops',
    spacedRhythms: [],
    tunes: [tune('1', 'AEAE'), tune('2', 'AEAE', 'gDGBD'), tune('3', 'DDAD', 'gDGCD')],
    sets: [['1', '2', '3']],
    medleys: [],
    pins: {},
    befores: [],
  };
  // By hand: 3, 2, 1. Before 3 each banjo's 4th string, the fiddle being free; between 3 and 2 three of the
  // fiddle's strings and each banjo's 2nd: 1 stop, 2 + 3 + 2 pegs.
  expect(solve(problem, () => false, BARE)).toMatchObject({
    provenLevels: 7,
    score: { retuneStops: 1, pegChanges: 7 },
  });
});
