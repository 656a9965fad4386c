import type { Mode } from '@pegwell/shared/music/mode';

/** A key as players say it: `A`, `A modal`, `Bb dorian`. Major goes without saying. */
export function keyWords(key: string, mode: Mode): string {
  return mode === 'major' ? key : `${key} ${mode}`;
}

/** Tonics in the order of the scale, as they are usually spelled. */
export const TONICS: readonly string[] = 'C C# Db D D# Eb E F F# Gb G G# Ab A A# Bb B'.split(' ');
