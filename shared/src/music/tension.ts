/**
 * How hard a string pulls. Mersenne's law: tension goes with mass per length and the square of twice the
 * length times the frequency, T = mu (2 L f)^2.
 */

/** Newtons in a pound-force. */
export const NEWTONS_PER_POUND = 4.4482216;

/** Standard gravity in inches per second squared, as in D'Addario's published formula. */
const GRAVITY_INCHES = 386.4;

/**
 * What a change of `semitones` multiplies a string's tension by (same string, same length): 2^(d/6).
 * @example tensionRatio(2) // 1.26, a quarter more
 * @example tensionRatio(-5) // 0.561
 */
export function tensionRatio(semitones: number): number {
  return 2 ** (semitones / 6);
}

/**
 * The change of tension in words: sign, one decimal, percent.
 * @example tensionWords(2) // '+26.0 %'
 */
export function tensionWords(semitones: number): string {
  const percent = (tensionRatio(semitones) - 1) * 100;
  const sign = percent < 0 ? '−' : '+';
  return `${sign}${Math.abs(percent).toFixed(1)} %`;
}

/**
 * @param massPerMetre kg/m
 * @param length the sounding length in metres
 * @param frequency hertz
 * @returns newtons
 */
export function stringTension(massPerMetre: number, length: number, frequency: number): number {
  return massPerMetre * (2 * length * frequency) ** 2;
}

/**
 * In the units of string makers' charts (D'Addario, "A complete technical reference for fretted instrument
 * string tensions").
 * @param unitWeight pounds per inch
 * @param scale the sounding length in inches
 * @param frequency hertz
 * @returns pounds-force
 */
export function stringTensionPounds(unitWeight: number, scale: number, frequency: number): number {
  return (unitWeight * (2 * scale * frequency) ** 2) / GRAVITY_INCHES;
}
