import { clashSentence } from './clash-words';
import type { ClashingRule } from './engine/ordering-problem';

const pin = (id: string): ClashingRule => ({ rule: 'pin', ids: [id] });
const before = (first: string, second: string): ClashingRule => ({ rule: 'before', ids: [first, second] });
const medley = (...ids: string[]): ClashingRule => ({ rule: 'medley', ids });

describe('rules that clash, in a sentence', () => {
  type Row = [string, ClashingRule[], Record<string, number>];
  it.each<Row>([
    // The first is the sentence that the issue asks for.
    [
      '3 is pinned to place 2 but must come after 7, which is pinned to place 9.',
      [pin('3'), pin('7'), before('7', '3')],
      { '3': 1, '7': 8 },
    ],
    [
      '3 is pinned to place 4 but must come after 5, which must come after 7, which is pinned to place 3.',
      [pin('3'), pin('7'), before('5', '3'), before('7', '5')],
      { '3': 3, '7': 2 },
    ],
    ['3 is pinned to place 1 but must come after 7.', [pin('3'), before('7', '3')], { '3': 0 }],
    ['3 is pinned to place 12 but must come before 7.', [pin('3'), before('3', '7')], { '3': 11 }],
    [
      '3 is pinned to place 2 but must come after 5 and 7.',
      [pin('3'), before('5', '3'), before('7', '3')],
      { '3': 1 },
    ],
    [
      '3 is pinned to place 10 but must come before 5, 7 and 8.',
      [pin('3'), before('3', '5'), before('3', '7'), before('3', '8')],
      { '3': 9 },
    ],
    ['1 is pinned to place 13, and there are only 12.', [pin('1')], { '1': 12 }],
    ['1 and 3 are both pinned to place 3.', [pin('1'), pin('3')], { '1': 2, '3': 2 }],
    ['1 must come before 2, and 2 before 1.', [before('1', '2'), before('2', '1')], {}],
    [
      '1 must come before 2, 2 before 5, and 5 before 1.',
      [before('1', '2'), before('5', '1'), before('2', '5')],
      {},
    ],
    ['1, 2 and 3 are one medley, and no set is long enough for it.', [medley('1', '2', '3')], {}],
    [
      '1 is pinned to place 6, and there the medley of 1 and 2 does not fit into one set.',
      [pin('1'), medley('1', '2')],
      { '1': 5 },
    ],
    [
      '3 must come before 1, but they are one medley in another order: 1, 2 and 3.',
      [medley('1', '2', '3'), before('3', '1')],
      {},
    ],
    [
      '1 and 2 are one medley, and 3 and 2 are one medley: these cannot all hold.',
      [medley('1', '2'), medley('3', '2')],
      {},
    ],
    [
      '1 is pinned to place 2, 4 is pinned to place 3, and 1 and 2 are one medley: these cannot all hold.',
      [pin('1'), pin('4'), medley('1', '2')],
      { '1': 1, '4': 2 },
    ],
    [
      '3 is pinned to place 2, 5 must come before 3, 7 must come before 5, and 8 must come before 5: these cannot all hold.',
      [pin('3'), before('5', '3'), before('7', '5'), before('8', '5')],
      { '3': 1 },
    ],
  ])('%s', (sentence, clashes, places) => {
    const told = { nameOf: (id: string) => id, placeOf: (id: string) => places[id], places: 12 };
    expect(clashSentence(clashes, told)).toBe(sentence);
  });
});
