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

/** Whether the third is minor or missing: modal, dorian, minor and aeolian go together in the usual tunings. */
export function modeFamily(mode: Mode): 'major' | 'minor' {
  return mode === 'modal' || mode === 'dorian' || mode === 'minor' || mode === 'aeolian' ? 'minor' : 'major';
}
