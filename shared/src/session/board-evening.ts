import type { Session, ShownEntry } from '../contract/sessions';
import { builtInKind } from '../music/instrument';
import { parseTonic } from '../music/pitch';
import { entriesOf, type Board } from './board';
import type { Evening, EveningTune } from './evening';
import { readChairs, readOpenings } from './room';

/** What the score needs of a session beside its board. */
export type EveningSettings = Pick<
  Session,
  'chairs' | 'openings' | 'goal' | 'spacedRhythms' | 'status' | 'nowEntryId' | 'inForce'
>;

/**
 * The evening that a board is, as it is scored: whole, or, while it is live, what is left from the tune that
 * is now, which stands first as a fact in the tunings in force. The server scores the stored board alike.
 */
export function eveningOfBoard(settings: EveningSettings, board: Board<ShownEntry>): Evening {
  const { chairs } = readChairs(settings.chairs);
  const nowId = settings.status === 'live' ? settings.nowEntryId : null;
  const live = nowId !== null && entriesOf(board).some(({ id }) => id === nowId);
  const inForce = readOpenings(settings.inForce ?? {}).openings;
  const sets = live ? setsFrom(board.sets, nowId) : board.sets;
  return {
    chairs,
    openings: live ? inForce : readOpenings(settings.openings).openings,
    goal: settings.goal,
    spacedRhythms: settings.spacedRhythms,
    tunes: sets.flatMap(({ entries }) =>
      entries.map((entry) =>
        live && entry.id === nowId
          ? { ...tuneOfEntry(entry), accepted: asFact(inForce) }
          : tuneOfEntry(entry),
      ),
    ),
    sets: sets.map(({ entries }) => entries.map(({ id }) => id)),
    medleys: board.medleys,
  };
}

/** What an entry asks of every kind; kinds that sit out play as they stand. */
export function tuneOfEntry(
  entry: Pick<ShownEntry, 'id' | 'key' | 'rhythm' | 'sitOut' | 'tunings'>,
): EveningTune {
  const accepted: Record<string, EveningTune['accepted'][string]> = {};
  for (const { kind, accepted: list } of entry.tunings) {
    if (!builtInKind(kind)) continue;
    const tuned = list.flatMap(({ pitches, capo }) => (pitches ? [{ pitches, capo }] : []));
    accepted[kind] = entry.sitOut.includes(kind) || tuned.length === 0 ? 'any' : tuned;
  }
  return {
    id: entry.id,
    rhythm: entry.rhythm,
    accepted,
    tonic: parseTonic(entry.key)?.pitchClass ?? 0,
  };
}

function setsFrom(sets: Board<ShownEntry>['sets'], entryId: string): Board<ShownEntry>['sets'] {
  const first = sets.findIndex(({ entries }) => entries.some(({ id }) => id === entryId));
  return sets.slice(first).map((set, index) => {
    if (index > 0) return set;
    return { ...set, entries: set.entries.slice(set.entries.findIndex(({ id }) => id === entryId)) };
  });
}

function asFact(inForce: Evening['openings']): EveningTune['accepted'] {
  return Object.fromEntries(
    Object.entries(inForce).map(([kind, tuned]) => [kind, tuned === null ? ('any' as const) : [tuned]]),
  );
}
