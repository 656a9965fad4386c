import type { SessionSuggestion } from '@pegwell/shared/contract/ordering';
import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { describe, expect, it } from 'vitest';
import { alignOrder, dearest, movedEntries, partsOf, proofWords, scoreOrder } from './compare';

const TUNINGS: Readonly<Record<string, readonly string[]>> = {
  GDAE: ['G3', 'D4', 'A4', 'E5'],
  ADAE: ['A3', 'D4', 'A4', 'E5'],
  AEAE: ['A3', 'E4', 'A4', 'E5'],
};

const entry = (id: string, tuning: string): ShownEntry => ({
  ...{
    id,
    tuneId: id,
    settingId: null,
    pinned: false,
    open: null,
    sitOut: [],
    title: id,
    key: 'D',
    mode: 'major',
  },
  ...{ rhythm: null, minutes: 5, removed: false },
  tunings: [
    { kind: 'fiddle', accepted: [{ tuning, pitches: [...TUNINGS[tuning]!], capo: 0 }], assumed: false },
  ],
});

const evening = (...sets: ShownEntry[][]) =>
  ({
    ...{
      chairs: [{ kind: 'fiddle', count: 5 }],
      openings: { fiddle: 'GDAE' },
      goal: 'pegs',
      status: 'planned',
    },
    ...{ spacedRhythms: [], nowEntryId: null, inForce: null, medleys: [], befores: [] },
    sets: sets.map((entries, index) => ({
      id: `S${index}`,
      title: `${['First', 'Second'][index]} set`,
      entries,
    })),
  }) as unknown as Session;

// The tunes of worked example 2 of score.md, in the host's order.
const five = evening(
  [entry('1', 'GDAE'), entry('2', 'AEAE'), entry('3', 'GDAE')],
  [entry('4', 'ADAE'), entry('5', 'AEAE')],
);
const BEST = [
  ['1', '3', '4'],
  ['2', '5'],
];

describe('two orders side by side', () => {
  it('score as score.md says (worked example 2)', () => {
    expect(scoreOrder(five, five, 'pegs', BEST).score).toMatchObject({
      ...{ pegChanges: 10, offClockPegChanges: 5, retuneStops: 1, semitones: 20 },
    });
  });

  it('tell what moves, the longest way first', () => {
    const moved = movedEntries(five, scoreOrder(five, five, 'pegs', BEST).board);
    expect(moved.map(({ entry: { id }, from, to }) => [id, from, to])).toEqual([
      ['2', 2, 4],
      ['3', 3, 2],
      ['4', 4, 3],
    ]);
  });

  it('offer one set alone only where its tunes stay in it and it helps', () => {
    expect(partsOf(five, five, 'pegs', BEST)).toEqual([]);
    const both = evening(
      [entry('1', 'AEAE'), entry('2', 'GDAE'), entry('3', 'AEAE')],
      [entry('4', 'AEAE'), entry('5', 'GDAE'), entry('6', 'AEAE')],
    );
    const order = [
      ['2', '1', '3'],
      ['4', '6', '5'],
    ];
    expect(partsOf(both, both, 'pegs', order).map(({ label }) => label)).toEqual([
      'Only the first set',
      'Only the second set',
    ]);
  });

  it('keep empty sets where the board has them', () => {
    const gap = evening([entry('1', 'GDAE')], [], [entry('2', 'AEAE')]);
    expect(alignOrder(gap, [['2'], ['1']])).toEqual([['2'], [], ['1']]);
  });

  it('name the tune without which this order needs fewest pegs', () => {
    const lone = evening([entry('1', 'GDAE'), entry('2', 'AEAE'), entry('3', 'GDAE')]);
    const [first] = dearest(lone, scoreOrder(lone, lone, 'pegs'), 'pegs');
    expect(first).toMatchObject({ entry: { id: '2' }, pegChanges: 0 });
  });
});

describe('what is said of the proof', () => {
  const known = (more: Partial<SessionSuggestion>) =>
    ({ goal: 'pegs', provenLevels: 0, optimal: false, lowerBound: 35, ...more }) as SessionSuggestion;

  it.each<[Partial<SessionSuggestion>, string]>([
    [{ provenLevels: 1 }, 'No order needs fewer pegs. Proved.'],
    [{ provenLevels: 1, goal: 'stops' }, 'No order needs fewer stops. Proved.'],
    [{ provenLevels: 2 }, 'No order needs fewer pegs, nor with these fewer stops. Proved.'],
    [{ provenLevels: 7, optimal: true }, 'No order is better. Proved.'],
    [{}, 'Every order needs at least 35 pegs; whether fewer than 40 do is not known.'],
    [
      { stopped: 'time' },
      'Every order needs at least 35 pegs; whether fewer than 40 do is not known. The search ran out of time.',
    ],
  ])('%o: %s', (more, words) => {
    expect(proofWords(known(more), 40)).toEqual({ words, proved: words.includes('Proved') });
  });
});
