import { builtInKind } from '@pegwell/shared/music/instrument';
import type { Tuned } from '@pegwell/shared/music/tuning';
import type { Evening, EveningTune, Score } from '@pegwell/shared/session/evening';
import { compareScores, scoreEvening } from '@pegwell/shared/session/score';
import type { OrderingProblem, Solution } from './ordering-problem';
import type { SearchSettings } from './search';
import { solve } from './solve';

/** Hardly any looking ahead, and a bound that sees next to nothing: the sweeps must do it all. */
const BARE: SearchSettings = {
  closerWidth: 1,
  bounds: [{ limits: { joints: 400, together: 1, apart: 1 }, width: 1, share: Infinity }],
  lookSteps: 1,
  cheapSweep: 0,
};

/** A small seeded generator (mulberry32), so that a failing case can be run again. */
function randomFrom(seed: number): (below: number) => number {
  let state = (seed * 2654435761) >>> 0;
  return (below) => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return Math.floor((((t ^ (t >>> 14)) >>> 0) / 4294967296) * below);
  };
}

const POOLS: Record<string, readonly string[]> = {
  fiddle: ['G3 D4 A4 E5', 'A3 D4 A4 E5', 'A3 E4 A4 E5', 'A3 E4 A4 C#5', 'D3 D4 A4 D5'],
  banjo: ['G4 D3 G3 B3 D4', 'G4 D3 G3 C4 D4', 'G4 C3 G3 C4 D4'],
  mandolin: ['G3 D4 A4 E5', 'A3 D4 A4 E5'],
};

function randomProblem(seed: number, count: number): OrderingProblem {
  const random = randomFrom(seed);
  const pick = <T>(list: readonly T[]): T => list[random(list.length)]!;
  const kinds = Object.keys(POOLS).filter((_, index) => index === 0 || random(2) === 0);
  const capos = random(2) === 0 ? [0] : [0, 0, 2];
  const tuned = (kind: string): Tuned => ({ pitches: pick(POOLS[kind]!).split(' '), capo: pick(capos) });
  const alternatives = random(3);
  const unstated = 2 + random(8);
  const tunes = Array.from({ length: count }, (_, index): EveningTune => ({
    id: `t${index}`,
    tonic: pick([2, 7, 9]),
    rhythm: pick([null, 'reel', 'reel', 'Waltz', 'air']),
    accepted: Object.fromEntries(
      kinds.map((kind) => [
        kind,
        random(unstated) === 0
          ? 'any'
          : Array.from({ length: 1 + (random(3) < alternatives ? random(3) : 0) }, () => tuned(kind)),
      ]),
    ),
  }));
  // Some tunes twice, so that classes have more than one member.
  for (let index = 1; index < count; index++) {
    if (random(3) === 0) tunes[index] = { ...tunes[random(index)]!, id: `t${index}` };
  }
  const ids = tunes.map(({ id }) => id);
  const cuts = [random(count + 1), random(count + 1)].sort((a, b) => a - b);
  const sets = pick([
    [ids],
    [ids.slice(0, cuts[0]), ids.slice(cuts[0])],
    [ids.slice(0, cuts[0]), ids.slice(cuts[0], cuts[1]), ids.slice(cuts[1])],
  ]);
  const shuffled = [...ids];
  for (let index = count - 1; index > 0; index--) {
    const other = random(index + 1);
    [shuffled[index], shuffled[other]] = [shuffled[other]!, shuffled[index]!];
  }
  const pins: Record<string, number> = {};
  for (let index = random(3); index > 0; index--) pins[pick(ids)] = random(count);
  const befores: [string, string][] = [];
  for (let index = Math.max(0, random(4) - 1); index > 0; index--) befores.push([pick(ids), pick(ids)]);
  return {
    chairs: kinds.map((kind) => ({ kind: builtInKind(kind)!, count: 1 + random(3) })),
    openings: Object.fromEntries(kinds.map((kind) => [kind, random(4) === 0 ? null : tuned(kind)])),
    goal: pick(['pegs', 'stops'] as const),
    spacedRhythms: ['waltz', 'air'],
    tunes,
    sets,
    medleys:
      random(3) > 0
        ? []
        : [shuffled.slice(0, 2 + random(2)), ...(random(3) > 0 ? [] : [shuffled.slice(3, 5)])],
    pins,
    befores,
  };
}

