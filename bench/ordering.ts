import { solve } from '../server/src/ordering/engine/solve';
import { benchEvening, type EveningShape } from './evenings';

/**
 * How fast orders are found and proved: `npm run bench:ordering [case] [runs] [each]`. Every evening is seeded,
 * so a figure can be had again on the same machine. Times are of the processor, so that what else runs on the
 * machine matters less; warm, after three evenings of the same kind.
 */
interface Case {
  readonly name: string;
  readonly shape: Omit<EveningShape, 'seed'>;
}

const ROOM = { tunes: 24, sets: 2, kinds: 2 };
const CASES: readonly Case[] = [
  {
    name: 'A 24, 12 groups, pins',
    shape: { ...ROOM, groups: 12, pins: 2, alternatives: 0.25, unstated: 0.1 },
  },
  {
    name: 'As the same, stops',
    shape: { ...ROOM, groups: 12, pins: 2, alternatives: 0.25, unstated: 0.1, goal: 'stops' },
  },
  {
    name: 'Ar with medleys, pairs',
    shape: { ...ROOM, groups: 12, pins: 2, medleys: 2, befores: 2, alternatives: 0.25, unstated: 0.1 },
  },
  { name: 'B 24 uniform', shape: { ...ROOM, uniform: true } },
  { name: 'C 40, 4 kinds, 10 tunings', shape: { tunes: 40, sets: 3, kinds: 4, tunings: 10 } },
  {
    name: 'D the same, alternatives',
    shape: { tunes: 40, sets: 3, kinds: 4, tunings: 10, alternatives: 0.25 },
  },
  { name: 'E 60, 6 kinds, 14 tunings', shape: { tunes: 60, sets: 4, kinds: 6, tunings: 14 } },
  {
    name: 'F1 the same, alternatives',
    shape: { tunes: 60, sets: 4, kinds: 6, tunings: 14, alternatives: 0.2 },
  },
  { name: 'F2 the same, half unstated', shape: { tunes: 60, sets: 4, kinds: 6, tunings: 14, unstated: 0.5 } },
  { name: 'G 200, one kind', shape: { tunes: 200, sets: 1, kinds: 1, tunings: 12 } },
];

const [only, runs] = [process.argv[2] ?? '', Number(process.argv[3] ?? 40)];
console.log(
  'case                          median    p95    max ms   steps p50  p95     proved: 1  2  all  gap',
);
for (const { name, shape } of CASES) {
  if (!name.startsWith(only)) continue;
  for (let seed = 9001; seed < 9004; seed++) solve(benchEvening({ ...shape, seed }));
  const times: number[] = [];
  const steps: number[] = [];
  const proven: number[] = [];
  const gaps: number[] = [];
  for (let seed = 1; seed <= runs; seed++) {
    const problem = benchEvening({ ...shape, seed });
    const begun = process.cpuUsage().user;
    const answer = solve(problem);
    times.push((process.cpuUsage().user - begun) / 1000);
    if (answer.outcome !== 'solution') throw new Error(`${name}, seed ${seed}: ${answer.outcome}`);
    steps.push(answer.steps);
    proven.push(answer.provenLevels);
    const first = problem.goal === 'pegs' ? answer.score.pegChanges : answer.score.retuneStops;
    gaps.push(first - answer.lowerBound);
    if (process.argv[4]) {
      console.log(
        seed,
        times.at(-1)!.toFixed(0),
        answer.steps,
        answer.provenLevels,
        first,
        answer.lowerBound,
      );
    }
  }
  const share = (k: number): string =>
    `${Math.round((100 * proven.filter((levels) => levels >= k).length) / runs)}`;
  console.log(
    `${name.padEnd(28)} ${at(times, 0.5).toFixed(0).padStart(7)} ${at(times, 0.95).toFixed(0).padStart(6)} ${at(times, 1).toFixed(0).padStart(6)}` +
      `   ${at(steps, 0.5)} ${at(steps, 0.95)}   ${share(1)} ${share(2)} ${share(7)} %  ${at(gaps, 1)}`,
  );
}

function at(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))]!;
}
