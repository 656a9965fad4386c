/** Which words a reader's language has for two semitones: `a whole step` or `a tone`. */
export type StepTerms = 'steps' | 'tones';

/**
 * A distance as players say it, whatever its direction.
 * @example stepWords(2) // 'a whole step'
 * @example stepWords(-5) // '2½ steps'
 * @example stepWords(3, 'tones') // '1½ tones'
 */
export function stepWords(semitones: number, terms: StepTerms = 'steps'): string {
  const size = Math.abs(semitones);
  if (size === 1) return terms === 'steps' ? 'a half step' : 'a semitone';
  if (size === 2) return terms === 'steps' ? 'a whole step' : 'a tone';
  return `${Math.floor(size / 2)}${size % 2 === 1 ? '½' : ''} ${terms}`;
}

/**
 * The number that stands behind the words: a sign and semitones.
 * @example signedSemitones(-2) // '−2'
 */
export function signedSemitones(semitones: number): string {
  if (semitones === 0) return '0';
  return `${semitones < 0 ? '−' : '+'}${Math.abs(semitones)}`;
}
