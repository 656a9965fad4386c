import { scoreEvening } from '@pegwell/shared/session/score';
import { Random } from '../../../bench/random';
import { solve } from '../../src/ordering/engine/solve';
import { bestOfAll } from './enumeration';
import { clashFaults, faultsOf } from './faults';
import { randomProblem } from './random-problem';
import { levelsOf } from './reading';
import { BARE } from './settings';

type Outcome = 'solution' | 'clash';

/** Every order is tried; the answer must be the best, say so, and be scored alike by the plain score. */
function check(seed: number, count: number): Outcome {
  const random = new Random(seed);
  const problem = randomProblem((below) => random.below(below), count);
  const best = bestOfAll(problem);
  const answer = solve(problem, () => false, seed % 2 === 0 ? BARE : undefined);
  const about = { seed, count };
  const faults = [...faultsOf(problem, answer, best?.levels ?? null)];

  if (answer.outcome === 'clash') {
    expect({ ...about, faults: [...faults, ...clashFaults(problem, answer.clashes)] }).toEqual({
      ...about,
      faults: [],
    });
    return 'clash';
  }
  expect({ ...about, faults, optimal: answer.outcome === 'solution' && answer.optimal }).toEqual({
    ...about,
    faults: [],
    optimal: true,
  });
  // The tests' own reading of score.md, and the plain score, of the order that was found by trying all.
  let from = 0;
  const sets = problem.sets.map(({ length }) => best!.order.slice(from, (from += length)));
  const { score } = scoreEvening({ ...problem, sets });
  expect({ ...about, levels: levelsOf(score, problem.goal) }).toEqual({ ...about, levels: best!.levels });

  // Stopped early it must not claim more than it knows.
  const stepBudget = 1 + random.below(random.below(2) === 0 ? 40 : 600);
  const early = solve({ ...problem, stepBudget });
  expect({ ...about, stepBudget, faults: faultsOf(problem, early, best!.levels) }).toEqual({
    ...about,
    stepBudget,
    faults: [],
  });
  return 'solution';
}

function checkAll(from: number, many: number, count: (seed: number) => number): Record<Outcome, number> {
  const outcomes = { solution: 0, clash: 0 };
  for (let seed = from; seed < from + many; seed++) outcomes[check(seed, count(seed))]++;
  return outcomes;
}

/** 2,000 random evenings that mix every feature of the model, both goals. */
describe('the order found, against every order there is', () => {
  it('is the best on all seven levels, on 340 evenings of one to five tunes', () => {
    checkAll(1, 340, (seed) => 1 + (seed % 5));
  });

  it('is the best on 1,600 evenings of six tunes, and named rules clash where there is none', () => {
    const { solution, clash } = checkAll(1001, 1600, () => 6);
    expect(solution).toBeGreaterThan(1000);
    expect(clash).toBeGreaterThan(200);
  });

  it('is the best on 50 evenings of seven tunes, and on 10 of eight', () => {
    checkAll(3001, 50, () => 7);
    checkAll(4001, 10, () => 8);
  });
});
