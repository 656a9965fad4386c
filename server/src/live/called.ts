import type { Tunings } from '@pegwell/shared/live/progress';
import { BUILT_IN_KINDS } from '@pegwell/shared/music/instrument';
import { walkOf, type EveningEntry, type EveningSet, type StoredEvening } from '../sessions/evening';

/** Stands for the tune that is now where it also comes again later in what is left. */
const FACT = 'now, as a fact';

/**
 * What every kind has in force with an entry, were it called now: the best choice for what is left, from
 * the tunings in force. The room's kinds choose together, any other alone, as one chair.
 *
 * What is left begins with the tune that is now, as a fact, so that a step to the entry that follows it
 * takes the very choice that phones have been showing as next.
 */
export function tuningsWith(stored: StoredEvening, entryId: string): Tunings {
  const walk = walkOf(withNext(stored, entryId));
  return Object.fromEntries(
    BUILT_IN_KINDS.map(({ id }) => [id, walk.moves(id).get(entryId)?.to ?? null] as const),
  );
}

/** The evening as if the host went on with this entry: now, then from there to the end. */
function withNext(stored: StoredEvening, entryId: string): StoredEvening {
  const { session, sets, entries } = stored;
  const progress = session.status === 'live' ? session.progress : null;
  const now = entries.find(({ id }) => id === progress?.nowEntryId);
  if (!progress || !now) return stored;
  const nowSet = sets.find((set) => set.entries.includes(now));
  const [first, ...later] = setsFrom(sets, entryId);
  if (!nowSet || !first) return stored;

  // Going back, the tune that is now comes again: the fact takes another name.
  const comesAgain = [first, ...later].some((set) => set.entries.includes(now));
  const fact: EveningEntry = comesAgain ? { ...now, id: FACT } : now;
  // From one set into another is a break, off the clock, as on the board.
  const left =
    first.id === nowSet.id
      ? [{ ...first, entries: [fact, ...first.entries] }, ...later]
      : [{ ...nowSet, entries: [fact] }, first, ...later];
  return {
    ...stored,
    session: { ...session, progress: { ...progress, nowEntryId: fact.id } },
    sets: left,
    entries: left.flatMap((set) => set.entries),
  };
}

function setsFrom(sets: readonly EveningSet[], entryId: string): readonly EveningSet[] {
  const index = sets.findIndex((set) => set.entries.some(({ id }) => id === entryId));
  const set = sets[index];
  if (!set) return [];
  const from = set.entries.findIndex(({ id }) => id === entryId);
  return [{ ...set, entries: set.entries.slice(from) }, ...sets.slice(index + 1)];
}
