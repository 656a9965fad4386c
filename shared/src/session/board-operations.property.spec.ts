import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { entriesOf, spotAt, type Board, type BoardEntry } from './board';
import { applyOperation, applyOperations, type BoardOperation } from './board-operations';
import { inverseOf, inverseOfAll } from './board-inverse';

/*
 * Two hosts work on copies of one board; whatever they do, applying one's operations by id to the other's
 * board loses nothing. Operations are drawn against the board as it is when they are made, as a page does.
 */
const KINDS = ['fiddle', 'banjo'];

function entry(id: string): BoardEntry {
  return { id, tuneId: `tune-${id}`, settingId: null, open: null, pinned: false, sitOut: [] };
}

const boards = fc
  .array(fc.integer({ min: 0, max: 5 }), { minLength: 1, maxLength: 4 })
  .map((sizes): Board => {
    let next = 0;
    const sets = sizes.map((size, index) => ({
      id: `S${index}`,
      title: `Set ${index}`,
      entries: Array.from({ length: size }, () => entry(`e${next++}`)),
    }));
    const ids = sets.flatMap(({ entries }) => entries.map(({ id }) => id));
    return { sets, medleys: ids.length > 3 ? [ids.slice(0, 3)] : [], befores: [] };
  });

/** Numbers from which a host's work is read, whatever the board then holds. */
const draws = fc.array(fc.tuple(fc.nat(10), fc.nat(1000), fc.nat(1000), fc.nat(1000)), { maxLength: 12 });

function operationFrom(
  board: Board,
  [what, a, b, c]: readonly [number, number, number, number],
  name: string,
): BoardOperation | null {
  const set = board.sets[a % Math.max(1, board.sets.length)];
  const entries = entriesOf(board);
  const entryId = entries[b % Math.max(1, entries.length)]?.id;
  if (what === 0 || entryId === undefined) {
    if (!set) return { type: 'add-set', setId: name, title: name, after: null };
    return { type: 'add-entry', entry: entry(name), to: spotAt(board, set.id, c % 7) };
  }
  if (!set) return null;
  switch (what) {
    case 1:
      return { type: 'remove-entry', entryId };
    case 2:
      return { type: 'set-pinned', entryId, pinned: c % 2 === 0 };
    case 3:
      return { type: 'set-sit-out', entryId, kind: KINDS[a % 2]!, out: c % 2 === 0 };
    case 4:
      return { type: 'add-set', setId: name, title: name, after: set.id };
    case 5:
      return { type: 'move-set', setId: set.id, after: board.sets[c % board.sets.length]!.id };
    case 6:
      return { type: 'remove-set', setId: set.id, entryIds: set.entries.map(({ id }) => id) };
    case 8: {
      const ids = [entryId, entries[c % entries.length]!.id];
      if (ids[0] === ids[1]) return null;
      return { type: 'set-rule', rule: a % 2 === 0 ? 'medley' : 'before', ids, holds: c % 3 > 0 };
    }
    case 7: {
      const ids = entries.map(({ id }) => id).sort((x, y) => ((x > y ? c : b) % 3) - 1);
      let from = 0;
      return {
        type: 'replace-order',
        sets: board.sets.map((each) => ({
          setId: each.id,
          entryIds: ids.slice(from, (from += each.entries.length)),
        })),
      };
    }
    default:
      return { type: 'move-entry', entryId, to: spotAt(board, set.id, c % 7, entryId) };
  }
}

function work(board: Board, numbers: readonly (readonly [number, number, number, number])[], who: string) {
  const operations: BoardOperation[] = [];
  let now = board;
  numbers.forEach((drawn, index) => {
    const operation = operationFrom(now, drawn, `${who}${index}`);
    const next = operation && applyOperation(now, operation);
    if (!operation || !next) return;
    operations.push(operation);
    now = next;
  });
  return { operations, board: now };
}

const idsOf = (board: Board) =>
  entriesOf(board)
    .map(({ id }) => id)
    .sort();
