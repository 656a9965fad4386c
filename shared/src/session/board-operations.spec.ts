import { describe, expect, it } from 'vitest';
import { entriesOf, spotAt, type Board, type BoardEntry } from './board';
import { applyOperation, applyOperations, type BoardOperation } from './board-operations';
import { inverseOfAll } from './board-inverse';
import { boardBody } from './board-body';

function entry(id: string, more: Partial<BoardEntry> = {}): BoardEntry {
  return { id, tuneId: `tune-${id}`, settingId: null, open: null, pinned: false, sitOut: [], ...more };
}

/** `board('ab', 'cd')`: two sets, S0 and S1, of entries with one-letter ids. */
function board(...sets: string[]): Board {
  return {
    sets: sets.map((ids, index) => ({
      id: `S${index}`,
      title: `Title ${index}`,
      entries: [...ids].map((id) => entry(id)),
    })),
    medleys: [],
    befores: [],
  };
}

const shape = (value: Board) => value.sets.map(({ entries }) => entries.map(({ id }) => id).join(''));

function done(before: Board, ...operations: BoardOperation[]) {
  return shape(applyOperations(before, operations).board);
}

const move = (value: Board, entryId: string, setId: string, index: number): BoardOperation => ({
  type: 'move-entry',
  entryId,
  to: spotAt(value, setId, index, entryId),
});

describe('operations on a board', () => {
  const plain = board('abc', 'de');

  it.each<[string, BoardOperation, string[]]>([
    ['moves down', move(plain, 'a', 'S0', 2), ['bca', 'de']],
    ['moves up', move(plain, 'c', 'S0', 0), ['cab', 'de']],
    ['moves to another set', move(plain, 'b', 'S1', 1), ['ac', 'dbe']],
    ['moves to the end of another set', move(plain, 'a', 'S1', 2), ['bc', 'dea']],
    ['adds', { type: 'add-entry', entry: entry('x'), to: spotAt(plain, 'S1', 0) }, ['abc', 'xde']],
    ['takes out', { type: 'remove-entry', entryId: 'b' }, ['ac', 'de']],
    ['adds a set', { type: 'add-set', setId: 'S9', title: '', after: 'S0' }, ['abc', '', 'de']],
    ['moves a set', { type: 'move-set', setId: 'S1', after: null }, ['de', 'abc']],
    ['takes a set off', { type: 'remove-set', setId: 'S0', entryIds: ['a', 'b', 'c'] }, ['de']],
    [
      'takes an order',
      {
        type: 'replace-order',
        sets: [
          { setId: 'S0', entryIds: ['e', 'a', 'c'] },
          { setId: 'S1', entryIds: ['b', 'd'] },
        ],
      },
      ['eac', 'bd'],
    ],
  ])('%s', (_, operation, expected) => {
    expect(done(plain, operation)).toEqual(expected);
  });

  it('pins, lets a kind sit out and renames by id', () => {
    const { board: after } = applyOperations(plain, [
      { type: 'set-pinned', entryId: 'b', pinned: true },
      { type: 'set-sit-out', entryId: 'b', kind: 'banjo', out: true },
      { type: 'rename-set', setId: 'S1', title: 'After the break' },
    ]);
    expect(after.sets[0]!.entries[1]).toMatchObject({ id: 'b', pinned: true, sitOut: ['banjo'] });
    expect(after.sets[1]!.title).toBe('After the break');
  });
});

