import { builtInKind } from '@pegwell/shared/music/instrument';
import type { Tuned } from '@pegwell/shared/music/tuning';
import type { EveningTune } from '@pegwell/shared/session/evening';
import { clashFaults, faultsOf } from '../../../test/ordering/faults';
import type { OrderingProblem, Solution } from './ordering-problem';
import { solve } from './solve';

// That answers are the best there are is checked in server/test/ordering. Here is what no host should ask for.
const KINDS = ['fiddle', 'banjo', 'mandolin'].map((id) => builtInKind(id)!);

/** Many tunings per kind: the digits of `n` to base 3 say by how many semitones each string is raised. */
const tuning = (kind: number, n: number): Tuned => ({
  pitches: KINDS[kind]!.courses.map(({ standard }, course) => {
    const sharps = '#'.repeat(Math.floor(n / 3 ** course) % 3);
    return `${standard[0]}${sharps}${standard.at(-1)}`;
  }),
  capo: 0,
});

/** Two sets; all three kinds in every tune as `accepted` has it. */
function evening(count: number, accepted: (tune: number, kind: number) => readonly Tuned[]): OrderingProblem {
  const ids = Array.from({ length: count }, (_, index) => `t${index}`);
  return {
    chairs: KINDS.map((kind) => ({ kind, count: 2 })),
    openings: {},
    goal: 'pegs',
    spacedRhythms: ['waltz'],
    tunes: ids.map((id, tune): EveningTune => ({
      id,
      tonic: (tune * 7) % 12,
      rhythm: tune % 9 === 4 ? 'waltz' : 'reel',
      accepted: Object.fromEntries(KINDS.map(({ id }, kind) => [id, accepted(tune, kind)])),
    })),
    sets: [ids.slice(0, count / 2), ids.slice(count / 2)],
    medleys: [],
    pins: {},
    befores: [],
  };
}

function solved(problem: OrderingProblem): Solution {
  const begun = performance.now();
  const answer = solve(problem);
  // About two seconds here; on a machine ten times slower still no hang.
  expect(performance.now() - begun).toBeLessThan(60_000);
  expect(faultsOf(problem, answer)).toEqual([]);
  if (answer.outcome !== 'solution') throw new Error(answer.outcome);
  return answer;
}

describe('an evening that no host should ask for is answered, and not worse than it was', () => {
  it('of no tunes: zeros, proved', () => {
    expect(solved({ ...evening(0, () => []), sets: [] })).toMatchObject({
      optimal: true,
      lowerBound: 0,
      sets: [],
      score: { pegChanges: 0, retuneStops: 0, semitones: 0 },
    });
  });

  it('of one tune, as it is', () => {
    const one = evening(1, (_, kind) => [tuning(kind, 5)]);
    expect(solved(one)).toMatchObject({ optimal: true, sets: [[], ['t0']], moved: [] });
  });

  it('of 60 tunes that are all the same, as it is', () => {
    const all = evening(60, (_, kind) => [tuning(kind, 5)]);
    const same = { ...all, tunes: all.tunes.map((tune) => ({ ...tune, tonic: 2, rhythm: 'reel' })) };
    expect(solved(same)).toMatchObject({ optimal: true, moved: [], score: { retuneStops: 0 } });
  });

  it('of 300 tunes', () => {
    expect(solved(evening(300, (tune, kind) => [tuning(kind, (tune * 5) % 7)])).moved.length).toBeGreaterThan(
      0,
    );
  });

  it('with 15 tunings of each kind, each with each', () => {
    solved(evening(60, (tune, kind) => [tuning(kind, (tune * [1, 2, 7][kind]!) % 15)]));
  });

  it('with 20 accepted tunings of each kind, and claims nothing', () => {
    const lists = evening(12, (tune, kind) =>
      Array.from({ length: 20 }, (_, index) => ({ ...tuning(kind, index + tune), capo: index % 12 })),
    );
    expect(solved(lists)).toMatchObject({ provenLevels: 0, optimal: false, lowerBound: 0 });
  });

  it('with one step to take, as it is', () => {
    const hurried = { ...evening(60, (tune, kind) => [tuning(kind, (tune * 5) % 7)]), stepBudget: 1 };
    expect(solved(hurried)).toMatchObject({ moved: [], stopped: 'steps' });
  });
});

describe('rules that cannot all hold', () => {
  const plain = evening(6, (_, kind) => [tuning(kind, 0)]);
  const pin = (id: string) => ({ rule: 'pin', ids: [id] });
  const medley = (...ids: string[]) => ({ rule: 'medley', ids });
  const before = (...ids: string[]) => ({ rule: 'before', ids });
  type Case = [string, Partial<OrderingProblem>, { rule: string; ids: string[] }[]];
  const CASES: readonly Case[] = [
    ['a pin past the end', { pins: { t1: 6, t2: 3 } }, [pin('t1')]],
    ['two pins on one place', { pins: { t1: 4, t2: 4, t3: 5 } }, [pin('t1'), pin('t2')]],
    [
      'a medley across a pin',
      { pins: { t1: 1, t4: 2, t0: 5 }, medleys: [['t1', 't2']] },
      [pin('t1'), pin('t4'), medley('t1', 't2')],
    ],
    [
      'a medley across a break',
      { pins: { t1: 2, t0: 5 }, medleys: [['t1', 't2']] },
      [pin('t1'), medley('t1', 't2')],
    ],
    [
      'a medley longer than any set',
      { medleys: [['t0', 't1', 't2', 't3']] },
      [medley('t0', 't1', 't2', 't3')],
    ],
    [
      'two medleys that want one tune',
      {
        medleys: [
          ['t0', 't1'],
          ['t2', 't1'],
          ['t4', 't5'],
        ],
      },
      [medley('t0', 't1'), medley('t2', 't1')],
    ],
    [
      'a circle of pairs',
      {
        befores: [
          ['t1', 't2'],
          ['t5', 't0'],
          ['t2', 't3'],
          ['t3', 't1'],
        ],
      },
      [before('t1', 't2'), before('t2', 't3'), before('t3', 't1')],
    ],
    [
      'a pair against a medley',
      { medleys: [['t1', 't2', 't3']], befores: [['t3', 't1']] },
      [medley('t1', 't2', 't3'), before('t3', 't1')],
    ],
    [
      'a pair against two pins',
      { pins: { t3: 1, t1: 4, t0: 2 }, befores: [['t1', 't3']] },
      [pin('t3'), pin('t1'), before('t1', 't3')],
    ],
    [
      'no room before a pin',
      {
        pins: { t3: 1 },
        befores: [
          ['t0', 't3'],
          ['t1', 't3'],
          ['t3', 't5'],
        ],
      },
      [pin('t3'), before('t0', 't3'), before('t1', 't3')],
    ],
  ];

  it.each(CASES)('are named, and none that could be left out: %s', (_, rules, clashes) => {
    const problem = { ...plain, ...rules };
    const answer = solve(problem);
    expect(answer).toEqual({ outcome: 'clash', clashes });
    if (answer.outcome === 'clash') expect(clashFaults(problem, answer.clashes)).toEqual([]);
  });
});
