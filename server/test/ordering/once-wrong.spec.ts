import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseAccepted, type Tuned } from '@pegwell/shared/music/tuning';
import type { Goal } from '@pegwell/shared/session/evening';
import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';
import { solve } from '../../src/ordering/engine/solve';
import { bestOfAll } from './enumeration';
import { faultsOf } from './faults';
import { BARE } from './settings';

type Cells = Readonly<Record<string, string>>;

function accepted(kind: string, cell: string): readonly Tuned[] | 'any' {
  const parsed = parseAccepted(builtInKind(kind)!, cell);
  if (!parsed.ok) throw new Error(parsed.reason);
  return parsed.value;
}

/** Openings and tunes by kind, as a host writes them; `free` for an opening of null; a tune's key is its `key`. */
function evening(
  goal: Goal,
  openings: Cells,
  sets: readonly (readonly (Cells & { readonly key?: string })[])[],
  pins: OrderingProblem['pins'] = {},
): OrderingProblem {
  const kinds = Object.keys(openings);
  const tunes = sets.flat().map(({ key, ...cells }, index) => ({
    id: `${index + 1}`,
    tonic: key === 'D' ? 2 : 9,
    rhythm: null,
    accepted: Object.fromEntries(kinds.map((kind) => [kind, accepted(kind, cells[kind] ?? 'any')])),
  }));
  let from = 0;
  return {
    chairs: kinds.map((kind) => ({ kind: builtInKind(kind)!, count: kind === 'banjo' ? 2 : 1 })),
    openings: Object.fromEntries(
      kinds.map((kind) => [
        kind,
        openings[kind] === 'free' ? null : (accepted(kind, openings[kind]!) as readonly Tuned[])[0]!,
      ]),
    ),
    goal,
    spacedRhythms: [],
    tunes,
    sets: sets.map(({ length }) => tunes.slice(from, (from += length)).map(({ id }) => id)),
    medleys: [],
    pins,
    befores: [],
  };
}

/** Each was once given a worse order, or the best, with too much or too little proved of it. */
const CASES: readonly [string, OrderingProblem][] = [
  [
    'a tree of groups is no order, so its pegs may outweigh a stop',
    evening('stops', { fiddle: 'free', banjo: 'gCGCD' }, [
      [{ fiddle: 'AEAE' }, { fiddle: 'AEAE', banjo: 'gDGBD' }, { fiddle: 'DDAD', banjo: 'gDGCD' }],
    ]),
  ],
  [
    'who is silent later is tuned early, at a tune that could be played as they stand, in the break',
    evening('pegs', { fiddle: 'GDAE', mandolin: 'free' }, [
      [{ fiddle: 'AEAE or GDAE', mandolin: 'ADAE or GDAE' }],
      [{ mandolin: 'GDAE' }, { fiddle: 'AEAE' }, { mandolin: 'ADAE' }],
    ]),
  ],
  [
    'a tune that is not the last of its group lets all tune at once, before one in which some are silent',
    evening(
      'stops',
      { fiddle: 'GDAE', mandolin: 'GDAE' },
      [
        [
          { fiddle: 'ADAE', mandolin: 'ADAE' },
          { fiddle: 'ADAE', mandolin: 'ADAE' },
          { key: 'D' },
          { mandolin: 'ADAE' },
          {},
        ],
      ],
      { '4': 1 },
    ),
  ],
  [
    'a tune that all could play as they stand is not drawn forward: all tune at it, for tunes in which some are silent',
    evening('stops', { fiddle: 'AEAE', mandolin: 'GDAE' }, [
      [
        { key: 'D', fiddle: 'AEAC#' },
        { key: 'D' },
        { key: 'D', mandolin: 'ADAE' },
        { fiddle: 'ADAE', mandolin: 'GDAE' },
        { fiddle: 'ADAE or AEAC#', mandolin: 'GDAE or ADAE' },
      ],
    ]),
  ],
];

describe('evenings that went wrong once', () => {
  it.each(CASES)('%s', (_, problem) => {
    const { levels } = bestOfAll(problem)!;
    for (const settings of [undefined, BARE]) {
      const answer = solve(problem, () => false, settings);
      expect(faultsOf(problem, answer, levels)).toEqual([]);
    }
  });
});
