import { textLines } from './text-lines';

describe('textLines', () => {
  it.each([
    ['', [[1, '']]],
    [
      'a\nb\r\nc\rd',
      [
        [1, 'a'],
        [2, 'b'],
        [3, 'c'],
        [4, 'd'],
      ],
    ],
    [
      'a\n\r\n',
      [
        [1, 'a'],
        [2, ''],
        [3, ''],
      ],
    ],
    ['a\u2028b', [[1, 'a\u2028b']]],
  ])('numbers the lines of %j', (text, lines) => {
    expect([...textLines(text)]).toEqual(lines);
  });
});
