import type { OpenPlace } from '../contract/sessions';

/**
 * The board of an evening: sets of entries in order, and the rules between entries. A value; operations
 * (board-operations.ts) give a new one. What an entry shows beyond these fields is the caller's.
 */
export interface BoardEntry {
  readonly id: string;
  readonly tuneId: string | null;
  readonly settingId: string | null;
  readonly open: OpenPlace | null;
  readonly pinned: boolean;
  readonly sitOut: readonly string[];
}

export interface BoardSet<E extends BoardEntry = BoardEntry> {
  readonly id: string;
  /** Empty until the server has named it. */
  readonly title: string;
  readonly entries: readonly E[];
}

/** Runs of entry ids played without stopping, and pairs of which the first comes before the second. */
export interface BoardRules {
  readonly medleys: readonly (readonly string[])[];
  readonly befores: readonly (readonly [string, string])[];
}

export interface Board<E extends BoardEntry = BoardEntry> extends BoardRules {
  readonly sets: readonly BoardSet<E>[];
}

/** Where an entry stands; `index` counts from 0 inside its set, `position` from 0 through the evening. */
export interface Standing<E extends BoardEntry> {
  readonly entry: E;
  readonly set: BoardSet<E>;
  readonly setIndex: number;
  readonly index: number;
  readonly position: number;
}

/** Every entry in playing order. */
export function entriesOf<E extends BoardEntry>(board: Pick<Board<E>, 'sets'>): readonly E[] {
  return board.sets.flatMap((set) => set.entries);
}

export function standingOf<E extends BoardEntry>(board: Board<E>, entryId: string): Standing<E> | null {
  let position = 0;
  for (const [setIndex, set] of board.sets.entries()) {
    const index = set.entries.findIndex(({ id }) => id === entryId);
    if (index >= 0) return { entry: set.entries[index]!, set, setIndex, index, position: position + index };
    position += set.entries.length;
  }
  return null;
}

const ORDINALS = ['First', 'Second', 'Third', 'Fourth', 'Fifth', 'Sixth', 'Seventh', 'Eighth'];

/** The title of a set that has none: `First set`, from the ninth on `Set 9`. */
export function setTitle(title: string, index: number): string {
  const ordinal = ORDINALS[index];
  return title || (ordinal ? `${ordinal} set` : `Set ${index + 1}`);
}

/**
 * Where an entry goes, told by its neighbours' ids, so that it finds its place on a board that somebody
 * else has changed meanwhile.
 */
export interface Spot {
  readonly setId: string;
  /** Null at the head of its set. */
  readonly after: string | null;
  /** Null at the end of its set. */
  readonly before: string | null;
  /** Counted from 0 without the entry itself; used where both neighbours are gone. */
  readonly index: number;
}

/**
 * The spot `index` in a set, counted as if the entry that is to go there were not on the board.
 * @param moving the entry that moves, where it stands on the board already
 */
export function spotAt(board: Board, setId: string, index: number, moving?: string): Spot {
  const set = board.sets.find(({ id }) => id === setId);
  const ids = (set?.entries ?? []).map(({ id }) => id).filter((id) => id !== moving);
  const at = Math.max(0, Math.min(index, ids.length));
  return { setId, after: ids[at - 1] ?? null, before: ids[at] ?? null, index: at };
}

/** The spot on which an entry stands now. */
export function spotOf(board: Board, entryId: string): Spot | null {
  const standing = standingOf(board, entryId);
  return standing && spotAt(board, standing.set.id, standing.index, entryId);
}

/**
 * Where a spot is on this board: beside the neighbour that comes before it, else beside the one after it,
 * else at its index. A neighbour that went to another set is followed only where the spot's set is gone.
 * @returns null where the set and both neighbours are gone
 */
export function findSpot(
  board: Board,
  spot: Spot,
): { readonly setIndex: number; readonly index: number } | null {
  const beside = (setIndex: number): number | null => {
    const ids = board.sets[setIndex]!.entries.map(({ id }) => id);
    const after = spot.after === null ? -1 : ids.indexOf(spot.after);
    if (after >= 0) return after + 1;
    const before = spot.before === null ? -1 : ids.indexOf(spot.before);
    return before >= 0 ? before : null;
  };
  const own = board.sets.findIndex(({ id }) => id === spot.setId);
  if (own >= 0) {
    const index = beside(own) ?? (spot.after === null ? 0 : spot.index);
    return { setIndex: own, index: Math.min(index, board.sets[own]!.entries.length) };
  }
  for (let setIndex = 0; setIndex < board.sets.length; setIndex += 1) {
    const index = beside(setIndex);
    if (index !== null) return { setIndex, index };
  }
  return null;
}
