import { execFileSync } from 'node:child_process';
import { join } from 'node:path';
import { solve } from '../server/src/ordering/engine/solve';
import type { OrderingProblem, Solution } from '../server/src/ordering/engine/ordering-problem';
import { levelOneProgram } from '../server/test/ordering/level-one-program';
import { startHighs } from '../server/test/ordering/linear-program';
import { Insertions } from '../shared/src/session/insert';
import { scoreEvening } from '../shared/src/session/score';
import { BY_HAND } from './by-hand';
import { CASES, FIRST, LARGEST, type Case } from './cases';
import { benchEvening } from './evenings';
import { at, row, short, timed } from './figures';

/**
 * How fast orders are found and proved, as the tables of bench/README.md:
 * `npm run bench:ordering [-- case [runs [each]]]`, a case being a letter of cases.ts, `insert`, `highs` or
 * `hand`. Every evening is seeded, so a figure can be had again on the same machine.
 */
const [only, runs, each] = [process.argv[2] ?? 'all', Number(process.argv[3] ?? 40), process.argv[4]];
const wanted = (key: string): boolean => only === 'all' || only === key;
const WARMING = Array.from({ length: 16 }, (_, index) => 9001 + index);

const cases = CASES.filter(({ key }) => wanted(key));
if (cases.length > 0) speed(cases);
if (wanted('insert')) insertions();
if (wanted('hand')) byHand();
if (wanted('highs')) void againstHighs();

function speed(cases: readonly Case[]): void {
  console.log(row('case', '', 'must reach', 'median', 'p95', 'worst', 'cold', '1', '2', 'all 7', 'gap'));
  console.log(row('---', '---', '---', '--:', '--:', '--:', '--:', '--:', '--:', '--:', '--:'));
  for (const { key, name, shape, goal } of cases) {
    for (const seed of WARMING) solve(benchEvening({ ...shape, seed }));
    const times: number[] = [];
    const proved: number[] = [];
    const gaps: number[] = [];
    for (let seed = 1; seed <= runs; seed++) {
      const problem = benchEvening({ ...shape, seed });
      const { result, ms } = timed(() => solved(problem));
      const first = problem.goal === 'pegs' ? result.score.pegChanges : result.score.retuneStops;
      times.push(ms);
      proved.push(result.provenLevels);
      gaps.push(first === 0 ? 0 : (first - result.lowerBound) / first);
      if (each) console.log(seed, short(ms), result.steps, result.provenLevels, first, result.lowerBound);
    }
    const share = (levels: number): string => {
      return `${Math.round((100 * proved.filter((many) => many >= levels).length) / runs)} %`;
    };
    const figures = [0.5, 0.95, 1].map((part) => short(at(times, part)));
    const gap = `${Math.round(100 * at(gaps, 1))} %`;
    console.log(row(key, name, goal, ...figures, short(cold(key)), share(1), share(2), share(7), gap));
  }
}

/** The median of five processes, each of which solves its first evening. */
function cold(key: string): number {
  const args = [...process.execArgv, join(__dirname, 'cold.ts'), key];
  const times = [1, 2, 3, 4, 5].map((seed) =>
    Number(execFileSync(process.execPath, [...args, `${seed}`], { encoding: 'utf8' })),
  );
  return at(times, 0.5);
}

function insertions(): void {
  const times: number[] = [];
  for (let run = -200; run < 200; run++) {
    const evening = benchEvening({ ...LARGEST, seed: 100 + run });
    const tune = { ...benchEvening({ ...LARGEST, seed: 5_000 + run }).tunes[0]!, id: 'one more' };
    const { ms } = timed(() => new Insertions(evening).everywhere(tune));
    if (run >= 0) times.push(ms);
  }
  const figures = [0.5, 0.95, 1].map((part) => short(at(times, part)));
  console.log(
    `\n${row('', 'must reach', 'median', 'p95', 'worst')}\n${row('---', '---', '--:', '--:', '--:')}`,
  );
  console.log(row('one tune at every place of 60 tunes, 6 kinds', 'p95 5', ...figures));
}

/** The first case without pins, which no habit keeps: pegs over those of the order found. */
function byHand(): void {
  const shape = { ...FIRST, pins: 0 };
  const ratios = BY_HAND.map((): number[] => []);
  const sums = BY_HAND.map(() => 0);
  let ours = 0;
  for (let seed = 1; seed <= 200; seed++) {
    const problem = benchEvening({ ...shape, seed });
    const { pegChanges } = solved(problem).score;
    ours += pegChanges;
    BY_HAND.forEach(({ order }, habit) => {
      const ids = order(problem);
      let from = 0;
      const sets = problem.sets.map(({ length }) => ids.slice(from, (from += length)));
      const theirs = scoreEvening({ ...problem, sets }).score.pegChanges;
      sums[habit]! += theirs;
      if (pegChanges > 0) ratios[habit]!.push(theirs / pegChanges);
    });
  }
  console.log(`\n${row('200 evenings', 'all pegs', 'median', 'p95')}\n${row('---', '--:', '--:', '--:')}`);
  BY_HAND.forEach(({ name }, habit) => {
    const all = sums[habit]! / ours;
    console.log(
      row(name, ...[all, at(ratios[habit]!, 0.5), at(ratios[habit]!, 0.95)].map((x) => x.toFixed(2))),
    );
  });
}

/** Both in this process, one after the other: the engine all seven levels, HiGHS level 1. */
async function againstHighs(): Promise<void> {
  const highs = await startHighs();
  const shape = { ...FIRST, alternatives: 0 };
  for (const seed of WARMING) solve(benchEvening({ ...shape, seed }));
  const [ours, theirs, ratios]: [number[], number[], number[]] = [[], [], []];
  const count = Math.min(runs, 20);
  for (let seed = 1; seed <= count; seed++) {
    const problem = benchEvening({ ...shape, seed });
    const { result, ms } = timed(() => solved(problem));
    const program = levelOneProgram(problem);
    const other = timed(() => highs(program));
    if (result.provenLevels < 1 || other.result !== result.score.pegChanges) {
      throw new Error(`Seed ${seed}: ${result.score.pegChanges} pegs, HiGHS ${other.result}`);
    }
    ours.push(ms);
    theirs.push(other.ms);
    ratios.push(other.ms / ms);
    if (each) console.log(seed, short(ms), short(other.ms), result.score.pegChanges);
  }
  console.log(`\n${row(`${count} evenings`, 'least', 'median', 'most')}\n${row('---', '--:', '--:', '--:')}`);
  for (const [name, values] of [
    ['Pegwell, ms', ours],
    ['HiGHS, ms', theirs],
    ['ratio', ratios],
  ] as const) {
    console.log(row(name, ...[0, 0.5, 1].map((part) => short(at(values, part)))));
  }
}

function solved(problem: OrderingProblem): Solution {
  const answer = solve(problem);
  if (answer.outcome !== 'solution') throw new Error(answer.outcome);
  return answer;
}
