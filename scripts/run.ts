import { spawn } from 'node:child_process';
import { closeSync, openSync } from 'node:fs';
import { isEnding, onEnding } from './ending';

export type Run = {
  readonly cwd?: string;
  readonly env?: NodeJS.ProcessEnv;
  readonly input?: string;
  /** Where the output goes: kept and returned (default), shown as it comes, or appended to a file. */
  readonly output?: 'keep' | 'show' | { readonly file: string };
  /** Stays in the terminal's foreground and may ask the person there, as sudo does for a password. */
  readonly mayAsk?: boolean;
  /** Short and not to be torn apart: Ctrl-C waits for it, and it may run while everything ends. */
  readonly whole?: boolean;
};
/** `code` is 127 when the program could not be started. `output` is stdout and stderr together, if kept. */
export type Ran = { readonly code: number; readonly output: string };

const interruptible = new Set<number>();
onEnding(() => {
  for (const pid of interruptible) killGroup(pid, 'SIGTERM');
});

/** Signals a whole process group; nothing happens when it is gone already. */
export function killGroup(leader: number, signal: NodeJS.Signals): void {
  try {
    process.kill(-leader, signal);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ESRCH') throw error;
  }
}

/** Runs a program to its end, without a shell, so that no path needs quoting. */
export function run(program: string, args: readonly string[], options: Run = {}): Promise<Ran> {
  if (isEnding() && !options.whole) return Promise.resolve({ code: 130, output: '' });
  const { output = 'keep' } = options;
  const file = typeof output === 'object' ? openSync(output.file, 'a') : undefined;
  const out = file ?? (output === 'show' ? 'inherit' : 'pipe');
  const input = options.mayAsk ? 'inherit' : options.input === undefined ? 'ignore' : 'pipe';
  return new Promise((resolve) => {
    let text = '';
    const child = spawn(program, args, {
      cwd: options.cwd,
      env: options.env ?? process.env,
      stdio: [input, out, out],
      // A process group of its own: the terminal's Ctrl-C does not reach it, and it can be ended as a whole.
      detached: !options.mayAsk,
    });
    if (file !== undefined) closeSync(file);
    if (child.pid && !options.mayAsk && !options.whole) interruptible.add(child.pid);
    const keep = (chunk: Buffer): void => {
      text += chunk.toString('utf8');
    };
    child.stdout?.on('data', keep);
    child.stderr?.on('data', keep);
    child.stdin?.end(options.input);
    const finish = (code: number): void => {
      if (child.pid) interruptible.delete(child.pid);
      resolve({ code, output: text });
    };
    child.on('error', (error) => {
      text += `${error.message}\n`;
      finish(127);
    });
    // `close`, not `exit`: only then is the last line here.
    child.on('close', (code) => finish(code ?? 1));
  });
}
