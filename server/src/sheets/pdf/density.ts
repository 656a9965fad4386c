/** How closely a sheet is set. Lengths in the drawing are for the roomy one; `pt` brings them to this one. */
export interface Density {
  readonly pt: (points: number) => number;
  /** In a retune, who and to what stand above the words, or run into them. */
  readonly labels: 'above' | 'run in';
}

export const ROOMY: Density = { pt: (points) => points, labels: 'above' };

/** For evenings with a retune before nearly every tune: small, but no smaller than a newspaper. */
const CLOSER = 0.86;
export const CLOSE: Density = { pt: (points) => points * CLOSER, labels: 'run in' };
