import { join } from 'node:path';
import type { Paper } from '@pegwell/shared/contract/sheets';
import { Piscina } from 'piscina';
import type { Sheet } from '../sheet';
import type { PressTask } from './press-worker';

/** Built there is a .js beside this file; under test the worker is read as it is written. */
const WRITTEN = __filename.endsWith('.ts');
const WORKER = join(__dirname, WRITTEN ? 'press-worker.ts' : 'press-worker.js');
/** Milliseconds after which the thread ends and gives its memory back: sheets are drawn now and then. */
const IDLE_MS = 60_000;

/** Draws sheets in a thread of its own: a quarter of a second that phones need not wait for. */
export class Press {
  private started: Piscina<PressTask, Uint8Array> | null = null;

  async draw(sheet: Sheet, paper: Paper): Promise<Buffer> {
    return Buffer.from(await this.pool.run({ sheet, paper }));
  }

  /** Nest ends it with the application. */
  async onApplicationShutdown(): Promise<void> {
    await this.started?.destroy();
    this.started = null;
  }

  private get pool(): Piscina<PressTask, Uint8Array> {
    return (this.started ??= new Piscina<PressTask, Uint8Array>({
      filename: WORKER,
      minThreads: 0,
      maxThreads: 1,
      idleTimeout: IDLE_MS,
      execArgv: WRITTEN ? ['--import', 'tsx', '--conditions', 'pegwell-source'] : [],
    }));
  }
}
