import type { SessionSuggestion } from '@pegwell/shared/contract/ordering';
import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { describe, expect, it } from 'vitest';
import { alignOrder, movedFrom, proofWords, scoreOrder } from './compare';
import { verdict } from './verdict';

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

  it('tell from where each tune moves, and nothing of those that stay', () => {
    const from = movedFrom(five, scoreOrder(five, five, 'pegs', BEST).board);
    expect([...from]).toEqual([
      ['2', 2],
      ['3', 3],
      ['4', 4],
    ]);
  });

  it('keep empty sets where the board has them', () => {
    const gap = evening([entry('1', 'GDAE')], [], [entry('2', 'AEAE')]);
    expect(alignOrder(gap, [['2'], ['1']])).toEqual([['2'], [], ['1']]);
  });
});

describe('what is better, and why', () => {
  it('is said in pegs, stops and minutes, and in how often each kind turns', () => {
    const [mine, best] = [scoreOrder(five, five, 'pegs'), scoreOrder(five, five, 'pegs', BEST)];
    // 30 pegs to 10, 3 stops to 1; stops of 2, 2 and 1½ minutes to one of 1½ (minutes.ts).
    expect(verdict(mine, best, 'pegs')).toEqual([
      '20 pegs and 2 stops fewer, about 4 min less tuning.',
      'Tunes in the same tuning follow each other: the fiddles turn pegs 2 times instead of 4.',
    ]);
  });

  it('gives no reason that is none', () => {
    const one = scoreOrder(five, five, 'pegs');
    expect(verdict(one, { ...one, score: { ...one.score, keyChanges: -1 } }, 'pegs')).toEqual([
      '1 key change fewer.',
      '',
    ]);
  });
});

describe('what is said of the proof', () => {
  const known = (more: Partial<SessionSuggestion>) =>
    ({ goal: 'pegs', provenLevels: 0, optimal: false, lowerBound: 35, ...more }) as SessionSuggestion;

  it.each<[Partial<SessionSuggestion>, string]>([
    [{ provenLevels: 1 }, 'No order of these tunes turns fewer pegs: proved.'],
    [{ provenLevels: 1, goal: 'stops' }, 'No order of these tunes has fewer stops: proved.'],
    [{ provenLevels: 2 }, 'No order of these tunes turns fewer pegs, or as few in fewer stops: proved.'],
    [
      { provenLevels: 7, optimal: true },
      'No order of these tunes turns fewer pegs: proved, down to the last half step.',
    ],
    [{}, 'At least 35 pegs are needed; whether fewer than 40 are enough is not known.'],
    [{ lowerBound: 0 }, 'Whether fewer than 40 pegs are enough is not known.'],
    [
      { stopped: 'time' },
      'At least 35 pegs are needed; whether fewer than 40 are enough is not known. The search ran out of time.',
    ],
  ])('%o: %s', (more, words) => {
    expect(proofWords(known(more), 40)).toEqual({ words, proved: words.includes(': proved') });
  });
});
