import { spawn } from 'node:child_process';
import { createInterface } from 'node:readline';
import type { Readable } from 'node:stream';
import { atEnd, isEnding } from './ending';
import { noteChild } from './running';
import { killGroup } from './run';
import { Sentence } from './sentence';

/** How long a program may take to end by itself, in milliseconds. */
const PATIENCE = 10_000;

export type Child = {
  readonly name: string;
  readonly ended: Promise<number>;
  /** Comes true with the first line that holds a text; never, when no such line comes. */
  readonly says: (text: string) => Promise<void>;
};

type Start = {
  readonly name: string;
  readonly program: string;
  readonly args: readonly string[];
  readonly cwd: string;
  readonly env: NodeJS.ProcessEnv;
  /** Puts the name before every line, where several programs speak at once. */
  readonly named: boolean;
};

/** Starts a program that works until it is told to end, together with all that it starts itself. */
export function startChild({ name, program, args, cwd, env, named }: Start): Child {
  if (isEnding()) throw new Sentence('Stopped.');
  const child = spawn(program, args, {
    cwd,
    env,
    stdio: named ? ['ignore', 'pipe', 'pipe'] : ['ignore', 'inherit', 'inherit'],
    detached: true,
  });
  const listeners = new Set<(line: string) => void>();
  const heard = (line: string): void => {
    for (const listener of listeners) listener(line);
  };
  if (child.stdout) passOn(child.stdout, name, process.stdout, heard);
  if (child.stderr) passOn(child.stderr, name, process.stderr, heard);
  const ended = new Promise<number>((resolve) => {
    child.on('exit', (code) => resolve(code ?? 1));
    child.on('error', () => resolve(127));
  });
  const { pid } = child;
  if (pid) {
    noteChild(pid);
    atEnd(() => endGroup(pid));
  }
  const says = (text: string): Promise<void> =>
    new Promise((resolve) => listeners.add((line) => line.includes(text) && resolve()));
  return { name, ended, says };
}

function passOn(from: Readable, name: string, to: NodeJS.WriteStream, heard: (line: string) => void): void {
  createInterface({ input: from }).on('line', (line) => {
    if (line.trim()) to.write(`${name.padEnd(6)} | ${line}\n`);
    heard(line);
  });
}

function groupLives(leader: number): boolean {
  try {
    process.kill(-leader, 0);
    return true;
  } catch {
    return false;
  }
}

/** Ends a process group: politely, then not. */
export async function endGroup(leader: number): Promise<void> {
  killGroup(leader, 'SIGTERM');
  for (const until = Date.now() + PATIENCE; groupLives(leader) && Date.now() < until;) {
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  killGroup(leader, 'SIGKILL');
}
