import { formatOfPasted } from './read-pasted';

describe('formatOfPasted', () => {
  it.each([
    ['X:1\nT:One\nK:A', 'abc'],
    ['some words\r\n\r\nT: One\r\nK: A', 'abc'],
    ['title,key\nOne,A', 'csv'],
    ['Name\tKey\nOne\tA', 'csv'],
    ['Key;Title\nA;One', 'csv'],
    ['One\tA\nTwo\tD\n\nThree\tG', 'csv'],
    ['June Apple (A)\nLiza Jane (D)', 'list'],
    ['Dusty Miller, The\nLiza Jane, D', 'list'],
    ['', 'list'],
  ])('takes %j for %s', (text, format) => {
    expect(formatOfPasted(text)).toBe(format);
  });
});
