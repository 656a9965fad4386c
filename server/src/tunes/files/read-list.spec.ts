import { readList } from './read-list';

const read = (...lines: string[]) =>
  readList(lines.join('\n'), 100).tunes.map(({ words, found }) => [
    words.title,
    words.key === undefined ? null : `${words.key} ${words.mode ?? ''}`.trim(),
    ...found.map(
      ({ kind, accepted }) => `${kind} ${accepted.map(({ pitches }) => pitches.join('')).join(' or ')}`,
    ),
  ]);

// How people write lists: common practice. Titles are traditional.
describe('readList', () => {
  it.each([
    ['June Apple (A)', 'June Apple', 'A'],
    ['1. June Apple [A mix]', 'June Apple', 'A mixolydian'],
    ['- June Apple - A', 'June Apple', 'A'],
    ['June Apple, Am', 'June Apple', 'A minor'],
    ['June Apple: A dorian', 'June Apple', 'A dorian'],
    ['June Apple\tBb', 'June Apple', 'Bb'],
    ['  12) June Apple — F#m ', 'June Apple', 'F# minor'],
    ['June Apple (a)', 'June Apple', 'A'],
    ['Dusty Miller, The (A part) (G)', 'Dusty Miller, The (A part)', 'G'],
    ['Over the Waterfall (D/G)', 'Over the Waterfall', 'D'],
    ['Half-Past Four', 'Half-Past Four', null],
    ['Ducks on the Pond (slow)', 'Ducks on the Pond (slow)', null],
    ['Forked Deer - fast', 'Forked Deer - fast', null],
  ])('reads %j', (line, title, key) => {
    expect(read(line)).toEqual([[title, key]]);
  });

  it('proposes tunings in brackets, and takes them for no part of the title', () => {
    expect(read('June Apple (A, AEAE)', 'Sandy Boys (AEAE)', 'Ruffled Drawers (D ADAE)')).toEqual([
      ['June Apple', 'A', 'fiddle A3E4A4E5'],
      ['Sandy Boys', null, 'fiddle A3E4A4E5'],
      ['Ruffled Drawers', 'D', 'fiddle A3D4A4E5'],
    ]);
  });

  it('takes keys, and tunings, from the heading above', () => {
    const lines = [
      'A tunes (AEAE):',
      'June Apple',
      'Cold Frosty Morning (Am)',
      '',
      'Key of D',
      'Liza Jane',
      'G:',
      'Ways',
    ];
    expect(read(...lines)).toEqual([
      ['June Apple', 'A', 'fiddle A3E4A4E5'],
      ['Cold Frosty Morning', 'A minor'],
      ['Liza Jane', 'D'],
      ['Ways', 'G'],
    ]);
  });

  it.each(['\n', '\r\n', '\r'])('counts lines that end in %j, and passes over empty ones', (end) => {
    const { tunes } = readList(['One (A)', '', '  ', 'Two (D)'].join(end), 10);
    expect(tunes.map(({ line }) => line)).toEqual([1, 4]);
  });

  it('stops behind the limit', () => {
    expect(readList('a (A)\n'.repeat(50), 10).tunes).toHaveLength(11);
  });
});
