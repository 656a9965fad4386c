import type { Mode } from '@pegwell/shared/contract/keys';
import type { ShownTuning, Tune } from '@pegwell/shared/contract/tunes';
import { BUILT_IN_KINDS, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { showTuning, type Tuned } from '@pegwell/shared/music/tuning';
import type { CircleAction } from '@pegwell/shared/policy';
import type { Accepted } from '@pegwell/shared/tunes/kind-tunings';
import type { UsualLookup } from '../circles/usual-tunings.service';

/** What a tune says, with its usual setting: everything that a form, a file or an undo can change. */
export interface TuneContent {
  readonly title: string;
  readonly key: string;
  readonly mode: Mode;
  readonly rhythm: string | null;
  readonly parts: string | null;
  readonly composer: string | null;
  readonly source: string | null;
  readonly notes: string | null;
  readonly stated: Accepted;
}

export interface StoredTune extends TuneContent {
  readonly id: string;
  /** The usual setting's. */
  readonly settingId: string;
  readonly createdAt: Date;
  readonly updatedAt: Date;
}

/** The tune's own words alone, as they stand in the circle's history. */
export function contentOf(tune: TuneContent): TuneContent {
  const { title, key, mode, rhythm, parts, composer, source, notes, stated } = tune;
  return { title, key, mode, rhythm, parts, composer, source, notes, stated };
}

/** Whether nothing was said differently. Tunings count as spelled, in their order of choice. */
export function sameContent(one: TuneContent, other: TuneContent): boolean {
  return JSON.stringify(inOrder(one)) === JSON.stringify(inOrder(other));
}

function inOrder(tune: TuneContent) {
  const { stated, ...words } = contentOf(tune);
  const byKind = BUILT_IN_KINDS.map(({ id }) => {
    const accepted = stated[id];
    return accepted === undefined || accepted === 'any'
      ? accepted
      : accepted.map(({ pitches, capo }) => [pitches, capo]);
  });
  return [words, byKind];
}

/** As the API shows it, with what the circle's usual tunings add where the tune is silent. */
export function presentTune(tune: StoredTune, usual: UsualLookup, can: readonly CircleAction[]): Tune {
  const { id, settingId, stated, createdAt, updatedAt, ...words } = tune;
  const shown: Tune['tunings'] = [];
  const assumed: Tune['assumed'] = [];
  for (const kind of BUILT_IN_KINDS) {
    const accepted = stated[kind.id];
    if (accepted !== undefined) {
      shown.push({ kind: kind.id, accepted: showAccepted(kind, accepted) });
      continue;
    }
    const standing = usual(kind.id, tune.key, tune.mode);
    if (standing !== 'any') assumed.push({ kind: kind.id, accepted: showAccepted(kind, [standing]) });
  }
  return {
    id,
    settingId,
    ...words,
    tunings: shown,
    assumed,
    createdAt: createdAt.toISOString(),
    updatedAt: updatedAt.toISOString(),
    can: [...can],
  };
}

function showAccepted(kind: InstrumentKind, accepted: readonly Tuned[] | 'any'): ShownTuning[] {
  if (accepted === 'any') return [{ tuning: 'any', pitches: null, capo: 0 }];
  return accepted.map(({ pitches, capo }) => ({
    tuning: showTuning(kind, pitches),
    pitches: [...pitches],
    capo,
  }));
}
