import { scoreEvening } from '@pegwell/shared/session/score';
import { Random } from '../../../bench/random';
import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';
import { relaxations } from '../../src/ordering/engine/relax';
import { solve } from '../../src/ordering/engine/solve';
import { bestOfAll } from './enumeration';
import { keepsRules } from './host-rules';
import { randomProblem } from './random-problem';
import { compareLevels, levelsOf } from './reading';

/** Every order of these. */
function* permutations(ids: readonly string[]): Generator<readonly string[]> {
  if (ids.length === 0) yield [];
  for (const [at, id] of ids.entries()) {
    const others = ids.filter((_, other) => other !== at);
    for (const rest of permutations(others)) yield [id, ...rest];
  }
}

/**
 * The best without a tune, said in another way: of the orders in which the tune stays in its set, those that
 * keep the rules of the others once it is taken out, each scored without it.
 */
function bestWithout(problem: OrderingProblem, left: string): readonly number[] | null {
  const host = problem.sets.flat();
  const position = host.indexOf(left);
  let best: readonly number[] | null = null;
  for (const order of permutations(host.filter((id) => id !== left))) {
    let from = 0;
    const sets = problem.sets.map((set) => {
      const size = set.includes(left) ? set.length - 1 : set.length;
      return order.slice(from, (from += size));
    });
    const pins = Object.entries(problem.pins).filter(([id]) => id !== left);
    const keepsPins = pins.every(([id, at]) => order[at - (at > position ? 1 : 0)] === id);
    const others = {
      ...problem,
      ...{ sets, pins: {} },
      medleys: problem.medleys.map((medley) => medley.filter((id) => id !== left)),
      befores: problem.befores.filter((pair) => !pair.includes(left)),
    };
    if (!keepsPins || !keepsRules(others, order)) continue;
    const levels = levelsOf(scoreEvening(others).score, problem.goal);
    if (best === null || compareLevels(levels, best) < 0) best = levels;
  }
  return best;
}

describe('an evening without one of its rules, or one of its tunes', () => {
  it('is solved to what trying every order says, and is never worse', () => {
    let [rules, tunes, gains] = [0, 0, 0];
    for (let seed = 1; seed <= 90; seed++) {
      const random = new Random(seed);
      const given = randomProblem((below) => random.below(below), 2 + (seed % 4));
      const answer = solve(given);
      if (answer.outcome !== 'solution') continue;
      const problem = { ...given, sets: answer.sets };
      const with_ = levelsOf(answer.score, problem.goal);
      const facts = new Set(seed % 5 === 0 ? [problem.sets.flat()[0]!] : []);
      const relaxed = relaxations(problem, facts, Infinity);
      for (const { without, problem: rest } of relaxed) {
        const found = solve(rest);
        if (found.outcome !== 'solution') throw new Error(`seed ${seed}: ${found.outcome}`);
        const levels = levelsOf(found.score, problem.goal);
        const [id] = without.ids;
        const expected =
          without.rule === 'tune'
            ? bestWithout(problem, id!)
            : bestOfAll(withoutRule(problem, without))?.levels;
        expect({ seed, without, levels }).toEqual({ seed, without, levels: expected });
        if (without.rule === 'tune') tunes++;
        else rules++;
        // Tunes that are no medley any more count their key changes: pegs and stops are what is promised.
        const promised = without.rule === 'medley' ? 2 : 7;
        const worse = compareLevels(levels.slice(0, promised), with_.slice(0, promised));
        if (without.rule !== 'tune') expect(worse).toBeLessThanOrEqual(0);
        if (compareLevels(levels, with_) < 0) gains++;
      }
      const left = relaxed.flatMap(({ without, alike }) =>
        without.rule === 'tune' ? [...without.ids, ...alike] : [],
      );
      expect(left.sort()).toEqual(
        problem.sets
          .flat()
          .filter((id) => !facts.has(id))
          .sort(),
      );
    }
    expect([rules, tunes, gains].every((count) => count > 40)).toBe(true);
  });

  it('says the same of tunes that it calls alike', () => {
    let alikes = 0;
    for (let seed = 200; seed <= 260; seed++) {
      const random = new Random(seed);
      const given = randomProblem((below) => random.below(below), 5);
      const answer = solve(given);
      if (answer.outcome !== 'solution') continue;
      const problem = { ...given, sets: answer.sets };
      for (const { without, alike } of relaxations(problem, new Set(), Infinity)) {
        for (const id of alike) {
          alikes++;
          expect(bestWithout(problem, id)).toEqual(bestWithout(problem, without.ids[0]!));
        }
      }
    }
    expect(alikes).toBeGreaterThan(10);
  });

  it('tries the tunes at whose sides most pegs turn where there are too many', () => {
    const random = new Random(7);
    const given = randomProblem((below) => random.below(below), 6);
    const problem = { ...given, pins: {}, medleys: [], befores: [] };
    const { places } = scoreEvening(problem);
    const around = problem.sets
      .flat()
      .map((id, at) => [id, (places[at]?.pegChanges ?? 0) + (places[at + 1]?.pegChanges ?? 0)] as const);
    const most = Math.max(...around.map(([, pegs]) => pegs));
    const [only, ...none] = relaxations(problem, new Set(), 1);
    expect(none).toEqual([]);
    expect(new Map(around).get(only!.without.ids[0]!)).toBe(most);
  });
});

function withoutRule(
  problem: OrderingProblem,
  { rule, ids }: { rule: string; ids: readonly string[] },
): OrderingProblem {
  const others = <T extends readonly string[]>(lists: readonly T[]) =>
    lists.filter((list) => list.join() !== ids.join());
  if (rule === 'medley') return { ...problem, medleys: others(problem.medleys) };
  if (rule === 'before') return { ...problem, befores: others(problem.befores) };
  return {
    ...problem,
    pins: Object.fromEntries(Object.entries(problem.pins).filter(([id]) => id !== ids[0])),
  };
}