describe('operations on a board that somebody else changed meanwhile', () => {
  const mine = board('abc', 'de');

  it('finds the place by the neighbour that is still there', () => {
    const operation = move(mine, 'e', 'S0', 1); // between a and b
    expect(done(board('xabc', 'de'), operation)).toEqual(['xaebc', 'd']);
    expect(done(board('xbc', 'de'), operation)).toEqual(['xebc', 'd']);
    expect(done(board('xc', 'de'), operation)).toEqual(['xec', 'd']);
  });

  it('puts a tune in a set that was taken off, and so brings the set back', () => {
    const operation: BoardOperation = { type: 'add-entry', entry: entry('x'), to: spotAt(mine, 'S1', 2) };
    const theirs = { ...board('abc'), sets: board('abc').sets };
    const { board: after, skipped } = applyOperations(theirs, [operation]);
    expect(skipped).toEqual([]);
    expect(after.sets.map(({ id }) => id)).toEqual(['S0', 'S1']);
    expect(shape(after)).toEqual(['abc', 'x']);
  });

  it('tells which operations have lost their tune, and does the others', () => {
    const lost: BoardOperation[] = [
      move(mine, 'b', 'S1', 0),
      { type: 'set-pinned', entryId: 'b', pinned: true },
    ];
    const { board: after, skipped } = applyOperations(board('ac', 'de'), [
      ...lost,
      { type: 'remove-entry', entryId: 'b' }, // done already: nothing to tell
      move(mine, 'a', 'S1', 2),
    ]);
    expect(skipped).toEqual(lost);
    expect(shape(after)).toEqual(['c', 'dea']);
  });

  it('keeps a set that somebody has put a tune into', () => {
    const operation: BoardOperation = { type: 'remove-set', setId: 'S1', entryIds: ['d', 'e'] };
    expect(done(board('abc', 'dxe'), operation)).toEqual(['abc', 'x']);
  });

  it('leaves tunes that an order does not know behind the tune they followed', () => {
    const operation: BoardOperation = {
      type: 'replace-order',
      sets: [
        { setId: 'S0', entryIds: ['c', 'b', 'a'] },
        { setId: 'S1', entryIds: ['e', 'd'] },
      ],
    };
    expect(done(board('axbc', 'yde'), operation)).toEqual(['cbax', 'yed']);
  });
});

describe('what takes an operation back', () => {
  it('gives a taken tune its medley and its before again', () => {
    const before: Board = { ...board('abcd'), medleys: [['a', 'b', 'c']], befores: [['b', 'd']] };
    const operations: BoardOperation[] = [{ type: 'remove-entry', entryId: 'b' }];
    const { board: after } = applyOperations(before, operations);
    expect(after.medleys).toEqual([['a', 'c']]);
    expect(after.befores).toEqual([]);
    expect(applyOperations(after, inverseOfAll(before, operations)).board).toEqual(before);
  });

  it('leaves alone what the other host did since', () => {
    const before = board('abc', 'de');
    const operations = [move(before, 'a', 'S1', 0)];
    const back = inverseOfAll(before, operations);
    // Meanwhile x was added and c taken out.
    expect(done(board('bx', 'ade'), ...back)).toEqual(['abx', 'de']);
  });
});

describe('a rule between tunes', () => {
  const ruled: Board = { ...board('abcd'), medleys: [['a', 'b']], befores: [['c', 'a']] };
  const rule = (name: 'medley' | 'before', ids: string, holds: boolean): BoardOperation => ({
    ...{ type: 'set-rule', rule: name, ids: [...ids], holds },
  });

  it('is made, done away with, and taken back', () => {
    const operations = [rule('before', 'ca', false), rule('medley', 'ab', false), rule('before', 'bd', true)];
    const { board: after, skipped } = applyOperations(ruled, operations);
    expect(skipped).toEqual([]);
    expect([after.medleys, after.befores]).toEqual([[], [['b', 'd']]]);
    expect(applyOperations(after, inverseOfAll(ruled, operations)).board).toEqual(ruled);
  });

  it('changes nothing where it stands already, and is not made of tunes that are gone or in a medley', () => {
    expect(applyOperation(ruled, rule('medley', 'ab', true))).toBe(ruled);
    expect(applyOperation(ruled, rule('before', 'dc', false))).toBe(ruled);
    expect(applyOperation(ruled, rule('before', 'ax', true))).toBeNull();
    expect(applyOperation(ruled, rule('medley', 'bc', true))).toBeNull();
  });
});

describe('the board as it is saved', () => {
  it('is whole, with every id and without what only a page shows', () => {
    const shown = { ...board('a'), sets: [{ id: 'S0', title: '', entries: [{ ...entry('a'), shown: 1 }] }] };
    expect(boardBody(shown, 7)).toEqual({
      version: 7,
      sets: [
        {
          id: 'S0',
          entries: [{ id: 'a', tuneId: 'tune-a', settingId: null, open: null, pinned: false, sitOut: [] }],
        },
      ],
      medleys: [],
      befores: [],
    });
    expect(entriesOf(shown)).toHaveLength(1);
  });
});
