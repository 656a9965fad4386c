import { benchEvening } from '../../../bench/evenings';
import { Random } from '../../../bench/random';
import { solve } from '../../src/ordering/engine/solve';
import { bestByClassCounts } from './class-counts';
import { faultsOf } from './faults';
import { levelOneProgram } from './level-one-program';
import { startHighs } from './linear-program';
import { mixedProblems, type Mixed } from './mixed-problems';
import { randomProblem } from './random-problem';
import { BARE } from './settings';

function expectBest({ seed, problem, best }: Mixed): void {
  const answer = solve(problem);
  const proved = answer.outcome === 'solution' ? answer.provenLevels : 0;
  expect({ seed, faults: faultsOf(problem, answer, best), proved }).toEqual({ seed, faults: [], proved: 7 });
}

describe('the order found, against a dynamic program over class counts', () => {
  it('is the best on 20 evenings of 13 or 14 tunes with pins, breaks and alternatives', () => {
    for (const mixed of mixedProblems(5001, 20, (seed) => 13 + (seed % 2))) expectBest(mixed);
  });

  it('is the best on 1,600 evenings of nine tunes that mix every feature', () => {
    for (let seed = 1; seed <= 1600; seed++) {
      const random = new Random(seed);
      const problem = randomProblem((below) => random.below(below), 9);
      const faults = faultsOf(
        problem,
        solve(problem, () => false, seed % 2 ? undefined : BARE),
        bestByClassCounts(problem),
      );
      expect({ seed, faults }).toEqual({ seed, faults: [] });
    }
  });

  it('is the best on 12 boards of 24 tunes in a few keys, both goals', () => {
    for (let seed = 1; seed <= 12; seed++) {
      const shape = {
        tunes: 24,
        sets: 2,
        kinds: 2,
        groups: 6,
        pins: seed % 3,
        unstated: seed % 5 === 0 ? 0.05 : 0,
      };
      const goal = seed % 4 === 0 ? 'stops' : 'pegs';
      const problem = benchEvening({ ...shape, seed: seed + 500, goal });
      expectBest({ seed, problem, best: bestByClassCounts(problem)! });
    }
  });
});

describe('the order found, against a general solver', () => {
  it('turns as few pegs as the integer program of level 1 on 3 evenings of 15 tunes', async () => {
    const highs = await startHighs();
    for (let seed = 1; seed <= 3; seed++) {
      const shape = {
        tunes: 15,
        sets: 2,
        kinds: 2,
        groups: 8,
        pins: seed % 3,
        alternatives: 0.25,
        unstated: 0.1,
      };
      const problem = benchEvening({ ...shape, seed });
      const optimum = highs(levelOneProgram(problem));
      expect({ seed, answer: solve(problem) }).toMatchObject({
        seed,
        answer: { lowerBound: optimum, score: { pegChanges: optimum } },
      });
    }
  });
});
