import type { StoredEvening } from '../sessions/evening';

/**
 * A stored evening with its own entries in another order, one list per set; nothing is stored. Null where
 * `sets` are something else, or move what was called already.
 */
export function inOrder(stored: StoredEvening, sets: readonly (readonly string[])[]): StoredEvening | null {
  const entries = new Map(stored.entries.map((entry) => [entry.id, entry]));
  const ids = sets.flat();
  const same =
    ids.length === entries.size && new Set(ids).size === ids.length && ids.every((id) => entries.has(id));
  if (!same || sets.length !== stored.sets.length) return null;
  const { status, progress } = stored.session;
  const called = new Set(status === 'live' ? progress?.called : []);
  const moved = stored.entries.some(({ id }, at) => called.has(id) && ids[at] !== id);
  if (moved) return null;
  return {
    ...stored,
    sets: stored.sets.map((set, at) => ({ ...set, entries: sets[at]!.map((id) => entries.get(id)!) })),
    entries: ids.map((id) => entries.get(id)!),
  };
}
