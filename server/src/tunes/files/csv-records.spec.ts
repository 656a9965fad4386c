import { readRecords } from './csv-records';

const read = (text: string) => readRecords(text, 1_000);
const cells = (text: string) => read(text).records.map((record) => record.cells);

// RFC 4180, section 2, by the numbers of its rules.
describe('readRecords', () => {
  it.each([
    [
      '1: a record a line, CRLF',
      'aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n',
      [
        ['aaa', 'bbb', 'ccc'],
        ['zzz', 'yyy', 'xxx'],
      ],
    ],
    [
      '2: the last one with or without',
      'aaa,bbb\r\nzzz,yyy',
      [
        ['aaa', 'bbb'],
        ['zzz', 'yyy'],
      ],
    ],
    ['4: spaces are part of a field', ' a , b ', [[' a ', ' b ']]],
    ['5: quotes around a field or none', '"aaa",bbb', [['aaa', 'bbb']]],
    ['6: line ends, quotes and commas inside quotes', '"aaa","b\r\nbb","c,c"', [['aaa', 'b\r\nbb', 'c,c']]],
    ['7: a quote inside is doubled', '"aaa","b""bb"', [['aaa', 'b"bb']]],
  ])('rule %s', (_rule, text, records) => {
    expect(cells(text)).toEqual(records);
  });

  it('takes other line ends, quotes inside plain cells, and the semicolons of other languages', () => {
    expect(cells('a,b\nc,d\re,f')).toEqual([
      ['a', 'b'],
      ['c', 'd'],
      ['e', 'f'],
    ]);
    expect(cells('12" tune,A')).toEqual([['12" tune', 'A']]);
    expect(cells('title;key\nOld, Hen;A')).toEqual([
      ['title', 'key'],
      ['Old, Hen', 'A'],
    ]);
    expect(cells('title\tkey\nHen\tA')).toEqual([
      ['title', 'key'],
      ['Hen', 'A'],
    ]);
  });

  it('does what a first line says parts the cells, and counts signs outside quotes alone', () => {
    expect(read('sep=;\r\ntitle;key\r\nOne;A').records).toEqual([
      { line: 2, cells: ['title', 'key'] },
      { line: 3, cells: ['One', 'A'] },
    ]);
    expect(cells('"a, b, c";key\nOne;A')).toEqual([
      ['a, b, c', 'key'],
      ['One', 'A'],
    ]);
  });

  it.each(['\n', '\r\n', '\r'])('says on which line a record begins, lines ending in %j', (end) => {
    const lines = ['title,notes', '', 'One,"first', '', 'third"', '', '', 'Two,"a', 'b"', 'Three,'];
    expect(read(lines.join(end)).records.map(({ line }) => line)).toEqual([1, 3, 8, 10]);
  });

  it('gives up only the line on which a quote is never closed', () => {
    const text = 'title,key\nOne,A\n\nTwo,"A\nThree,A\n"Four,A\nFive,D\n';
    const { records, unread } = read(text);
    expect(records.map(({ line, cells: [title] }) => [line, title])).toEqual([
      [1, 'title'],
      [2, 'One'],
      // One stray quote pairs with the next: nobody can tell where the cell was meant to end.
      [4, 'Two'],
      [7, 'Five'],
    ]);
    expect(unread).toEqual([]);
    const odd = read('title,key\nOne,A\n\nTwo,"A\nThree,A\n');
    expect(odd.records.map(({ line, cells: [title] }) => [line, title])).toEqual([
      [1, 'title'],
      [2, 'One'],
      [5, 'Three'],
    ]);
    expect(odd.unread).toEqual([{ line: 4, message: 'A quote (") is opened and never closed.' }]);
  });

  it('gives up in good time on a file of nothing but stray quotes', () => {
    const { unread } = read(`title\n${'"a\nb"c\n'.repeat(2_000)}"`);
    expect(unread.length).toBeLessThanOrEqual(21);
  });

  it('stops behind the limit', () => {
    expect(readRecords('a\n'.repeat(50), 10).records).toHaveLength(11);
  });
});
