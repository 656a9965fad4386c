import { solve } from '../server/src/ordering/engine/solve';
import { faultsOf } from '../server/test/ordering/faults';
import { levelOneProgram } from '../server/test/ordering/level-one-program';
import { startHighs } from '../server/test/ordering/linear-program';
import { mixedProblems } from '../server/test/ordering/mixed-problems';
import { benchEvening } from './evenings';
import { at, row, short, timed } from './figures';

/**
 * Proofs held to two other ways of finding the best, more of them than `npm test` has time for:
 * `npm run bench:proof`. Ends with an error where anything differs.
 */
const faults: string[] = [];

/** All seven levels by a dynamic program over class counts, of everything the model has. */
function classCounts(many: number, least: number, most: number): void {
  const [ours, theirs]: [number[], number[]] = [[], []];
  let [proved, stops] = [0, 0];
  const problems = mixedProblems(10_001, many, (seed) => least + (seed % (most + 1 - least)));
  for (;;) {
    const { result: next, ms: theirMs } = timed(() => problems.next());
    if (next.done) break;
    const { seed, problem, best } = next.value;
    const { result: answer, ms } = timed(() => solve(problem));
    ours.push(ms);
    theirs.push(theirMs);
    if (answer.outcome === 'solution' && answer.optimal) proved++;
    if (problem.goal === 'stops') stops++;
    for (const fault of faultsOf(problem, answer, best)) faults.push(`seed ${seed}: ${fault}`);
  }
  const what = `${many} of ${least}-${most} tunes, ${stops} by stops; class counts`;
  console.log(row(what, `${proved}`, short(at(ours, 0.5)), short(at(theirs, 0.5))));
}

/** Level 1 by HiGHS. */
async function integerPrograms(many: number): Promise<void> {
  const highs = await startHighs();
  const [ours, theirs]: [number[], number[]] = [[], []];
  let proved = 0;
  for (let seed = 1; seed <= many; seed++) {
    const shape = { tunes: 15 + (seed % 4), sets: 2, kinds: 2, groups: 8, alternatives: 0.25, unstated: 0.1 };
    const problem = benchEvening({ ...shape, pins: seed % 3, seed: 100 + seed });
    const { result: answer, ms } = timed(() => solve(problem));
    const program = levelOneProgram(problem);
    const { result: optimum, ms: theirMs } = timed(() => highs(program));
    ours.push(ms);
    theirs.push(theirMs);
    for (const fault of faultsOf(problem, answer)) faults.push(`HiGHS ${seed}: ${fault}`);
    if (answer.outcome !== 'solution') continue;
    if (answer.provenLevels > 0) proved++;
    const { lowerBound, score } = answer;
    if (lowerBound !== optimum || score.pegChanges !== optimum) {
      faults.push(`HiGHS ${seed}: ${optimum} pegs, not ${lowerBound} to ${score.pegChanges}`);
    }
  }
  console.log(
    row(`${many} of 15-18 tunes; HiGHS, level 1`, `${proved}`, short(at(ours, 0.5)), short(at(theirs, 0.5))),
  );
}

console.log(row('problems; held to', 'proved', 'Pegwell, median ms', 'the other, median ms'));
console.log(row('---', '--:', '--:', '--:'));
classCounts(3000, 8, 10);
classCounts(300, 12, 16);
void integerPrograms(20).then(() => {
  console.log(faults.length === 0 ? '\nNo difference.' : `\n${faults.join('\n')}`);
  process.exitCode = faults.length === 0 ? 0 : 1;
});
