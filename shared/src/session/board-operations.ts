import {
  findSpot,
  standingOf,
  type Board,
  type BoardEntry,
  type BoardRules,
  type BoardSet,
  type Spot,
} from './board';

/** What a host does to a board, as data: kept until it is saved, and applied again to a newer board. */
export type BoardOperation<E extends BoardEntry = BoardEntry> =
  /** `rules`: medleys and before/after pairs that the entry was in when it was taken out. */
  | { readonly type: 'add-entry'; readonly entry: E; readonly to: Spot; readonly rules?: BoardRules }
  | { readonly type: 'move-entry'; readonly entryId: string; readonly to: Spot }
  | { readonly type: 'remove-entry'; readonly entryId: string }
  | { readonly type: 'set-pinned'; readonly entryId: string; readonly pinned: boolean }
  | { readonly type: 'set-sit-out'; readonly entryId: string; readonly kind: string; readonly out: boolean }
  /** What the entry plays; pin and sit-outs stay as they are on the board. */
  | { readonly type: 'set-content'; readonly entryId: string; readonly entry: E }
  | {
      readonly type: 'add-set';
      readonly setId: string;
      readonly title: string;
      readonly after: string | null;
    }
  | { readonly type: 'move-set'; readonly setId: string; readonly after: string | null }
  | { readonly type: 'rename-set'; readonly setId: string; readonly title: string }
  /** Takes the named entries with it; a set that holds others stays, with those. */
  | { readonly type: 'remove-set'; readonly setId: string; readonly entryIds: readonly string[] }
  /** Makes a rule of these tunes, in their order, or does away with it. A tune is in one medley at most. */
  | {
      readonly type: 'set-rule';
      readonly rule: 'medley' | 'before';
      readonly ids: readonly string[];
      readonly holds: boolean;
    }
  | {
      readonly type: 'replace-order';
      readonly sets: readonly { readonly setId: string; readonly entryIds: readonly string[] }[];
    };

export interface Applied<E extends BoardEntry> {
  readonly board: Board<E>;
  /** What could not be done because its entry or set is gone; everything else was done. */
  readonly skipped: readonly BoardOperation<E>[];
}

/**
 * Applies operations in turn. Tolerant, by id: what is done already is left alone, what has lost its entry
 * is skipped and told. Nothing that is on the board is lost, except what an operation takes out by id.
 */
export function applyOperations<E extends BoardEntry>(
  board: Board<E>,
  operations: readonly BoardOperation<E>[],
): Applied<E> {
  const skipped: BoardOperation<E>[] = [];
  let now = board;
  for (const operation of operations) {
    const next = applyOperation(now, operation);
    if (next) now = next;
    else skipped.push(operation);
  }
  return { board: now, skipped };
}

/** @returns null where what the operation is about is gone; the same board where it is done already. */
export function applyOperation<E extends BoardEntry>(
  board: Board<E>,
  operation: BoardOperation<E>,
): Board<E> | null {
  switch (operation.type) {
    case 'add-entry':
      return addEntry(board, operation.entry, operation.to, operation.rules);
    case 'move-entry':
      return moveEntry(board, operation.entryId, operation.to);
    case 'remove-entry':
      return removeEntries(board, [operation.entryId]);
    case 'set-pinned':
      return changeEntry(board, operation.entryId, (entry) => ({ ...entry, pinned: operation.pinned }));
    case 'set-sit-out':
      return changeEntry(board, operation.entryId, (entry) => {
        const others = entry.sitOut.filter((kind) => kind !== operation.kind);
        return { ...entry, sitOut: operation.out ? [...others, operation.kind] : others };
      });
    case 'set-content':
      return changeEntry(board, operation.entryId, ({ id, pinned, sitOut }) => ({
        ...operation.entry,
        id,
        pinned,
        sitOut,
      }));
    case 'add-set':
      return addSet(board, operation.setId, operation.title, operation.after);
    case 'move-set':
      return moveSet(board, operation.setId, operation.after);
    case 'rename-set':
      return changeSet(board, operation.setId, (set) => ({ ...set, title: operation.title }));
    case 'remove-set':
      return removeSet(board, operation.setId, operation.entryIds);
    case 'set-rule':
      return setRule(board, operation.rule, operation.ids, operation.holds);
    case 'replace-order':
      return replaceOrder(board, operation.sets);
  }
}

