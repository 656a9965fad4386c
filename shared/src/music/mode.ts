/** The modes a key can be in, as the trade says them. `modal`: a tune without a clear third. */
export const MODES = [
  'major',
  'minor',
  'mixolydian',
  'dorian',
  'aeolian',
  'phrygian',
  'lydian',
  'locrian',
  'modal',
] as const;

export type Mode = (typeof MODES)[number];

/** Two halves of a table of usual tunings, named by the commonest mode of each. */
export type ModeFamily = 'major' | 'minor';

const MINOR_FAMILY: readonly Mode[] = ['modal', 'dorian', 'minor', 'aeolian'];

/**
 * Modal, dorian, minor and aeolian go together in the usual tunings; every other mode goes with major.
 * @example modeFamily('dorian') // 'minor'
 * @example modeFamily('mixolydian') // 'major'
 */
export function modeFamily(mode: Mode): ModeFamily {
  return MINOR_FAMILY.includes(mode) ? 'minor' : 'major';
}
