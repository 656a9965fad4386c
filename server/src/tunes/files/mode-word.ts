import { MODES, type Mode } from '@pegwell/shared/music/mode';

const BY_THREE_LETTERS: ReadonlyMap<string, Mode> = new Map([
  ...MODES.map((mode) => [mode.slice(0, 3), mode] as const),
  ['ion', 'major'],
]);

/**
 * A mode by its first three letters in any case, as ABC 2.1 section 3.1.14 has it; `m` is minor. A capital `M`
 * alone is major, as musicians write chords (common practice; the standard does not say).
 * @example modeOf('MIXolydian') // 'mixolydian'
 * @example modeOf('treble') // null
 */
export function modeOf(word: string): Mode | null {
  if (word === 'm') return 'minor';
  if (word === 'M') return 'major';
  return BY_THREE_LETTERS.get(word.slice(0, 3).toLowerCase()) ?? null;
}

/** The same for a word that is nothing but a mode: `mix`, `Mixolydian`, `maj.`, but not `minuet`. */
export function modeNamed(word: string): Mode | null {
  const plain = word.trim().replace(/\.$/, '');
  const mode = modeOf(plain);
  const whole = /^ion/i.test(plain) ? 'ionian' : mode;
  return mode !== null && (plain.length === 1 || whole?.startsWith(plain.toLowerCase())) ? mode : null;
}
