import type { Tune } from '@pegwell/shared/contract/tunes';
import { BUILT_IN_KINDS, type InstrumentKind } from '@pegwell/shared/music/instrument';

type KindRow = Tune['tunings'][number];

export interface KindOfTune extends KindRow {
  readonly assumed: boolean;
}

/** What a tune says for a kind, or what is assumed for it; null where neither says anything. */
export function kindOfTune(tune: Tune, kindId: string): KindOfTune | null {
  const stated = tune.tunings.find(({ kind }) => kind === kindId);
  if (stated) return { ...stated, assumed: false };
  const assumed = tune.assumed.find(({ kind }) => kind === kindId);
  return assumed ? { ...assumed, assumed: true } : null;
}

/** The kinds on which any of these tunes, or what is assumed for them, says something. */
export function kindsOfTunes(tunes: readonly Tune[]): readonly InstrumentKind[] {
  return BUILT_IN_KINDS.filter(({ id }) => tunes.some((tune) => kindOfTune(tune, id)));
}
