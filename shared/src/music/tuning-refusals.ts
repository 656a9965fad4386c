import type { InstrumentKind } from './instrument';

/** The sentences that refuse a tuning: what was expected, what was read, what could not be. */

/** @example hasStrings(fiddle) // 'A fiddle has 4 strings' */
export function hasStrings(kind: InstrumentKind): string {
  const doubled = kind.courses.some(({ pegs }) => pegs > 1);
  const count = kind.courses.length;
  const noun = doubled
    ? count === 1
      ? 'course of strings'
      : 'courses of strings'
    : count === 1
      ? 'string'
      : 'strings';
  const name = kind.name.charAt(0).toLowerCase() + kind.name.slice(1);
  return `${/^[aeio]/.test(name) ? 'An' : 'A'} ${name} has ${count} ${noun}`;
}

/** @example tellCount(fiddle, 'GDA', ['G', 'D', 'A']) // 'A fiddle has 4 strings; GDA names 3: G D A.' */
export function tellCount(kind: InstrumentKind, text: string, found: readonly string[]): string {
  return `${hasStrings(kind)}; ${quoted(text)} names ${found.length}: ${found.join(' ')}.`;
}

/** @example cannotRead(fiddle, 'GDHE', 'H', ['G', 'D']) // 'A fiddle has 4 strings; in GDHE, after G D, "H" …' */
export function cannotRead(
  kind: InstrumentKind,
  text: string,
  part: string,
  found: readonly string[],
): string {
  const after = found.length > 0 ? `, after ${found.join(' ')}` : '';
  const where = part === text ? '' : `in ${quoted(text)}${after}, `;
  return `${hasStrings(kind)}; ${where}"${quoted(part)}" could not be read.`;
}

export function tellPitch(kind: InstrumentKind, pitch: string): string {
  return `${hasStrings(kind)}; "${quoted(pitch)}" lies outside the pitches that can be written.`;
}

export function tellCapo(fret: string): string {
  return fret === ''
    ? 'A capo needs its fret: capo 2.'
    : `A capo is a fret from 0 (none) to 12; "${quoted(fret)}" is not.`;
}

const LONGEST_QUOTE = 40;

/** What someone wrote, on one line and not longer than a line can hold. */
function quoted(text: string): string {
  const line = text.replace(/[\s\p{Cc}]+/gu, ' ');
  const signs = Array.from(line);
  return signs.length > LONGEST_QUOTE ? `${signs.slice(0, LONGEST_QUOTE).join('')}…` : line;
}
