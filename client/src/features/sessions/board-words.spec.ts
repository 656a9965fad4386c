import { applyOperations, type BoardOperation } from '@pegwell/shared/session/board-operations';
import type { Board } from '@pegwell/shared/session/board';
import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { describe, expect, it, vi } from 'vitest';
import { cardMenu, moveToPosition } from './card-menu';
import { sessionOf, shownEntry, uuid } from './hooks/board-fixtures';
import { boardOf } from './hooks/board-state';
import { scoreBoard } from './hooks/use-scored';
import { differenceWords, offClockWords } from './components/figures';
import { placeOnBoard, priceWords } from './price-words';
import { ruleMenu, ruleWords } from './rules';
import { setMenu, splitSet } from './set-menu';

const [a, b, c, d] = [1, 2, 3, 4].map((number) => shownEntry(number, 'ABCD'[number - 1]!)) as [
  ShownEntry,
  ShownEntry,
  ShownEntry,
  ShownEntry,
];
const session = sessionOf([[a, b], [c, d], []]);
const board = boardOf(session);
const shape = (value: Board<ShownEntry>) =>
  value.sets.map(({ entries }) => entries.map(({ title }) => title).join(''));
const after = (...operations: readonly (BoardOperation<ShownEntry> | null)[]) =>
  shape(
    applyOperations(
      board,
      operations.flatMap((each) => each ?? []),
    ).board,
  );

describe('the words for a price', () => {
  it.each([
    [{ pegChanges: 0, setIndex: 0, index: 2 }, 'free, after 2'],
    [{ pegChanges: 5, setIndex: 0, index: 0 }, '5 pegs, before 1'],
    [{ pegChanges: 1, setIndex: 1, index: 0 }, '1 peg, before 3'],
    [{ pegChanges: 0, setIndex: 2, index: 0 }, 'free, in Set 3'],
  ])('%o are "%s"', (price, words) => {
    expect(priceWords(board, price, null)).toBe(words);
  });

  it('counts from what is now while the evening is live', () => {
    // What is left begins with D, the second of the second set.
    expect(placeOnBoard(board, { pegChanges: 0, setIndex: 0, index: 1 }, d.id)).toEqual({
      ...{ setIndex: 1, index: 2 },
    });
    expect(priceWords(board, { pegChanges: 0, setIndex: 0, index: 1 }, d.id)).toBe('free, after 4');
  });
});

describe('moving by menu', () => {
  it.each([
    ['A to 1', a, 0, ['AB', 'CD', '']],
    ['A to 2', a, 1, ['BA', 'CD', '']],
    ['A to 3', a, 2, ['B', 'CA' + 'D', '']],
    ['C to 1', c, 0, ['CAB', 'D', '']],
    ['D to 4', d, 3, ['AB', 'CD', '']],
    ['A to 4', a, 3, ['B', 'CD', 'A']],
  ] as const)('%s', (_, entry, position, expected) => {
    const moved = applyOperations(board, [moveToPosition(board, entry.id, position)!]).board;
    const order = moved.sets.flatMap(({ entries }) => entries.map(({ id }) => id));
    expect(order.indexOf(entry.id)).toBe(position);
    expect(shape(moved).join('').length).toBe(4);
    if (expected[2] === '') expect(shape(moved)).toEqual(expected);
  });

  const deeds = () => ({
    perform: vi.fn(),
    askPosition: vi.fn(),
    askBefore: vi.fn(),
    editOpenPlace: vi.fn(),
    rename: vi.fn(),
  });

  it('goes up over the head of a set, to the end of the one before', () => {
    const done = deeds();
    const items = cardMenu(session, board, c, 0, done).flat();
    items.find(({ id }) => id === 'up')!.onSelect();
    expect(after(...(done.perform.mock.calls[0]![1] as BoardOperation<ShownEntry>[]))).toEqual([
      'ABC',
      'D',
      '',
    ]);
  });

  it('lets nothing go above what was called, and moves nothing that was', () => {
    const up = (entry: ShownEntry) =>
      cardMenu(session, board, entry, 1, deeds())
        .flat()
        .find(({ id }) => id === 'up');
    expect(up(b)?.disabled).toBe(true);
    expect(up(d)?.disabled).toBe(false);
    expect(
      cardMenu(session, board, a, 1, deeds())
        .flat()
        .map(({ id }) => id),
    ).toEqual(['pin']);
  });

  it('parts a set with a break, and joins two', () => {
    expect(after(...splitSet(board, 1, 1, uuid(77)))).toEqual(['AB', 'C', 'D', '']);
    const done = deeds();
    setMenu(board, 1, 0, done)
      .flat()
      .find(({ id }) => id === 'join')!
      .onSelect();
    expect(after(...(done.perform.mock.calls[0]![1] as BoardOperation<ShownEntry>[]))).toEqual(['ABCD', '']);
  });

  it('takes a set off with its tunes', () => {
    const done = deeds();
    setMenu(board, 0, 0, done)
      .flat()
      .find(({ id }) => id === 'remove')!
      .onSelect();
    expect(after(...(done.perform.mock.calls[0]![1] as BoardOperation<ShownEntry>[]))).toEqual(['CD', '']);
  });
});