const taken = (operations: readonly BoardOperation[]) =>
  operations.flatMap((each) =>
    each.type === 'remove-entry' ? [each.entryId] : each.type === 'remove-set' ? each.entryIds : [],
  );

describe('operations by id, whatever two hosts do', () => {
  it('lose no entry of either host that neither took out, and double none', () => {
    fc.assert(
      fc.property(boards, draws, draws, (board, ours, theirs) => {
        const a = work(board, ours, 'a');
        const b = work(board, theirs, 'b');
        const ids = idsOf(applyOperations(b.board, a.operations).board);
        expect(new Set(ids).size).toBe(ids.length);
        const gone = new Set([...taken(a.operations), ...taken(b.operations)]);
        const wanted = [...new Set([...idsOf(a.board), ...idsOf(b.board)])].filter((id) => !gone.has(id));
        expect(ids).toEqual(expect.arrayContaining(wanted));
        // The order in which the two arrive loses nothing either.
        expect(idsOf(applyOperations(a.board, b.operations).board)).toEqual(expect.arrayContaining(wanted));
      }),
      { numRuns: 500 },
    );
  });

  it('change nothing more when they are applied a second time to the same board', () => {
    fc.assert(
      fc.property(boards, draws, (board, numbers) => {
        const { operations } = work(board, numbers, 'a');
        for (const operation of operations) {
          const once = applyOperation(board, operation);
          if (once) expect(applyOperation(once, operation)).toEqual(once);
        }
        const once = applyOperations(board, operations).board;
        const twice = applyOperations(once, operations).board;
        expect(idsOf(twice)).toEqual(expect.arrayContaining(idsOf(once)));
        // Only a set that is gone cannot say what it took with it: then a tune may come back, none is lost.
        if (operations.some(({ type }) => type === 'remove-set')) return;
        expect(idsOf(twice)).toEqual(idsOf(once));
        const flags = (value: Board) =>
          entriesOf(value)
            .map(({ id, pinned, sitOut }) => [id, pinned, [...sitOut].sort()])
            .sort();
        expect(flags(twice)).toEqual(flags(once));
      }),
      { numRuns: 500 },
    );
  });

  it('are taken back one by one to the board as it was', () => {
    fc.assert(
      fc.property(boards, draws, (board, numbers) => {
        const { operations, board: after } = work(board, numbers, 'a');
        const { board: back, skipped } = applyOperations(after, inverseOfAll(board, operations));
        expect(skipped).toEqual([]);
        const plain = (value: Board) =>
          value.sets.map((set) => [set.id, set.title, set.entries.map((each) => [each.id, each.pinned])]);
        expect(plain(back)).toEqual(plain(board));
        expect(back.medleys.flat().sort()).toEqual(board.medleys.flat().sort());
      }),
      { numRuns: 500 },
    );
  });

  it('are taken back without taking out what the other host has put in since', () => {
    fc.assert(
      fc.property(boards, draws, draws, (board, ours, theirs) => {
        const a = work(board, ours, 'a');
        const merged = work(a.board, theirs, 'b');
        const back = applyOperations(merged.board, inverseOfAll(board, a.operations)).board;
        const added = merged.operations.flatMap((each) => (each.type === 'add-entry' ? [each.entry.id] : []));
        const gone = new Set(taken(merged.operations));
        expect(idsOf(back)).toEqual(expect.arrayContaining(added.filter((id) => !gone.has(id))));
      }),
      { numRuns: 500 },
    );
  });

  it('have nothing to take back where they do nothing', () => {
    const board: Board = {
      sets: [{ id: 'S0', title: '', entries: [entry('a')] }],
      medleys: [],
      befores: [],
    };
    expect(inverseOf(board, { type: 'remove-entry', entryId: 'x' })).toEqual([]);
    expect(inverseOf(board, { type: 'add-entry', entry: entry('a'), to: spotAt(board, 'S0', 0) })).toEqual(
      [],
    );
  });
});
