import fc from 'fast-check';
import { benchEvening } from '../../../bench/evenings';
import type { Answer, OrderingProblem, Solution } from '../../src/ordering/engine/ordering-problem';
import { solve } from '../../src/ordering/engine/solve';
import { faultsOf } from './faults';
import { backToFront, respelled, retold } from './other-tellings';
import { randomProblem } from './random-problem';
import { compareLevels, levelsOf } from './reading';
import { BARE } from './settings';

/** Small numbers are drawn first when a failing case is made smaller: fewer tunes, first tunings, no rules. */
const problems = (most: number): fc.Arbitrary<OrderingProblem> =>
  fc
    .tuple(fc.integer({ min: 1, max: most }), fc.array(fc.nat(999_999), { minLength: 300, maxLength: 300 }))
    .map(([count, draws]) => {
      let next = 0;
      return randomProblem((below) => draws[next++ % draws.length]! % below, count);
    });

/** The same cases in every run; a figure in a failure's report runs it again. */
const runs = (numRuns: number) => ({ seed: 3, numRuns });

const levels = (answer: Solution, { goal }: OrderingProblem): number[] => levelsOf(answer.score, goal);

/** The levels of a proved best order; null where the rules clash. */
function best(problem: OrderingProblem): number[] | null {
  const answer = solve(problem);
  if (answer.outcome !== 'solution') return null;
  expect(answer.provenLevels).toBe(7);
  return levels(answer, problem);
}

describe('whatever is asked', () => {
  it('is answered with a permutation that keeps every rule, scored as the plain score does, and not worse than the host had', () => {
    fc.assert(
      fc.property(problems(12), fc.option(fc.nat(3000)), (problem, budget) => {
        const answer = solve(budget === null ? problem : { ...problem, stepBudget: budget });
        expect(faultsOf(problem, answer)).toEqual([]);
      }),
      runs(300),
    );
  });

  it('never gets better by one more rule', () => {
    fc.assert(
      fc.property(problems(9), fc.nat(2), fc.nat(8), fc.nat(8), (problem, rule, a, b) => {
        const ids = problem.sets.flat();
        const [one, other] = [ids[a % ids.length]!, ids[b % ids.length]!];
        fc.pre(rule === 0 || one !== other);
        const ruled = [
          { ...problem, pins: { ...problem.pins, [one]: problem.pins[one] ?? b % ids.length } },
          { ...problem, befores: [...problem.befores, [one, other] as const] },
          { ...problem, medleys: [...problem.medleys, [one, other]] },
        ][rule]!;
        const [free, held] = [best(problem), best(ruled)];
        if (held === null) return;
        expect(free).not.toBeNull();
        // Inside a medley keys may change for nothing, so there the first five levels alone must not fall.
        const count = rule === 2 ? 5 : 7;
        expect(compareLevels(free!.slice(0, count), held.slice(0, count))).toBeLessThanOrEqual(0);
      }),
      runs(200),
    );
  });

  it('never gets worse, nor its bound lower, by a larger budget', () => {
    fc.assert(
      fc.property(problems(14), (problem) => {
        let before: Answer = { outcome: 'undecided', stopped: 'steps' };
        for (const stepBudget of [10, 100, 300, 1000, 3000, 10_000, 100_000, 8_000_000]) {
          const answer = solve({ ...problem, stepBudget });
          if (before.outcome === 'solution' && answer.outcome === 'solution') {
            expect(compareLevels(levels(answer, problem), levels(before, problem))).toBeLessThanOrEqual(0);
            expect(answer.lowerBound).toBeGreaterThanOrEqual(before.lowerBound);
          } else if (before.outcome !== 'undecided') {
            expect(answer.outcome).toBe(before.outcome);
          }
          before = answer;
        }
      }),
      runs(100),
    );
  });

  it("comes back unchanged where it is the host's order already", () => {
    fc.assert(
      fc.property(problems(11), (problem) => {
        const answer = solve(problem);
        if (answer.outcome !== 'solution') return;
        const again = solve({ ...problem, sets: answer.sets });
        expect(again).toMatchObject({ sets: answer.sets, moved: [], score: answer.score });
      }),
      runs(150),
    );
  });

  it('does not depend on how pitches are spelled', () => {
    fc.assert(
      fc.property(problems(10), (problem) => expect(solve(respelled(problem))).toEqual(solve(problem))),
      runs(100),
    );
  });

  it('does not depend on what tunings are called, but for the semitones between them', () => {
    fc.assert(
      fc.property(problems(10), (problem) => {
        expect(best(retold(problem))?.slice(0, 6)).toEqual(best(problem)?.slice(0, 6));
      }),
      runs(100),
    );
  });

  it('turns as few pegs back to front, where nobody has an opening and nothing is pinned', () => {
    fc.assert(
      fc.property(problems(10), (drawn) => {
        const openings = Object.fromEntries(drawn.chairs.map(({ kind }) => [kind.id, null]));
        const problem = { ...drawn, goal: 'pegs' as const, openings, pins: {}, sets: [drawn.sets.flat()] };
        expect(best(backToFront(problem))?.[0]).toBe(best(problem)?.[0]);
      }),
      runs(150),
    );
  });
});

describe('two ways of searching', () => {
  it('agree on 60 evenings of 24 tunes: bounds and looking ahead on, and off', () => {
    let both = 0;
    for (let seed = 1; seed <= 60; seed++) {
      const problem = benchEvening({
        seed,
        tunes: 24,
        sets: 1 + (seed % 3),
        kinds: 1 + (seed % 3),
        groups: 4,
        pins: seed % 3,
        medleys: seed % 2,
        befores: seed % 4,
        alternatives: 0.1,
        unstated: 0.05,
        goal: seed % 4 === 0 ? 'stops' : 'pegs',
      });
      const usual = solve(problem);
      const bare = solve({ ...problem, stepBudget: 1_500_000 }, () => false, BARE);
      if (usual.outcome !== 'solution' || bare.outcome !== 'solution')
        throw new Error('These rules can hold');
      const proved = Math.min(usual.provenLevels, bare.provenLevels);
      if (proved === 7) both++;
      const [a, b] = [levels(usual, problem), levels(bare, problem)];
      expect({ seed, proved, levels: a.slice(0, proved) }).toEqual({
        seed,
        proved,
        levels: b.slice(0, proved),
      });
      expect(usual.lowerBound).toBeLessThanOrEqual(b[0]!);
      expect(bare.lowerBound).toBeLessThanOrEqual(a[0]!);
    }
    // The bare search cannot end all of them; where it does, all seven levels were compared.
    expect(both).toBeGreaterThanOrEqual(40);
  });
});
