import type { Mode, ModeFamily } from './mode';
import { modeFamily } from './mode';
import { parseTonic } from './pitch';
import type { Tuned } from './tuning';

/** How a kind usually stands in a key, where a setting says nothing: shown as assumed. */
interface UsualTuning {
  readonly kind: string;
  /** A tonic, or null for every one. Compared by sound: A# is Bb. */
  readonly tonic: string | null;
  /** Null for both. */
  readonly family: ModeFamily | null;
  readonly tuned: Tuned;
}

function banjo(tonic: string, family: ModeFamily | null, pitches: string, capo: number): UsualTuning {
  return { kind: 'banjo', tonic, family, tuned: { pitches: pitches.split(' '), capo } };
}

/** What is assumed until a circle says otherwise; the first row that fits decides. Common practice. */
const BUILT_IN_USUAL: readonly UsualTuning[] = [
  { kind: 'fiddle', tonic: null, family: null, tuned: { pitches: ['G3', 'D4', 'A4', 'E5'], capo: 0 } },
  banjo('G', 'major', 'G4 D3 G3 B3 D4', 0),
  banjo('A', 'major', 'G4 D3 G3 B3 D4', 2),
  banjo('C', 'major', 'G4 C3 G3 C4 D4', 0),
  banjo('D', null, 'G4 C3 G3 C4 D4', 2),
  banjo('G', 'minor', 'G4 D3 G3 C4 D4', 0),
  banjo('A', 'minor', 'G4 D3 G3 C4 D4', 2),
];

/**
 * The usual tuning of a kind in a key; `any`: it plays as it stands.
 * @param tonicPitchClass 0 (C) to 11 (B)
 * @example builtInUsual('banjo', 9, 'dorian') // gDGCD capo 2
 * @example builtInUsual('guitar', 9, 'major') // 'any'
 */
export function builtInUsual(kindId: string, tonicPitchClass: number, mode: Mode): Tuned | 'any' {
  const family = modeFamily(mode);
  const row = BUILT_IN_USUAL.find(
    (usual) =>
      usual.kind === kindId &&
      (usual.tonic === null || parseTonic(usual.tonic)?.pitchClass === tonicPitchClass) &&
      (usual.family === null || usual.family === family),
  );
  return row ? row.tuned : 'any';
}
