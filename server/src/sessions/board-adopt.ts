import type { PutBoard } from '@pegwell/shared/contract/sessions';
import type { StoredBoard } from './sessions.table';

/**
 * A program may leave ids out. So that sending the same board again is the same board, a set without an
 * id is the one that stands at its place, and an entry without one is the entry at its place when it is
 * the same tune; unless the board names that id itself somewhere.
 */
export function adoptIds(body: PutBoard, stored: StoredBoard): PutBoard {
  const named = new Set(body.sets.flatMap((set) => [set.id, ...set.entries.map((entry) => entry.id)]));
  return {
    ...body,
    sets: body.sets.map((set, index) => {
      const there = stored.sets[index];
      const entries = set.entries.map((entry, place) => {
        const before = there?.entries[place];
        const same = before && entry.tuneId && entry.tuneId === before.tuneId && !named.has(before.id);
        return entry.id === undefined && same ? { ...entry, id: before.id } : entry;
      });
      return set.id === undefined && there && !named.has(there.id)
        ? { ...set, id: there.id, entries }
        : { ...set, entries };
    }),
  };
}
