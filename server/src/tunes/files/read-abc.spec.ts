import { readAbc } from './read-abc';
import type { TuneFile } from './file-tune';

const read = (...lines: string[]): TuneFile => readAbc(lines.join('\n'), 1_000);
const words = (...lines: string[]) => read(...lines).tunes.map((tune) => tune.words);

// The header rules of ABC 2.1 (C. Walshaw, 2011), section by section. Tunes are invented.
describe('readAbc', () => {
  it('reads a tune header: X first, T next, K last (2.1 section 2.2.1)', () => {
    const [tune] = read(
      'X:1',
      'T:Lantern Hill',
      'C:Trad.',
      'S:a field recording',
      'R:breakdown',
      'P:AABB',
      'N:crooked B part',
      'M:C|',
      'L:1/8',
      'K:Amix',
      'A2 B2 | c4 |]',
      '%%pegwell-tuning fiddle AEAE or GDAE',
    ).tunes;
    expect(tune).toMatchObject({
      ...{ line: 1, title: 'Lantern Hill', keyLine: 10, id: null, problems: [] },
      words: {
        ...{ title: 'Lantern Hill', key: 'A', mode: 'mixolydian', rhythm: 'breakdown', parts: 'AABB' },
        ...{ composer: 'Trad.', source: 'a field recording', notes: 'crooked B part' },
      },
      stated: {
        fiddle: [
          { pitches: ['A3', 'E4', 'A4', 'E5'], capo: 0 },
          { pitches: ['G3', 'D4', 'A4', 'E5'], capo: 0 },
        ],
      },
    });
  });

  it('ends a tune at an empty line, and passes over free text between tunes (2.2)', () => {
    expect(
      words(
        'X:1',
        'T:One',
        'K:A',
        'abc',
        '',
        'Some words about them: free text.',
        'R:jig',
        '',
        'X:2',
        'T:Two',
        'K:D',
      ),
    ).toEqual([
      { title: 'One', key: 'A', mode: 'major' },
      { title: 'Two', key: 'D', mode: 'major' },
    ]);
  });

  it('reads header fields only up to K: (2.2.1); what stands in the music says nothing of the tune', () => {
    expect(words('X:1', 'T:One', 'K:G', 'abc|', 'P:B', 'T:Second strain', 'R:jig', 'K:D', 'def|')).toEqual([
      { title: 'One', key: 'G', mode: 'major' },
    ]);
  });

  it('takes defaults from a file header; a tune has the last word (2.2.2)', () => {
    const lines = ['%abc-2.1', 'R:reel', 'C:trad', '%%pegwell-tuning fiddle GDAE', ''];
    const { tunes } = read(...lines, 'X:1', 'T:One', 'K:A', '', 'X:2', 'T:Two', 'R:jig', 'K:A');
    expect(tunes.map((tune) => tune.words)).toMatchObject([
      { title: 'One', rhythm: 'reel', composer: 'trad' },
      { title: 'Two', rhythm: 'jig', composer: 'trad' },
    ]);
    expect(Object.keys(tunes[1]!.stated)).toEqual(['fiddle']);
  });

  it('keeps other titles and the group in the notes (3.1.2: a tune may have several T:)', () => {
    const [tune] = words('X:1', 'T:First', 'T:Second', 'T:Third', 'N:crooked', 'G:cross tuned', 'K:A');
    expect(tune).toMatchObject({
      title: 'First',
      notes: 'crooked\nAlso: Second\nAlso: Third\nGroup: cross tuned',
    });
  });

  it('strips comments, and keeps an escaped percent sign (2.2.5, and 8.2 for the escape)', () => {
    expect(
      words(
        'X:1 % number',
        '   % no empty line',
        'T:Fifty \\% Off % a joke',
        '% T:not this',
        'K:A % key',
        'R:reel',
      ),
    ).toEqual([{ title: 'Fifty % Off', key: 'A', mode: 'major', rhythm: 'reel' }]);
  });

  it('keeps the percent sign behind a number in a title, where nobody escapes it (2.2.5)', () => {
    expect(words('X:1', 'T:The 50% Reel % from memory', 'R:2%', 'K:D').map(({ title }) => title)).toEqual([
      'The 50% Reel',
    ]);
  });

  it('joins continued fields by a space, through comments and directives (3.3)', () => {
    expect(
      words(
        'X:1',
        'T:A Very',
        '+:Long Title',
        'N:one',
        '% between',
        '%%between too',
        '+:two',
        'N:three',
        'K:A',
      ),
    ).toMatchObject([{ title: 'A Very Long Title', notes: 'one two\nthree' }]);
  });

  it('reads the accents of text strings (8.2)', () => {
    expect(words('X:1', "T:Mn\\'a &amp; Se\\'an", 'K:A')[0]!.title).toBe('Mná & Seán');
  });

  it.each(['\n', '\r\n', '\r'])('takes %j for a line end, and counts lines by it', (end) => {
    const text = ['%abc', '', 'X:1', 'T:One', 'K:A', '', 'X:2', 'T:Two', 'K:A'].join(end);
    expect(readAbc(text, 10).tunes.map(({ line }) => line)).toEqual([3, 7]);
  });

  it('begins a tune at X: also where the empty line was forgotten, and takes a header without X: for a tune', () => {
    expect(words('X:1', 'T:One', 'K:A', 'X:2', 'T:Two', 'K:A').map(({ title }) => title)).toEqual([
      'One',
      'Two',
    ]);
    expect(words('T:One', 'K:A', '', 'T:Two', 'K:A').map(({ title }) => title)).toEqual(['One', 'Two']);
  });

  // Not as the standard has it (2.2.1, 3.1.1, 3.1.2, 3.1.14), but as files are.
  it.each<[string, string[], object[]]>([
    ['X: is missing', ['T:One', 'K:A', 'abc|', '', 'T:Two', 'K:D'], [{ title: 'One' }, { title: 'Two' }]],
    [
      'X: is repeated',
      ['X:1', 'T:One', 'K:A', '', 'X:1', 'T:Two', 'K:D'],
      [{ title: 'One' }, { title: 'Two' }],
    ],
    [
      'T: follows K:',
      ['X:1', 'K:Ador', 'T:One', 'R:jig', 'abc|'],
      [{ title: 'One', mode: 'dorian', rhythm: 'jig' }],
    ],
    [
      'a header has a title, and K: is followed by another',
      ['X:1', 'T:One', 'K:A', 'T:Part'],
      [{ title: 'One' }],
    ],
    ['K: is repeated', ['X:1', 'T:One', 'K:G', 'K:D', 'abc|', 'K:A'], [{ title: 'One', key: 'G' }]],
    ['T: is empty, then not', ['X:1', 'T:', 'T: ', 'T:One', 'K:A'], [{ title: 'One' }]],
    ['T: is empty', ['X:1', 'T:', 'K:A'], [{ key: 'A', mode: 'major' }]],
    [
      'lines are apart by empty ones',
      ['X:1', '', 'T:One', '', 'K:A', '', 'abc|', '', 'X:2', '', 'T:Two', '', 'K:D'],
      [
        { title: 'One', key: 'A' },
        { title: 'Two', key: 'D' },
      ],
    ],
    [
      'K: is missing, and X: behind it',
      ['X:1', 'T:One', '', 'T:Two', 'K:D'],
      [{ title: 'One' }, { title: 'Two', key: 'D' }],
    ],
    ['headers are indented', ['  X:1', '  T:One', '\tK:A', '  abc|'], [{ title: 'One', key: 'A' }]],
    ['a title ends in its article', ['X:1', 'T:Dusty Miller, The', 'K:G'], [{ title: 'Dusty Miller, The' }]],
    ['a title names a part', ['X:1', 'T:Dusty Miller (A part)', 'K:G'], [{ title: 'Dusty Miller (A part)' }]],
  ])('reads on where %s', (_oddity, lines, expected) => {
    const found = words(...lines);
    expect(found).toMatchObject(expected);
    expect(found).toHaveLength(expected.length);
  });

  it('takes nothing from the music, even where a bar looks like a field (3.2)', () => {
    expect(words('X:1', 'K:A', 'C:| abc', 'T:Variation', 'R:jig')).toEqual([{ key: 'A', mode: 'major' }]);
  });

  it('says that the scale of the pipes is no key (3.1.14: HP and Hp)', () => {
    expect(read('X:1', 'T:One', 'K:Hp').tunes[0]!.problems).toEqual([
      { line: 3, message: "K:Hp is the pipes' scale and names no key. Write K:Amix, or what it is." },
    ]);
  });

  it('never executes a directive: what is not its own is passed over (3.1.17)', () => {
    expect(read('X:1', 'T:One', '%%abc-include /etc/passwd', 'I:linebreak $', 'K:A').tunes).toMatchObject([
      { title: 'One', problems: [] },
    ]);
  });

  it('reads its own directives, as %% and as I: (3.1.17: they are the same), also behind the key', () => {
    const [tune] = read(
      'X:1',
      'T:One',
      '%%pegwell-id 6c1c9a2e-5a39-4e0e-8b0a-7f5f0d3b8a11',
      '%%pegwell-mode modal',
      'K:Amix',
      'I:pegwell-tuning banjo gDGCD capo 2 % as usual',
      '%%pegwell-tuning Tenor-Banjo any',
    ).tunes;
    expect(tune).toMatchObject({
      id: '6c1c9a2e-5a39-4e0e-8b0a-7f5f0d3b8a11',
      words: { key: 'A', mode: 'modal' },
      stated: { banjo: [{ pitches: ['G4', 'D3', 'G3', 'C4', 'D4'], capo: 2 }], 'tenor-banjo': 'any' },
      problems: [],
    });
  });

  it('names what is wrong at its line, and reads the rest', () => {
    const { tunes } = read(
      'X:1',
      'T:Bad',
      '%%pegwell-tuning fiddle GDA',
      '%%pegwell-tuning kazoo CCC',
      'K:A',
      '',
      'X:2',
      'T:Good',
      'K:A',
    );
    expect(tunes[0]!.problems).toEqual([
      { line: 3, message: 'A fiddle has 4 strings; GDA names 3: G D A.' },
      { line: 4, message: 'kazoo is no instrument that Pegwell knows.' },
    ]);
    expect(tunes[1]!.problems).toEqual([]);
  });

  it('takes the last of repeated instructions, and joins repeated text strings by semicolons (3)', () => {
    const [tune] = read(
      'X:1',
      'T:One',
      'C:Trad.',
      'C:arr. me',
      'P:AB',
      'P:AABB',
      '%%pegwell-tuning fiddle GDA',
      '%%pegwell-tuning fiddle AEAE',
      'K:A',
    ).tunes;
    expect(tune).toMatchObject({
      words: { composer: 'Trad.; arr. me', parts: 'AABB' },
      stated: { fiddle: [{ pitches: ['A3', 'E4', 'A4', 'E5'] }] },
      problems: [],
    });
  });

  it('continues an I: directive as the field that it is (2.2.6)', () => {
    const [tune] = read('X:1', 'T:One', 'I:pegwell-tuning fiddle AEAE', '+:or GDAE', 'K:A').tunes;
    expect(tune!.stated['fiddle']).toHaveLength(2);
  });

  it("reads the headers of the standard's own sample (13.1 English.abc, shortened)", () => {
    expect(
      words(
        '%abc-2.1',
        'H:This file contains some example English tunes',
        '% note that the comments are to highlight usages',
        'O:England             % the origin of all tunes is England',
        '',
        'X:1                   % tune no 1',
        'T:Dusty Miller, The   % title',
        "T:Binny's Jig         % an alternative title",
        'C:Trad.               % traditional',
        'R:DH                  % double hornpipe',
        'M:3/4                 % meter',
        'K:G                   % key',
        'B>cd BAG|FA Ac BA|B>cd BAG|DG GB AG:|',
        'W:Hey, the dusty miller, and his dusty coat;',
        '',
        'X:2',
        'T:Old Sir Simon the King',
        'C:Trad.',
        'S:Offord MSS          % from Offord manuscript',
        'N:see also Playford   % reference note',
        'M:9/8',
        'R:SJ                  % slip jig',
        'N:originally in C     % transcription note',
        'K:G',
        'D|GFG GAG G2D|GFG GAG F2D|EFE EFE EFG|A2G F2E D2:|',
      ),
    ).toEqual([
      {
        ...{ title: 'Dusty Miller, The', key: 'G', mode: 'major', rhythm: 'DH', composer: 'Trad.' },
        notes: "Also: Binny's Jig",
      },
      {
        ...{ title: 'Old Sir Simon the King', key: 'G', mode: 'major', rhythm: 'SJ', composer: 'Trad.' },
        ...{ source: 'Offord MSS', notes: 'see also Playford\noriginally in C' },
      },
    ]);
  });

  it('says where K: was when it names no key', () => {
    expect(read('X:1', 'T:Drums', 'K:none').tunes[0]).toMatchObject({
      keyLine: 3,
      words: { title: 'Drums' },
    });
    expect(read('', 'X:1', 'T:No end').tunes[0]).toMatchObject({ line: 2, keyLine: 2 });
  });

  it('says so when a file holds no tune; an exported empty library is none to complain of', () => {
    expect(read('just words').problems).toEqual([
      { line: 1, message: 'No tune was found: a tune begins with a line X:1.' },
    ]);
    expect(read('%abc-2.1', '').problems).toEqual([]);
  });

  it('stops behind the limit', () => {
    const text = 'X:1\nT:a\nK:A\n\n'.repeat(50);
    expect(readAbc(text, 10).tunes).toHaveLength(11);
  });
});