function* permutations(ids: readonly string[]): Generator<string[]> {
  if (ids.length === 0) yield [];
  for (const [index, id] of ids.entries()) {
    for (const rest of permutations([...ids.slice(0, index), ...ids.slice(index + 1)])) yield [id, ...rest];
  }
}

function keepsRules(problem: OrderingProblem, order: readonly string[]): boolean {
  for (const [id, position] of Object.entries(problem.pins)) if (order[position] !== id) return false;
  for (const [a, b] of problem.befores) if (order.indexOf(a) >= order.indexOf(b)) return false;
  const starts: number[] = [];
  let start = 0;
  for (const set of problem.sets) {
    starts.push(start);
    start += set.length;
  }
  return problem.medleys.every((medley) => {
    const at = order.indexOf(medley[0]!);
    if (!medley.every((id, index) => order[at + index] === id)) return false;
    return !starts.some((begins) => begins > at && begins < at + medley.length);
  });
}

function inSets(problem: OrderingProblem, order: readonly string[]): string[][] {
  let from = 0;
  return problem.sets.map(({ length }) => order.slice(from, (from += length)));
}

/** Every order that keeps the rules, each scored by the plain reference. */
function enumerated(problem: OrderingProblem): { score: Score; sets: string[][] } | null {
  let best: { score: Score; sets: string[][] } | null = null;
  for (const order of permutations(problem.sets.flat())) {
    if (!keepsRules(problem, order)) continue;
    const sets = inSets(problem, order);
    const { score } = scoreEvening({ ...problem, sets });
    if (best === null || compareScores(score, best.score, problem.goal) < 0) best = { score, sets };
  }
  return best;
}

const withoutOffClock = ({ offClockPegChanges: _, ...levels }: Score): Omit<Score, 'offClockPegChanges'> =>
  levels;

function checkSolution(problem: OrderingProblem, answer: Solution): void {
  const order = answer.sets.flat();
  expect([...order].sort()).toEqual([...problem.sets.flat()].sort());
  expect(answer.sets.map(({ length }) => length)).toEqual(problem.sets.map(({ length }) => length));
  expect(keepsRules(problem, order)).toBe(true);
  const evening: Evening = { ...problem, sets: answer.sets };
  expect(answer.score).toEqual(scoreEvening(evening).score);
}

function checkAgainstEnumeration(seed: number, count: number): 'solution' | 'clash' {
  const problem = randomProblem(seed, count);
  const expected = enumerated(problem);
  const answer = solve(problem, () => false, seed % 2 === 0 ? BARE : undefined);
  const about = { seed, count };
  if (expected === null) {
    expect({ ...about, outcome: answer.outcome }).toEqual({ ...about, outcome: 'clash' });
    if (answer.outcome !== 'clash') return 'clash';
    // None of the rules named can be left out, and together they do clash.
    const only = withRules(problem, answer.clashes);
    expect(enumerated(only)).toBeNull();
    for (const rule of answer.clashes) {
      const rest = answer.clashes.filter((other) => other !== rule);
      expect({ ...about, rule, holds: enumerated(withRules(problem, rest)) !== null }).toMatchObject({
        holds: true,
      });
    }
    return 'clash';
  }
  expect({ ...about, outcome: answer.outcome }).toEqual({ ...about, outcome: 'solution' });
  if (answer.outcome !== 'solution') return 'clash';
  checkSolution(problem, answer);
  expect({ ...about, score: withoutOffClock(answer.score) }).toEqual({
    ...about,
    score: withoutOffClock(expected.score),
  });
  const first = problem.goal === 'pegs' ? expected.score.pegChanges : expected.score.retuneStops;
  expect({
    ...about,
    proven: answer.provenLevels,
    optimal: answer.optimal,
    bound: answer.lowerBound,
  }).toEqual({
    ...about,
    proven: 7,
    optimal: true,
    bound: first,
  });
  const host = problem.sets.flat();
  if (keepsRules(problem, host)) {
    const { score } = scoreEvening(problem);
    if (compareScores(score, expected.score, problem.goal) === 0) expect(answer.sets.flat()).toEqual(host);
  }
  return 'solution';
}

