import { builtInKind } from '@pegwell/shared/music/instrument';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { parseAccepted, parseTuning } from '@pegwell/shared/music/tuning';
import { scoreEvening } from '@pegwell/shared/session/score';
import type { Chair, Place } from '@pegwell/shared/session/evening';
import type { LanesSet } from './lanes-layout';

/* Evenings for the tests of the pictures, scored by the one score. */

export interface Pictured {
  readonly chairs: readonly Chair[];
  readonly sets: readonly LanesSet[];
  readonly places: readonly Place[];
}

function kindOf(id: string): InstrumentKind {
  const kind = builtInKind(id);
  if (!kind) throw new Error(`no kind ${id}`);
  return kind;
}

function read<T>(
  parsed: { readonly ok: true; readonly value: T } | { readonly ok: false; readonly reason: string },
): T {
  if (!parsed.ok) throw new Error(parsed.reason);
  return parsed.value;
}

/**
 * @param room chairs per kind id
 * @param sets one cell per tune and kind, kinds parted by `|`: `AEAE|gDGBD capo 2`
 * @param openings by kind id; standard where not said, null for free
 */
export function pictured(
  room: Readonly<Record<string, number>>,
  sets: readonly (readonly string[])[],
  openings: Readonly<Record<string, string | null>> = {},
): Pictured {
  const chairs = Object.entries(room).map(([id, count]) => ({ kind: kindOf(id), count }));
  const cells = sets.flat();
  let next = 0;
  const entries = sets.map((set) => set.map(() => ({ id: `t${(next += 1)}`, title: `Tune ${next}` })));
  const { places } = scoreEvening({
    chairs,
    openings: Object.fromEntries(
      chairs.map(({ kind }) => {
        const opening = openings[kind.id];
        const standard = kind.courses.map((course) => course.standard).join(' ');
        return [kind.id, opening === null ? null : read(parseTuning(kind, opening ?? standard))];
      }),
    ),
    goal: 'pegs',
    spacedRhythms: [],
    medleys: [],
    sets: entries.map((set) => set.map(({ id }) => id)),
    tunes: cells.map((cell, index) => ({
      id: `t${index + 1}`,
      tonic: 2,
      rhythm: null,
      accepted: Object.fromEntries(
        chairs.map(({ kind }, at) => [kind.id, read(parseAccepted(kind, cell.split('|')[at] ?? 'any'))]),
      ),
    })),
  });
  return { chairs, sets: entries.map((set) => ({ entries: set })), places };
}
