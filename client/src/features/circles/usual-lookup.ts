import type { UsualTuning } from '@pegwell/shared/contract/circles';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { modeFamily, type Mode } from '@pegwell/shared/music/mode';
import { parseTonic } from '@pegwell/shared/music/pitch';
import { showTuned } from '@pegwell/shared/music/tuning';
import { builtInUsual } from '@pegwell/shared/music/usual-tunings';

const pitchClassOf = (key: string | null) => (key === null ? undefined : parseTonic(key)?.pitchClass);

/**
 * What a kind is taken to have in a key where a tune says nothing, as shown (`gDGBD capo 2`), or `any`: the
 * circle's own row for the key, then its own default, then what is built in. The server decides the same way.
 */
export function usualTuning(items: readonly UsualTuning[], kindId: string, key: string, mode: Mode): string {
  const own = items.filter((row) => row.own && row.kind === kindId);
  const tonic = pitchClassOf(key);
  const row =
    own.find((each) => each.family === modeFamily(mode) && pitchClassOf(each.key) === tonic) ??
    own.find((each) => each.key === null);
  return row ? row.tuning : builtInText(kindId, key, mode);
}

/** The same where the circle says nothing of its own. */
export function builtInText(kindId: string, key: string, mode: Mode): string {
  const kind = builtInKind(kindId);
  const tonic = pitchClassOf(key);
  if (!kind || tonic === undefined) return 'any';
  const usual = builtInUsual(kindId, tonic, mode);
  return usual === 'any' ? 'any' : showTuned(kind, usual);
}
