import { spotOf, standingOf, type Board, type BoardEntry } from './board';
import { applyOperation, type BoardOperation } from './board-operations';

/**
 * The operations that take one back, by id: on a board that somebody else has changed meanwhile they undo
 * this work and leave theirs.
 * @param board as it stood before the operation
 * @returns nothing where the operation changes nothing
 */
export function inverseOf<E extends BoardEntry>(
  board: Board<E>,
  operation: BoardOperation<E>,
): readonly BoardOperation<E>[] {
  switch (operation.type) {
    case 'add-entry':
      return standingOf(board, operation.entry.id)
        ? []
        : [{ type: 'remove-entry', entryId: operation.entry.id }];
    case 'move-entry': {
      const to = spotOf(board, operation.entryId);
      return to ? [{ type: 'move-entry', entryId: operation.entryId, to }] : [];
    }
    case 'remove-entry':
      return comesBack(board, operation.entryId);
    case 'set-pinned':
    case 'set-sit-out':
    case 'set-content':
      return asItWas(board, operation);
    case 'add-set':
      return board.sets.some(({ id }) => id === operation.setId)
        ? []
        : [{ type: 'remove-set', setId: operation.setId, entryIds: [] }];
    case 'move-set':
    case 'rename-set': {
      const index = board.sets.findIndex(({ id }) => id === operation.setId);
      const set = board.sets[index];
      if (!set) return [];
      return operation.type === 'rename-set'
        ? [{ type: 'rename-set', setId: set.id, title: set.title }]
        : [{ type: 'move-set', setId: set.id, after: board.sets[index - 1]?.id ?? null }];
    }
    case 'remove-set': {
      const index = board.sets.findIndex(({ id }) => id === operation.setId);
      const set = board.sets[index];
      if (!set) return [];
      const after = board.sets[index - 1]?.id ?? null;
      const taken = set.entries.filter(({ id }) => operation.entryIds.includes(id));
      return [
        { type: 'add-set', setId: set.id, title: set.title, after },
        ...taken.flatMap(({ id }) => comesBack(board, id)),
      ];
    }
    case 'set-rule': {
      const rules = operation.rule === 'medley' ? board.medleys : board.befores;
      const holds = rules.some((ids) => ids.join() === operation.ids.join());
      return holds === operation.holds ? [] : [{ ...operation, holds }];
    }
    case 'replace-order':
      return [
        {
          type: 'replace-order',
          sets: board.sets.map(({ id, entries }) => ({
            setId: id,
            entryIds: entries.map((each) => each.id),
          })),
        },
      ];
  }
}

/** What takes a whole run of operations back, the last one first. */
export function inverseOfAll<E extends BoardEntry>(
  board: Board<E>,
  operations: readonly BoardOperation<E>[],
): readonly BoardOperation<E>[] {
  let now = board;
  const back: (readonly BoardOperation<E>[])[] = [];
  for (const operation of operations) {
    const next = applyOperation(now, operation);
    if (!next) continue;
    back.unshift(inverseOf(now, operation));
    now = next;
  }
  return back.flat();
}

function comesBack<E extends BoardEntry>(board: Board<E>, entryId: string): readonly BoardOperation<E>[] {
  const standing = standingOf(board, entryId);
  const to = spotOf(board, entryId);
  if (!standing || !to) return [];
  const medleys = board.medleys.filter((ids) => ids.includes(entryId));
  const befores = board.befores.filter((pair) => pair.includes(entryId));
  const rules = medleys.length + befores.length > 0 ? { rules: { medleys, befores } } : {};
  return [{ type: 'add-entry', entry: standing.entry, to, ...rules }];
}

function asItWas<E extends BoardEntry>(
  board: Board<E>,
  operation: Extract<BoardOperation<E>, { type: 'set-pinned' | 'set-sit-out' | 'set-content' }>,
): readonly BoardOperation<E>[] {
  const entry = standingOf(board, operation.entryId)?.entry;
  if (!entry) return [];
  const { entryId } = operation;
  switch (operation.type) {
    case 'set-pinned':
      return [{ type: 'set-pinned', entryId, pinned: entry.pinned }];
    case 'set-sit-out':
      return [
        { type: 'set-sit-out', entryId, kind: operation.kind, out: entry.sitOut.includes(operation.kind) },
      ];
    case 'set-content':
      return [{ type: 'set-content', entryId, entry }];
  }
}
