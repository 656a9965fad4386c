import { join } from 'node:path';
import { Piscina } from 'piscina';
import type { Answer, OrderingProblem } from '../engine/ordering-problem';
import { FairQueue, type Asked } from './fair-queue';
import type { SolveTask } from './solve-worker';

export interface SolveOptions {
  /** Whoever asks: askers take turns. */
  readonly asker?: string;
  /** An asker that goes away calls its search off. */
  readonly signal?: AbortSignal;
  /** Milliseconds of solving (waiting for a turn not counted) after which the best so far comes back. */
  readonly limitMs?: number;
}

/** Built there is a .js beside this file; under test the worker is read as it is written. */
const WRITTEN = __filename.endsWith('.ts');
const WORKER = join(__dirname, WRITTEN ? 'solve-worker.ts' : 'solve-worker.js');

/**
 * Solves orders in a thread of its own, so that phones keep their answer times while hosts ask. One thread,
 * kept warm; others wait for their turn.
 */
export class Solver {
  private started: Piscina<SolveTask, Answer> | null = null;

  /** Starts the thread before the first host asks: for the running server, not for every test of it. */
  warm(): void {
    this.started ??= pool();
  }

  /**
   * @returns the engine's answer; see engine/ordering-problem.ts
   * @throws the signal's reason where it was aborted, before or meanwhile
   */
  async solve(problem: OrderingProblem, options: SolveOptions = {}): Promise<Answer> {
    const { asker = '', signal, limitMs } = options;
    signal?.throwIfAborted();
    const called = new Int32Array(new SharedArrayBuffer(4));
    // The thread is asked to stop, not killed: a killed one would have to be warmed again for the next host.
    const callOff = (): void => void Atomics.store(called, 0, 1);
    signal?.addEventListener('abort', callOff, { once: true });
    try {
      this.started ??= pool();
      const task: SolveTask & Asked = {
        problem: plain(problem),
        limitMs: limitMs ?? null,
        called,
        [Piscina.queueOptionsSymbol]: { asker },
      };
      const answer = await this.started.run(task);
      signal?.throwIfAborted();
      return answer;
    } finally {
      signal?.removeEventListener('abort', callOff);
    }
  }

  /** Askers that wait for their turn. */
  get waiting(): number {
    return this.started?.queueSize ?? 0;
  }

  /** Ends the thread; what still waits is refused. */
  async close(): Promise<void> {
    await this.started?.destroy();
    this.started = null;
  }

  /** Nest ends it with the application. */
  onApplicationShutdown(): Promise<void> {
    return this.close();
  }
}

function pool(): Piscina<SolveTask, Answer> {
  return new Piscina<SolveTask, Answer>({
    filename: WORKER,
    minThreads: 1,
    maxThreads: 1,
    idleTimeout: Infinity,
    taskQueue: new FairQueue(),
    // Without it a task that finds the thread busy goes to the end of the line.
    stricterFIFO: true,
    execArgv: WRITTEN ? ['--import', 'tsx', '--conditions', 'pegwell-source'] : [],
  });
}

/** Only what the engine reads, so that nothing that cannot be cloned goes to the thread. */
function plain(problem: OrderingProblem): OrderingProblem {
  const { chairs, openings, goal, spacedRhythms, tunes, sets, medleys, pins, befores, stepBudget } = problem;
  return {
    chairs,
    openings,
    goal,
    spacedRhythms,
    tunes: tunes.map(({ id, tonic, rhythm, accepted }) => ({ id, tonic, rhythm, accepted })),
    sets,
    medleys,
    pins,
    befores,
    ...(stepBudget !== undefined && { stepBudget }),
  };
}
