// Whatever a command starts, it stops again: on success, on failure and on Ctrl-C, last started first.

type CleanUp = () => Promise<void> | void;

const interruptions: (() => void)[] = [];
const cleanUps: CleanUp[] = [];
let ending: Promise<never> | undefined;

/** Registers what cuts short a step that is under way. All of these run before the first clean-up. */
export function onEnding(interrupt: () => void): void {
  interruptions.push(interrupt);
}

/** Registers what undoes a step. It may run while that step is still under way, after Ctrl-C. */
export function atEnd(cleanUp: CleanUp): void {
  cleanUps.push(cleanUp);
}

export function isEnding(): boolean {
  return ending !== undefined;
}

/** Runs every clean-up once and leaves with the code of the first call; later calls wait for the first. */
export function end(code: number): Promise<never> {
  ending ??= undoAll(code);
  return ending;
}

async function undoAll(code: number): Promise<never> {
  // One turn of the loop, so that `isEnding` is true for everybody before the first interruption.
  await Promise.resolve();
  for (const interrupt of interruptions) interrupt();
  let failed = 0;
  for (let cleanUp = cleanUps.pop(); cleanUp; cleanUp = cleanUps.pop()) {
    try {
      await cleanUp();
    } catch (error) {
      failed = 1;
      process.stderr.write(`While stopping: ${error instanceof Error ? error.message : String(error)}\n`);
    }
  }
  process.exit(code || failed);
}

/**
 * Ctrl-C, `kill` and a closed terminal all end the command tidily.
 * A terminal and npm may both deliver the same Ctrl-C, so a second signal changes nothing.
 */
export function endOnSignals(codes: { readonly interrupted: number; readonly terminated: number }): void {
  process.on('SIGINT', () => void end(codes.interrupted));
  process.on('SIGTERM', () => void end(codes.terminated));
  process.on('SIGHUP', () => void end(codes.terminated));
}