describe('rules between tunes', () => {
  const ruled = (medleys: string[][], befores: [string, string][] = []): Board<ShownEntry> => ({
    ...board,
    ...{ medleys, befores },
  });
  const items = (value: Board<ShownEntry>, entry: ShownEntry, above?: ShownEntry) => {
    const deeds = { perform: vi.fn(), askBefore: vi.fn() };
    return { deeds, menu: ruleMenu(value, entry, above, deeds) };
  };
  const medleysAfter = (value: Board<ShownEntry>, entry: ShownEntry, above: ShownEntry) => {
    const { deeds, menu } = items(value, entry, above);
    menu.find(({ id }) => id === 'medley')!.onSelect();
    const [, operations] = deeds.perform.mock.calls[0] as [string, BoardOperation<ShownEntry>[]];
    return applyOperations(value, operations).board.medleys;
  };

  it('makes a medley with the tune above, longer ones of what is there, and parts it again', () => {
    expect(medleysAfter(ruled([]), b, a)).toEqual([[a.id, b.id]]);
    expect(medleysAfter(ruled([[a.id, b.id]]), c, b)).toEqual([[a.id, b.id, c.id]]);
    expect(
      medleysAfter(
        ruled([
          [a.id, b.id],
          [c.id, d.id],
        ]),
        c,
        b,
      ),
    ).toEqual([[a.id, b.id, c.id, d.id]]);
    expect(medleysAfter(ruled([[a.id, b.id, c.id]]), c, b)).toEqual([[a.id, b.id]]);
    // Not with a tune that stands in the middle of another medley.
    expect(items(ruled([[a.id, d.id]]), b, a).menu.map(({ id }) => id)).toEqual(['before']);
  });

  it('lets go of a pair, and says on the card what holds', () => {
    const value = ruled([[a.id, b.id]], [[b.id, d.id]]);
    const { deeds, menu } = items(value, b, a);
    expect(menu.map(({ label }) => label)).toEqual([
      'No medley with A',
      'Must come before …',
      'Need not come before D',
    ]);
    menu[2]!.onSelect();
    expect(deeds.perform).toHaveBeenCalledWith('B may come after D', [
      { type: 'set-rule', rule: 'before', ids: [b.id, d.id], holds: false },
    ]);
    expect(ruleWords(value).get(b.id)).toEqual(['medley with A', 'before D']);
    expect(ruleWords(value).get(a.id)).toBeUndefined();
  });
});

describe('the figures', () => {
  it('say where pegs are turned off the clock', () => {
    const evening = sessionOf([
      [shownEntry(1, 'A', { fiddle: 'ADAE' })],
      [shownEntry(2, 'B', { fiddle: 'AEAE' })],
    ]);
    const { places } = scoreBoard(evening, boardOf(evening));
    expect(offClockWords(places)).toBe('5 before the first tune, 5 in the break');
  });

  it.each([
    [45, 50, '5 fewer'],
    [50, 45, '5 more'],
    [45, 45, ''],
  ])('%i after %i is "%s"', (now, before, words) => {
    expect(differenceWords(now, before)).toBe(words);
  });
});
