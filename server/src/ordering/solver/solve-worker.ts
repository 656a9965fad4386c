import { solve } from '../engine/solve';
import type { Answer, OrderingProblem } from '../engine/ordering-problem';
import { warmEvening } from './warm-evening';

/** What the thread is handed: all of it can be cloned, and `called` is shared with the asker. */
export interface SolveTask {
  readonly problem: OrderingProblem;
  readonly limitMs: number | null;
  /** One number; anything but 0 calls the search off. */
  readonly called: Int32Array;
}

// A search runs several times faster once its loops are compiled, so the first host does not pay for that.
for (let round = 0; round < 4; round++) solve(warmEvening(round));

/** Runs in the solving thread. The clock starts when the thread takes the task up. */
export default function run({ problem, limitMs, called }: SolveTask): Answer {
  const end = limitMs === null ? Infinity : performance.now() + limitMs;
  return solve(problem, () => Atomics.load(called, 0) !== 0 || performance.now() >= end);
}
