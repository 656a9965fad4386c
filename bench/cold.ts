import { solve } from '../server/src/ordering/engine/solve';
import { CASES } from './cases';
import { benchEvening } from './evenings';
import { timed } from './figures';

/** One evening in a process that has solved none: `cold.ts [case] [seed]` prints milliseconds. */
const [key, seed] = [process.argv[2], Number(process.argv[3])];
const problem = benchEvening({ ...CASES.find((one) => one.key === key)!.shape, seed });
console.log(timed(() => solve(problem)).ms);