function withRules(
  problem: OrderingProblem,
  rules: readonly { rule: string; ids: readonly string[] }[],
): OrderingProblem {
  const ids = (name: string): (readonly string[])[] =>
    rules.filter(({ rule }) => rule === name).map((rule) => rule.ids);
  return {
    ...problem,
    pins: Object.fromEntries(ids('pin').map(([id]) => [id!, problem.pins[id!]!])),
    medleys: ids('medley'),
    befores: ids('before') as [string, string][],
  };
}

describe('the order found, against every order there is', () => {
  it('agrees on all seven levels on 1,000 random evenings of up to 6 tunes', () => {
    const outcomes = { solution: 0, clash: 0 };
    for (let seed = 1; seed <= 1000; seed++) outcomes[checkAgainstEnumeration(seed, 2 + (seed % 5))]++;
    expect(outcomes.clash).toBeGreaterThan(50);
    expect(outcomes.solution).toBeGreaterThan(500);
  }, 300_000);

  it('agrees on 30 random evenings of 7 tunes', () => {
    for (let seed = 2001; seed <= 2030; seed++) checkAgainstEnumeration(seed, 7);
  }, 300_000);
});

describe('what no evening should ask for', () => {
  const kinds = ['fiddle', 'banjo', 'mandolin'];
  const lists = (tune: number) =>
    Object.fromEntries(
      kinds.map((kind, k) => {
        const [first, ...rest] = POOLS[kind]!;
        const tuned = Array.from({ length: 20 }, (_, index) => ({
          pitches: [...rest, first!][(index + tune + k) % POOLS[kind]!.length]!.split(' '),
          capo: index % 12,
        }));
        return [kind, tuned];
      }),
    );
  const ids = Array.from({ length: 12 }, (_, index) => `t${index}`);
  const rich: OrderingProblem = {
    chairs: kinds.map((kind) => ({ kind: builtInKind(kind)!, count: 1 })),
    openings: Object.fromEntries(
      kinds.map((kind) => [kind, { pitches: POOLS[kind]![0]!.split(' '), capo: 0 }]),
    ),
    goal: 'pegs',
    spacedRhythms: [],
    tunes: ids.map((id, tune) => ({ id, tonic: tune, rhythm: null, accepted: lists(tune) })),
    sets: [ids],
    medleys: [],
    pins: {},
    befores: [],
  };

  it('answers lists with thousands of ways together, claims nothing, and is not worse than the host', () => {
    const answer = solve(rich);
    if (answer.outcome !== 'solution') throw new Error(answer.outcome);
    checkSolution(rich, answer);
    expect(answer).toMatchObject({ provenLevels: 0, optimal: false, lowerBound: 0 });
    expect(compareScores(answer.score, scoreEvening(rich).score, 'pegs')).toBeLessThanOrEqual(0);
  }, 60_000);

  it('answers an empty evening with zeros, proved, and one tune as it is', () => {
    const empty = solve({ ...rich, tunes: [], sets: [] });
    expect(empty).toMatchObject({
      outcome: 'solution',
      optimal: true,
      provenLevels: 7,
      lowerBound: 0,
      sets: [],
    });
    const one = solve({
      ...rich,
      sets: [['t3']],
      tunes: rich.tunes.map((tune) => ({ ...tune, accepted: {} })),
    });
    expect(one).toMatchObject({ outcome: 'solution', optimal: true, sets: [['t3']], moved: [] });
  });

  it.each([
    ['a pin past the end', { pins: { t1: 12 } }, [{ rule: 'pin', ids: ['t1'] }]],
    [
      'two pins on one place',
      { pins: { t1: 4, t2: 4, t3: 5 } },
      [
        { rule: 'pin', ids: ['t1'] },
        { rule: 'pin', ids: ['t2'] },
      ],
    ],
    [
      'a circle of pairs',
      {
        befores: [
          ['t1', 't2'],
          ['t5', 't6'],
          ['t2', 't1'],
        ] as [string, string][],
      },
      [
        { rule: 'before', ids: ['t1', 't2'] },
        { rule: 'before', ids: ['t2', 't1'] },
      ],
    ],
    [
      'a medley longer than any set',
      { medleys: [ids.slice(0, 7)], sets: [ids.slice(0, 6), ids.slice(6)] },
      [{ rule: 'medley', ids: ids.slice(0, 7) }],
    ],
  ])('names the rules of %s', (_, rules, clashes) => {
    expect(solve({ ...rich, ...rules })).toEqual({ outcome: 'clash', clashes });
  });
});
