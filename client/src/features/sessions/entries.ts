import type { OpenPlace, ShownEntry } from '@pegwell/shared/contract/sessions';
import type { ShownTuning, Tune } from '@pegwell/shared/contract/tunes';
import { BUILT_IN_KINDS, builtInKind } from '@pegwell/shared/music/instrument';
import type { Mode } from '@pegwell/shared/music/mode';
import { parseAccepted, showTuning } from '@pegwell/shared/music/tuning';
import { tuneOfEntry } from '@pegwell/shared/session/board-evening';
import type { EveningTune } from '@pegwell/shared/session/evening';
import { ASSUMED_TUNE_MINUTES } from '@pegwell/shared/session/minutes';
import { readKindTunings } from '@pegwell/shared/tunes/kind-tunings';

/** What a kind usually has in a key, as shown, or `any`: the circle's table. */
export type AssumedFor = (kindId: string, key: string, mode: Mode) => string;

const fresh = { settingId: null, pinned: false, sitOut: [], removed: false };

/** A tune as it will stand on the board; the server's answer says the same. */
export function entryOfTune(tune: Tune, id: string): ShownEntry {
  return {
    ...fresh,
    id,
    tuneId: tune.id,
    open: null,
    title: tune.title,
    key: tune.key,
    mode: tune.mode,
    rhythm: tune.rhythm,
    minutes: ASSUMED_TUNE_MINUTES,
    tunings: [
      ...tune.tunings.map((row) => ({ ...row, assumed: false })),
      ...tune.assumed.map((row) => ({ ...row, assumed: true })),
    ],
  };
}

/** A tune as the score sees it, before it stands on the board. */
export function eveningTuneOf(tune: Tune): EveningTune {
  return tuneOfEntry(entryOfTune(tune, `new ${tune.id}`));
}

/** An open place as it will stand on the board: what is said, then what is usual in its key. */
export function entryOfOpenPlace(open: OpenPlace, id: string, assumedFor: AssumedFor): ShownEntry {
  const { accepted } = readKindTunings(open.tunings, 'tunings');
  const tunings = BUILT_IN_KINDS.flatMap((kind) => {
    const said = accepted[kind.id];
    const assumed = said === undefined;
    const list = assumed ? readCell(kind.id, assumedFor(kind.id, open.key, open.mode)) : said;
    if (list === 'any') {
      return assumed
        ? []
        : [{ kind: kind.id, accepted: [{ tuning: 'any', pitches: null, capo: 0 }], assumed }];
    }
    const shown = list.map(({ pitches, capo }): ShownTuning => ({
      tuning: showTuning(kind, pitches),
      pitches: [...pitches],
      capo,
    }));
    return [{ kind: kind.id, accepted: shown, assumed }];
  });
  return {
    ...fresh,
    ...{ id, tuneId: null, open, title: null, key: open.key, mode: open.mode, rhythm: null },
    minutes: open.minutes,
    tunings,
  };
}

function readCell(kindId: string, cell: string) {
  const kind = builtInKind(kindId);
  const parsed = kind && parseAccepted(kind, cell);
  return parsed?.ok ? parsed.value : 'any';
}
