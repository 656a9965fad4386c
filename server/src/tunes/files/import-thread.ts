import { join } from 'node:path';
import { Injectable } from '@nestjs/common';
import { Piscina } from 'piscina';
import type { ImportChoice } from '@pegwell/shared/contract/import-choices';
import { refused, type Parsed } from '@pegwell/shared/music/parsed';
import type { StoredTune } from '../tune-content';
import type { FileTune } from './file-tune';
import type { ImportTask } from './import-worker';
import { planImport, type ImportPlan } from './plan-import';
import { readFile, type ReadFile, type Upload } from './read-file';

/** Bytes of a file, and tunes of file and library together, that take less time here than their way to a thread. */
const FEW_BYTES = 64 * 1024;
const FEW_TUNES = 1_000;
/** Milliseconds after which an idle thread gives its memory back. */
const IDLE = 60_000;
const MEMORY_MB = 512;

/** Built there is a .js beside this file; under test the worker is read as it is written. */
const WRITTEN = __filename.endsWith('.ts');
const WORKER = join(__dirname, WRITTEN ? 'import-worker.ts' : 'import-worker.js');

/**
 * Reads files and plans imports in a thread of its own, so that phones keep their answer times whatever somebody
 * uploads. One at a time; a file that takes too long, or too much memory, ends its thread and nothing else.
 */
@Injectable()
export class ImportThread {
  /** Milliseconds that reading a file may take, once the thread has taken it up. */
  protected readonly longest: number = 4_000;
  private pool: Piscina<ImportTask, unknown> | null = null;
  private turn: Promise<unknown> = Promise.resolve();

  async read(upload: Upload): Promise<Parsed<ReadFile>> {
    if (upload.bytes.byteLength <= FEW_BYTES) return readFile(upload);
    try {
      return (await this.inTurn({ what: 'read', upload }, this.longest)) as Parsed<ReadFile>;
    } catch (error) {
      if (!isTooMuch(error)) throw error;
      return refused('This file takes too long to read: it is no list of tunes, or has to be cut in parts.');
    }
  }

  async plan(
    tunes: readonly FileTune[],
    library: readonly StoredTune[],
    choices: readonly ImportChoice[],
  ): Promise<ImportPlan> {
    if (tunes.length + library.length <= FEW_TUNES) return planImport(tunes, library, choices);
    return (await this.inTurn({ what: 'plan', tunes, library, choices })) as ImportPlan;
  }

  /** Nest ends it with the application. */
  async onApplicationShutdown(): Promise<void> {
    await this.pool?.destroy();
    this.pool = null;
  }

  /** @param longest milliseconds, counted from when the thread takes it up */
  private inTurn(task: ImportTask, longest?: number): Promise<unknown> {
    const run = this.turn.then(async () => {
      const pool = (this.pool ??= start());
      await pool.run({ what: 'begin' });
      return pool.run(task, longest === undefined ? {} : { signal: AbortSignal.timeout(longest) });
    });
    this.turn = run.catch(() => undefined);
    return run;
  }
}

function start(): Piscina<ImportTask, unknown> {
  return new Piscina<ImportTask, unknown>({
    ...{ filename: WORKER, minThreads: 0, maxThreads: 1, idleTimeout: IDLE },
    resourceLimits: { maxOldGenerationSizeMb: MEMORY_MB },
    execArgv: WRITTEN ? ['--import', 'tsx', '--conditions', 'pegwell-source'] : [],
  });
}

/** Piscina ends a thread whose time is over; Node.js one whose memory is. */
function isTooMuch(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  return error.name === 'AbortError' || ('code' in error && error.code === 'ERR_WORKER_OUT_OF_MEMORY');
}
