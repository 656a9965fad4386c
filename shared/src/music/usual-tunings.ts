import type { Mode } from './mode';
import { MODES } from './mode';
import { parseTonic } from './pitch';
import type { Tuned } from './tuning';

/**
 * How a kind usually stands in a key. A circle has rows of its own; the first row that fits decides. Where a
 * setting says nothing, what they give is shown as assumed.
 */
export interface UsualTuning {
  readonly kind: string;
  /** A tonic as spelled, or null for every one. Compared by sound: A# is Bb. */
  readonly tonic: string | null;
  /** Null for every mode. */
  readonly modes: readonly Mode[] | null;
  readonly tuned: Tuned;
}

/** Those in which a banjo player leaves the major third out. */
const MODAL: readonly Mode[] = ['modal', 'dorian', 'minor', 'aeolian'];
const OTHERS: readonly Mode[] = MODES.filter((mode) => !MODAL.includes(mode));

function banjo(tonic: string, modes: readonly Mode[] | null, pitches: string, capo: number): UsualTuning {
  return { kind: 'banjo', tonic, modes, tuned: { pitches: pitches.split(' '), capo } };
}

/** What Pegwell assumes until a circle says otherwise. Common practice. */
export const BUILT_IN_USUAL: readonly UsualTuning[] = [
  { kind: 'fiddle', tonic: null, modes: null, tuned: { pitches: ['G3', 'D4', 'A4', 'E5'], capo: 0 } },
  banjo('G', OTHERS, 'G4 D3 G3 B3 D4', 0),
  banjo('A', OTHERS, 'G4 D3 G3 B3 D4', 2),
  banjo('C', OTHERS, 'G4 C3 G3 C4 D4', 0),
  banjo('D', null, 'G4 C3 G3 C4 D4', 2),
  banjo('G', MODAL, 'G4 D3 G3 C4 D4', 0),
  banjo('A', MODAL, 'G4 D3 G3 C4 D4', 2),
];

/**
 * The first row that fits, or `any`: the kind plays as it stands.
 * @param tonicPitchClass 0 (C) to 11 (B)
 */
export function usualFrom(
  rows: readonly UsualTuning[],
  kindId: string,
  tonicPitchClass: number,
  mode: Mode,
): Tuned | 'any' {
  const row = rows.find(
    ({ kind, tonic, modes }) =>
      kind === kindId &&
      (tonic === null || parseTonic(tonic)?.pitchClass === tonicPitchClass) &&
      (modes === null || modes.includes(mode)),
  );
  return row ? row.tuned : 'any';
}

/**
 * @param tonicPitchClass 0 (C) to 11 (B)
 * @example builtInUsual('banjo', 9, 'dorian') // gDGCD capo 2
 * @example builtInUsual('guitar', 9, 'major') // 'any'
 */
export function builtInUsual(kindId: string, tonicPitchClass: number, mode: Mode): Tuned | 'any' {
  return usualFrom(BUILT_IN_USUAL, kindId, tonicPitchClass, mode);
}