function addEntry<E extends BoardEntry>(board: Board<E>, entry: E, to: Spot, rules?: BoardRules): Board<E> {
  if (standingOf(board, entry.id)) return board;
  const at = findSpot(board, to);
  // The set was taken off meanwhile: what is put in it brings it back.
  const added = at
    ? insert(board, entry, at)
    : { ...board, sets: [...board.sets, { id: to.setId, title: '', entries: [entry] }] };
  return rules ? restoreRules(added, rules) : added;
}

function insert<E extends BoardEntry>(
  board: Board<E>,
  entry: E,
  at: { readonly setIndex: number; readonly index: number },
): Board<E> {
  return {
    ...board,
    sets: board.sets.map((set, setIndex) =>
      setIndex === at.setIndex
        ? { ...set, entries: [...set.entries.slice(0, at.index), entry, ...set.entries.slice(at.index)] }
        : set,
    ),
  };
}

function moveEntry<E extends BoardEntry>(board: Board<E>, entryId: string, to: Spot): Board<E> | null {
  const standing = standingOf(board, entryId);
  if (!standing) return null;
  const without = {
    ...board,
    sets: board.sets.map((set) => ({ ...set, entries: set.entries.filter(({ id }) => id !== entryId) })),
  };
  const at = findSpot(without, to);
  return at && insert(without, standing.entry, at);
}

function removeEntries<E extends BoardEntry>(board: Board<E>, entryIds: readonly string[]): Board<E> {
  const gone = new Set(entryIds);
  const sets = board.sets.map((set) => ({ ...set, entries: set.entries.filter(({ id }) => !gone.has(id)) }));
  return {
    sets,
    medleys: board.medleys.map((ids) => ids.filter((id) => !gone.has(id))).filter((ids) => ids.length > 1),
    befores: board.befores.filter((pair) => !pair.some((id) => gone.has(id))),
  };
}

function changeEntry<E extends BoardEntry>(
  board: Board<E>,
  entryId: string,
  change: (entry: E) => E,
): Board<E> | null {
  if (!standingOf(board, entryId)) return null;
  return {
    ...board,
    sets: board.sets.map((set) => ({
      ...set,
      entries: set.entries.map((entry) => (entry.id === entryId ? change(entry) : entry)),
    })),
  };
}

function changeSet<E extends BoardEntry>(
  board: Board<E>,
  setId: string,
  change: (set: BoardSet<E>) => BoardSet<E>,
): Board<E> | null {
  if (!board.sets.some(({ id }) => id === setId)) return null;
  return { ...board, sets: board.sets.map((set) => (set.id === setId ? change(set) : set)) };
}

function placeSet<E extends BoardEntry>(
  sets: readonly BoardSet<E>[],
  set: BoardSet<E>,
  after: string | null,
): readonly BoardSet<E>[] {
  const before = sets.findIndex(({ id }) => id === after);
  const at = after === null ? 0 : before < 0 ? sets.length : before + 1;
  return [...sets.slice(0, at), set, ...sets.slice(at)];
}

function addSet<E extends BoardEntry>(
  board: Board<E>,
  setId: string,
  title: string,
  after: string | null,
): Board<E> {
  if (board.sets.some(({ id }) => id === setId)) return board;
  return { ...board, sets: placeSet(board.sets, { id: setId, title, entries: [] }, after) };
}

