// Which commands run from this checkout, so that `stop` finds them and their programs again, also after a crash.
import { mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { DATA } from './places';

const FOLDER = path.join(DATA, 'running');

/** A process, told apart from a later one with the same number by when it began (clock ticks since boot). */
type Mark = { readonly pid: number; readonly began: string };
export type Command = Mark & {
  /** Uses the cluster in .data/, which only one command does at a time. */
  readonly ownDatabase: boolean;
  /** Leaders of process groups. */
  readonly children: readonly Mark[];
};

/** Field 22 of /proc/pid/stat, counted after the name, which may itself hold spaces and brackets (proc(5)). */
function beginOf(pid: number): string | null {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19] ?? null;
  } catch {
    return null;
  }
}

export function lives({ pid, began }: Mark): boolean {
  return beginOf(pid) === began;
}

let own: Command | undefined;

function write(command: Command): void {
  mkdirSync(FOLDER, { recursive: true });
  writeFileSync(path.join(FOLDER, `${command.pid}.json`), JSON.stringify(command));
}

export function noteCommand(ownDatabase: boolean): void {
  own = { pid: process.pid, began: beginOf(process.pid) ?? '', ownDatabase, children: [] };
  write(own);
}

export function noteChild(pid: number): void {
  if (!own) return;
  own = { ...own, children: [...own.children, { pid, began: beginOf(pid) ?? '' }] };
  write(own);
}

export function forgetCommand(pid = process.pid): void {
  rmSync(path.join(FOLDER, `${pid}.json`), { force: true });
}

/** Every command noted here, alive or not. */
export function commands(): readonly Command[] {
  let names: readonly string[];
  try {
    names = readdirSync(FOLDER);
  } catch {
    return [];
  }
  return names.flatMap((name) => {
    try {
      return [JSON.parse(readFileSync(path.join(FOLDER, name), 'utf8')) as Command];
    } catch {
      return [];
    }
  });
}
