import type { TuneFile } from './file-tune';
import { readCsv } from './read-csv';

function read(...rows: string[]): TuneFile {
  const file = readCsv(rows.join('\r\n'), 1_000);
  if ('reason' in file) throw new Error(file.reason);
  return file;
}

describe('readCsv', () => {
  it('finds columns by name, in any order and case', () => {
    const [tune] = read(
      'Fiddle,KEY,Tenor Banjo,title,Rhythm,parts,composer,source,notes,ID',
      '"AEAE or GDAE",A dorian,any,Cold Kettle,reel,AABB,trad,me,"two\nlines",6C1C9A2E-5a39-4e0e-8b0a-7f5f0d3b8a11',
    ).tunes;
    expect(tune).toMatchObject({
      ...{ line: 2, title: 'Cold Kettle', id: '6C1C9A2E-5a39-4e0e-8b0a-7f5f0d3b8a11', problems: [] },
      words: {
        ...{ title: 'Cold Kettle', key: 'A', mode: 'dorian', rhythm: 'reel', parts: 'AABB' },
        ...{ composer: 'trad', source: 'me', notes: 'two\nlines' },
      },
      stated: {
        'tenor-banjo': 'any',
        fiddle: [
          { pitches: ['A3', 'E4', 'A4', 'E5'], capo: 0 },
          { pitches: ['G3', 'D4', 'A4', 'E5'], capo: 0 },
        ],
      },
    });
  });

  it('says nothing for empty cells and missing columns', () => {
    const [tune] = read('title,key,mode,rhythm,fiddle', 'Cold Kettle,A,, ,').tunes;
    expect(tune).toMatchObject({ words: { title: 'Cold Kettle', key: 'A' }, stated: {}, problems: [] });
    expect(tune!.words).toEqual({ title: 'Cold Kettle', key: 'A' });
  });

  it('takes the formula quote off every cell', () => {
    const [tune] = read('title,key,notes', "'=1+1,A,'Tis so").tunes;
    expect(tune!.words).toMatchObject({ title: '=1+1', notes: "'Tis so" });
  });

  it('passes over empty rows, and tells of columns that it does not know', () => {
    const { tunes, problems } = read('title,key,tempo,title', 'One,A,120,', ',,,', '', 'Two,A,,');
    expect(tunes.map(({ line, title }) => [line, title])).toEqual([
      [2, 'One'],
      [5, 'Two'],
    ]);
    expect(problems).toEqual([
      { line: 1, message: 'The column "tempo" is not known and is left out.' },
      { line: 1, message: 'The column "title" is there twice; the first counts.' },
    ]);
  });

  it.each([
    ['One,A,GDA', 'A fiddle has 4 strings; GDA names 3: G D A.'],
    ['One,H,', /^"H" is no key/],
    ['One,A,GDAE or any', /any stands alone/],
    ['Cluck, Old Hen,A,GDAE', 'This row has 4 cells for 3 columns: a cell with a comma stands in quotes.'],
    [`${'x'.repeat(201)},A,`, 'A title is longer than 200 characters.'],
    ['"a\u0001b",A,', 'A title has characters that cannot be shown.'],
    [`One,A,${'GDAE or '.repeat(500)}GDAE`, 'Fiddle: this is too long for tunings.'],
  ])('keeps out the row %s', (row, message) => {
    const [bad, good] = read('title,key,fiddle', row, 'Good,A,GDAE').tunes;
    expect(bad!.problems[0]).toEqual({
      line: 2,
      message: typeof message === 'string' ? message : expect.stringMatching(message),
    });
    expect(good!.problems).toEqual([]);
  });

  it('keeps out a row whose quote is never closed', () => {
    const { tunes } = read('title,key', 'One,A', 'Two,"A', 'Three,A');
    expect(tunes.map(({ line, title, problems }) => [line, title, problems.length])).toEqual([
      [2, 'One', 0],
      [3, null, 1],
      [4, 'Three', 0],
    ]);
  });

  it.each([',', ';', '\t'])(
    'tells columns by what stands in them where the first row names none, by %j',
    (sign) => {
      const rows = [
        ['1', 'A', 'Lantern Hill', 'x'],
        ['2', 'D dorian', 'Cold Kettle', ''],
        ['3', 'Bb', 'Slack Tide', ''],
      ];
      const { tunes, problems } = read(...rows.map((row) => row.join(sign)));
      expect(tunes.map(({ line, words }) => [line, words.title, words.key, words.mode])).toEqual([
        [1, 'Lantern Hill', 'A', undefined],
        [2, 'Cold Kettle', 'D', 'dorian'],
        [3, 'Slack Tide', 'Bb', undefined],
      ]);
      const message =
        'The first row names no columns: column 2 as key, column 3 as title. The others are left out.';
      expect(problems).toEqual([{ line: 1, message }]);
    },
  );

  it('takes a column of modes too, and leaves an odd row to its own problem', () => {
    const rows = ['One,A,dorian', 'Two,D,mix', 'Three,G,major', 'Four,H,minor', 'Five,C,minor', 'Six,F,'];
    const { tunes } = read(...rows);
    expect(tunes.map(({ words, problems }) => [words.title, words.mode, problems.length])).toEqual([
      ...[
        ['One', 'dorian', 0],
        ['Two', 'mixolydian', 0],
        ['Three', 'major', 0],
      ],
      ...[
        ['Four', undefined, 1],
        ['Five', 'minor', 0],
        ['Six', undefined, 0],
      ],
    ]);
  });

  it('takes what people call columns, where none has its own name', () => {
    const [tune] = read(
      'Tune,Tonic,Type,Learnt from,Comments,Fiddle tuning',
      'One,A,reel,me,slow,AEAE',
    ).tunes;
    expect(tune).toMatchObject({
      words: { title: 'One', key: 'A', rhythm: 'reel', source: 'me', notes: 'slow' },
      stated: { fiddle: [{ pitches: ['A3', 'E4', 'A4', 'E5'] }] },
    });
    const { tunes, problems } = read('name,title,key', 'Uno,One,A');
    expect(tunes[0]!.title).toBe('One');
    expect(problems).toEqual([{ line: 1, message: 'The column "name" is not known and is left out.' }]);
  });

  it('proposes a tuning that is found in words or in a column of no kind, and states none', () => {
    const file = read(
      'title,key,tuning,notes,banjo',
      'One (AEAE),A,,,',
      'Two,A,gDGBD,,',
      'Three,A,,"fiddle tuned ADAE, banjo gDGBD",gCGCD',
      'Four (AEAE),A,,fiddle tuned GDAE,',
    );
    expect(
      file.tunes.map(({ found, plainTitle }) => [plainTitle, ...found.map(({ kind, said }) => [kind, said])]),
    ).toEqual([
      ['One', ['fiddle', 'AEAE']],
      [null, ['banjo', 'gDGBD']],
      // What is stated needs no proposal.
      [null, ['fiddle', 'fiddle tuned ADAE']],
      ['Four', ['fiddle', 'AEAE']],
    ]);
    expect(file.tunes.map(({ stated }) => Object.keys(stated))).toEqual([[], [], ['banjo'], []]);
  });

  it('takes short rows for rows of empty cells, and long ones where nothing more stands in them', () => {
    const { tunes } = read('title,key,notes', 'One,A', 'Two,A,,,,', 'Three', 'Four,A,,x');
    expect(tunes.map(({ title, problems }) => [title, problems.length])).toEqual([
      ...[
        ['One', 0],
        ['Two', 0],
        ['Three', 0],
        ['Four', 1],
      ],
    ]);
  });

  it.each([
    ['One\nTwo\nThree', /^This is no list of tunes/],
    ['Invoice,Total\nA-1,20\nA-2,30', /^This is no list of tunes/],
    ['<html><body>\n<p>Tunes</p>', /^This is no list of tunes/],
    ['key,notes\nA,slow', /^The first row has to name the columns; none of them is named title\.$/],
  ])('refuses %j, which is no list of tunes', (text, reason) => {
    expect(readCsv(text, 10)).toEqual({ reason: expect.stringMatching(reason) });
  });
});
