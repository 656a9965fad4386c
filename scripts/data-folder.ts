import { randomBytes } from 'node:crypto';
import { mkdirSync, readFileSync, renameSync, statSync, writeFileSync } from 'node:fs';
import { userInfo } from 'node:os';
import path from 'node:path';
import { run } from './run';
import { DATA } from './places';
import { Sentence } from './sentence';

/** What a checkout remembers between runs. Nothing here is secret. */
export type Remembered = {
  /** Where the database cluster is, when not in .data/postgres. */
  readonly clusterFolder?: string;
  readonly databasePort?: number;
  readonly pagesPort?: number;
  readonly apiPort?: number;
  /** Where development shows the mail it caught. */
  readonly mailPort?: number;
  /** Where `start` serves. */
  readonly sitePort?: number;
};

const REMEMBERED = path.join(DATA, 'remembered.json');

/** Makes .data/ when missing. One of another user is named and left alone. */
export async function openDataFolder(): Promise<void> {
  const found = statSync(DATA, { throwIfNoEntry: false });
  if (found && found.uid !== process.getuid?.()) {
    const owner = (await run('id', ['-nu', String(found.uid)])).output.trim() || `user ${found.uid}`;
    throw new Sentence(
      `${DATA} belongs to ${owner}, and you are ${userInfo().username}; it is left alone.\n` +
        `Run Pegwell as ${owner}, or from a copy of the project that is yours.`,
    );
  }
  // Others may pass through (the database's own user has its folder inside) but not list what is here.
  mkdirSync(DATA, { recursive: true, mode: 0o711 });
}

export function remembered(): Remembered {
  try {
    return JSON.parse(readFileSync(REMEMBERED, 'utf8')) as Remembered;
  } catch {
    return {};
  }
}

export function remember(news: Remembered): void {
  writeWhole(REMEMBERED, `${JSON.stringify({ ...remembered(), ...news }, null, 2)}\n`, 0o644);
}

/** A secret of this checkout, made the first time it is asked for; only the owner can read its file. */
export function secret(name: string): string {
  const file = path.join(DATA, name);
  try {
    const kept = readFileSync(file, 'utf8').trim();
    if (kept) return kept;
  } catch {
    // Not made yet.
  }
  const made = randomBytes(32).toString('base64url');
  writeWhole(file, `${made}\n`, 0o600);
  return made;
}

/** Never half a file, also when the machine stops in the middle. */
function writeWhole(file: string, text: string, mode: number): void {
  const draft = `${file}.${process.pid}.new`;
  writeFileSync(draft, text, { mode });
  renameSync(draft, file);
}