function moveSet<E extends BoardEntry>(
  board: Board<E>,
  setId: string,
  after: string | null,
): Board<E> | null {
  const set = board.sets.find(({ id }) => id === setId);
  if (!set) return null;
  if (after === setId) return board;
  const others = board.sets.filter(({ id }) => id !== setId);
  return { ...board, sets: placeSet(others, set, after) };
}

function removeSet<E extends BoardEntry>(
  board: Board<E>,
  setId: string,
  entryIds: readonly string[],
): Board<E> {
  const set = board.sets.find(({ id }) => id === setId);
  if (!set) return board;
  const taken = set.entries.map(({ id }) => id).filter((id) => entryIds.includes(id));
  const rest = removeEntries(board, taken);
  return { ...rest, sets: rest.sets.filter(({ id, entries }) => id !== setId || entries.length > 0) };
}

function setRule<E extends BoardEntry>(
  board: Board<E>,
  rule: 'medley' | 'before',
  ids: readonly string[],
  holds: boolean,
): Board<E> | null {
  const stands = (known: readonly string[]): boolean => known.join() === ids.join();
  const known = rule === 'medley' ? board.medleys.some(stands) : board.befores.some(stands);
  if (known === holds) return board;
  if (!holds) {
    return rule === 'medley'
      ? { ...board, medleys: board.medleys.filter((medley) => !stands(medley)) }
      : { ...board, befores: board.befores.filter((pair) => !stands(pair)) };
  }
  const [first, second] = ids;
  if (first === undefined || second === undefined || !ids.every((id) => standingOf(board, id))) return null;
  if (rule === 'before') return { ...board, befores: [...board.befores, [first, second]] };
  // A tune is in one medley.
  if (board.medleys.some((medley) => medley.some((id) => ids.includes(id)))) return null;
  return { ...board, medleys: [...board.medleys, ids] };
}

/**
 * Puts the named entries in the named order. Entries that the order does not know (somebody added them
 * meanwhile) stay in their set, after the entry they stood after.
 */
function replaceOrder<E extends BoardEntry>(
  board: Board<E>,
  order: readonly { readonly setId: string; readonly entryIds: readonly string[] }[],
): Board<E> {
  const entries = new Map(
    board.sets.flatMap((set) => set.entries.map((entry) => [entry.id, entry] as const)),
  );
  const known = order.filter(({ setId }) => board.sets.some(({ id }) => id === setId));
  const placed = new Set(known.flatMap(({ entryIds }) => entryIds));
  const sets = board.sets.map((set) => {
    const named = known.find(({ setId }) => setId === set.id)?.entryIds ?? [];
    const inOrder = named.flatMap((id) => entries.get(id) ?? []);
    set.entries.forEach((entry, index) => {
      if (placed.has(entry.id)) return;
      const before = set.entries[index - 1];
      const at = before ? inOrder.indexOf(before) : -1;
      inOrder.splice(before && at < 0 ? Math.min(index, inOrder.length) : at + 1, 0, entry);
    });
    return { ...set, entries: inOrder };
  });
  return { ...board, sets };
}

/** Gives an entry that comes back the rules it was in, as far as the others are still there. */
function restoreRules<E extends BoardEntry>(board: Board<E>, rules: BoardRules): Board<E> {
  const here = new Set(board.sets.flatMap((set) => set.entries.map(({ id }) => id)));
  let medleys = board.medleys;
  for (const remembered of rules.medleys) {
    const ids = remembered.filter((id) => here.has(id));
    // What was left of the medley is part of what is remembered; a medley made since is left alone.
    const rest = medleys.filter((medley) => !medley.every((id) => ids.includes(id)));
    const taken = rest.some((medley) => medley.some((id) => ids.includes(id)));
    if (ids.length > 1 && !taken) medleys = [...rest, ids];
  }
  const missing = rules.befores.filter(
    (pair) =>
      pair.every((id) => here.has(id)) &&
      !board.befores.some(([first, second]) => first === pair[0] && second === pair[1]),
  );
  return { ...board, medleys, befores: [...board.befores, ...missing] };
}
