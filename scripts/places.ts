import path from 'node:path';

/** Where things stand in a checkout. All absolute. */
export const ROOT = path.resolve(__dirname, '..');
/** What must outlive a run: the database, its secrets, uploaded files, remembered ports. Never committed. */
export const DATA = path.join(ROOT, '.data');
/** What may be thrown away at any time: logs of test steps, what was built from which source. */
export const CACHE = path.join(ROOT, '.cache');

export function inRoot(...parts: readonly string[]): string {
  return path.join(ROOT, ...parts);
}

/** A program of an installed package. Not through npx: the process held must be the one that works. */
export function installed(program: string): string {
  return inRoot('node_modules', '.bin', program);
}
