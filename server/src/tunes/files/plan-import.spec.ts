import { randomUUID } from 'node:crypto';
import type { ImportChoice } from '@pegwell/shared/contract/import-choices';
import type { StoredTune } from '../tune-content';
import { planImport, type ImportPlan } from './plan-import';
import { readCsv } from './read-csv';

const GDAE = { pitches: ['G3', 'D4', 'A4', 'E5'], capo: 0 };

function stored(title: string, fields: Partial<StoredTune> = {}): StoredTune {
  return {
    ...{
      id: randomUUID(),
      settingId: randomUUID(),
      title,
      key: 'A',
      mode: 'major',
      rhythm: null,
      parts: null,
    },
    ...{ composer: null, source: null, notes: null, stated: {} },
    ...{ createdAt: new Date(0), updatedAt: new Date(0) },
    ...fields,
  };
}

function plan(library: readonly StoredTune[], ...rows: string[]): ImportPlan {
  const file = readCsv(rows.join('\n'), 1_000);
  if ('reason' in file) throw new Error(file.reason);
  return planImport(file.tunes, library);
}

/** What becomes of each row, and of which tune of the library. */
function outcome(library: readonly StoredTune[], ...rows: string[]) {
  return plan(library, ...rows).tunes.map((tune) =>
    'before' in tune ? [tune.action, library.indexOf(tune.before)] : [tune.action],
  );
}

// contract.md, "Tunes": which row is which tune, and what stays.
describe('planImport', () => {
  it('finds a tune by its title without case, accents, apostrophes and white space, tonic and mode', () => {
    const library = [stored("Soldier's Joy", { key: 'Bb' }), stored('Mná', { mode: 'dorian' })];
    expect(
      outcome(
        library,
        'title,key,mode',
        'SOLDIERS  JOY,A#,major',
        'mna,A,dorian',
        'mna,A,minor',
        'The Mná,A,dorian',
      ),
    ).toEqual([['update', 0], ['update', 1], ['create'], ['create']]);
  });

  it('finds a tune by its id before all else, and passes over ids that are not here', () => {
    const library = [stored('One'), stored('Two')];
    const [one, two] = library.map(({ id }) => id);
    expect(
      outcome(
        library,
        'id,title,key,mode',
        `${two!.toUpperCase()},One,A,major`,
        `${randomUUID()},Three,A,major`,
        'not an id,Four,A,major',
        `${one!},,,`,
      ),
    ).toEqual([['update', 1], ['create'], ['create'], ['unchanged', 0]]);
  });

  it('takes repeats in file order, each tune once', () => {
    const library = [stored('Same', { notes: 'first' }), stored('Same', { notes: 'second' })];
    expect(
      outcome(
        library,
        'title,key,mode,notes',
        'Same,A,major,first',
        'Same,A,major,second',
        'Same,A,major,third',
      ),
    ).toEqual([['unchanged', 0], ['unchanged', 1], ['create']]);
  });

  it('does not let a repeat fall on the tune of a bad row before it', () => {
    const library = [stored('Same', { notes: 'first' }), stored('Same', { notes: 'second' })];
    expect(
      outcome(library, 'title,key,notes,fiddle', 'Same,A,first,GDA', 'Same,A,second,').map(
        ([action]) => action,
      ),
    ).toEqual(['skip', 'unchanged']);
  });

  it('skips a second row with the id of one tune', () => {
    const library = [stored('One')];
    const { tunes, problems } = plan(
      library,
      'id,title,key',
      `${library[0]!.id},One,A`,
      `${library[0]!.id},Uno,A`,
    );
    expect(tunes.map(({ action }) => action)).toEqual(['unchanged', 'skip']);
    expect(problems).toEqual([
      { line: 3, tune: 'Uno', message: 'Another row of this file has the same id already.' },
    ]);
  });

  it('takes a mode that is not said for any, major first; and for major where the tune is new', () => {
    const library = [stored('Cuckoo', { mode: 'dorian' }), stored('Cuckoo')];
    expect(outcome(library, 'title,key', 'Cuckoo,A', 'Cuckoo,A', 'Cuckoo,A')).toEqual([
      ['unchanged', 1],
      ['unchanged', 0],
      ['create'],
    ]);
    const { tunes } = plan([], 'title,key', 'Cuckoo,A', 'Cuckoo,Am');
    expect(tunes).toMatchObject([{ content: { mode: 'major' } }, { content: { mode: 'minor' } }]);
  });

  it('leaves what empty cells and missing columns do not say', () => {
    const guitar = [{ pitches: ['E2', 'A2', 'D3', 'G3', 'B3', 'E4'], capo: 2 }];
    const library = [stored('One', { rhythm: 'reel', notes: 'kept', stated: { fiddle: 'any', guitar } })];
    const [tune] = plan(library, 'title,key,mode,rhythm,fiddle', 'One,A,,jig,GDAE').tunes;
    expect(tune).toMatchObject({
      action: 'update',
      after: { rhythm: 'jig', notes: 'kept', stated: { fiddle: [GDAE], guitar } },
    });
    expect(outcome(library, 'title,key,rhythm,fiddle', 'One,A,,')).toEqual([['unchanged', 0]]);
  });

  it('renames and moves a tune that is found by its id', () => {
    const library = [stored('One', { mode: 'dorian' })];
    const [tune] = plan(library, 'id,title,key', `${library[0]!.id},Uno,D`).tunes;
    expect(tune).toMatchObject({ action: 'update', after: { title: 'Uno', key: 'D', mode: 'dorian' } });
  });

  it('skips what has no title or no key, says why, and goes on', () => {
    const { tunes, problems } = plan([], 'title,key', ',A', 'No Key,', 'None,none', ',', 'Good,A');
    expect(tunes.map(({ action }) => action)).toEqual(['skip', 'skip', 'skip', 'create']);
    expect(problems).toEqual([
      { line: 2, tune: null, message: 'A title is missing.' },
      { line: 3, tune: 'No Key', message: expect.stringMatching(/^No key is given/) },
      { line: 4, tune: 'None', message: expect.stringMatching(/^No key is given/) },
    ]);
  });

  describe('with what a host chooses', () => {
    const AEAE = { pitches: ['A3', 'E4', 'A4', 'E5'], capo: 0 };
    const choose = (library: readonly StoredTune[], choices: readonly ImportChoice[], ...rows: string[]) => {
      const file = readCsv(rows.join('\n'), 1_000);
      if ('reason' in file) throw new Error(file.reason);
      return planImport(file.tunes, library, choices).tunes;
    };
    const choice = (line: number, rest: Partial<ImportChoice>): ImportChoice => ({
      ...{ line, found: [], alike: 'keep' },
      ...rest,
    });

    it('proposes tunings that are found, where the library states none, and takes those that are chosen', () => {
      const library = [stored('Stated', { stated: { fiddle: 'any' } }), stored('Silent')];
      const rows = [
        'title,key,notes',
        'Stated,A,fiddle AEAE',
        'Silent,A,',
        'Fresh (AEAE),A,',
        'Fresh (AEAE),D,',
      ];
      rows[2] = 'Silent,A,"fiddle AEAE"';
      const plain = choose(library, [], ...rows);
      expect(plain.map(({ action, found }) => [action, found.length])).toEqual([
        ...[
          ['update', 0],
          ['update', 1],
          ['create', 1],
          ['create', 1],
        ],
      ]);
      const [, silent, fresh, other] = choose(
        library,
        [choice(3, { found: ['fiddle'] }), choice(4, { found: ['fiddle', 'banjo'] })],
        ...rows,
      );
      expect(silent).toMatchObject({ found: [], after: { stated: { fiddle: [AEAE] } } });
      expect(fresh).toMatchObject({
        title: 'Fresh',
        found: [],
        content: { title: 'Fresh', stated: { fiddle: [AEAE] } },
      });
      // Not chosen: nothing is taken, and the title is as written.
      expect(other).toMatchObject({ title: 'Fresh (AEAE)', content: { title: 'Fresh (AEAE)', stated: {} } });
    });

    it('shows what is likely the same, and makes new tunes all the same unless it is told otherwise', () => {
      const library = [stored('The Dusty Miller', { key: 'G' }), stored('Lantern Hill')];
      const rows = ['title,key', '"Dusty Miller, The",G', 'Lantern Hil,A', 'Lantern Hill,D', 'Other,A'];
      const plain = choose(library, [], ...rows);
      expect(
        plain.map((tune) => [tune.action, 'alike' in tune && tune.alike.map(({ id, line }) => id ?? line)]),
      ).toEqual([
        ['create', [library[0]!.id]],
        ['create', [library[1]!.id]],
        ['create', [library[1]!.id, 3]],
        ['create', []],
      ]);
      const skipped = choose(library, [choice(2, { alike: 'skip' }), choice(5, { alike: 'skip' })], ...rows);
      expect(skipped.map(({ action }) => action)).toEqual(['skip', 'create', 'create', 'create']);
    });

    it('merges: what is there stays, what is empty is filled, nothing is lost', () => {
      const library = [stored('The Dusty Miller', { key: 'G', rhythm: 'reel', notes: 'old' })];
      const [tune] = choose(
        library,
        [choice(2, { alike: 'merge' })],
        'title,key,rhythm,composer,notes,fiddle',
        '"Dusty Miller, The",G,jig,trad,new,GDGD',
      );
      expect(tune).toMatchObject({
        ...{ action: 'update', before: library[0] },
        after: {
          ...{ id: library[0]!.id, title: 'The Dusty Miller', key: 'G', rhythm: 'reel', composer: 'trad' },
          ...{
            notes: 'old\nAlso: Dusty Miller, The\nnew',
            stated: { fiddle: [{ pitches: ['G3', 'D4', 'G4', 'D5'] }] },
          },
        },
      });
    });

    it('merges a tune of another key without its tunings, and says which key it was', () => {
      const library = [stored('Cuckoo')];
      const rows = ['title,key,fiddle', 'Cuckoo,D minor,ADAE'];
      const [tune] = choose(library, [choice(2, { alike: 'merge', with: library[0]!.id })], ...rows);
      expect(tune).toMatchObject({
        after: { key: 'A', mode: 'major', stated: {}, notes: 'Also in D minor' },
      });
    });

    it('merges several into one, of the library or of the file, and nothing twice', () => {
      const library = [stored('Lantern Hill', { notes: 'x' })];
      const rows = [
        'title,key,notes',
        'Lantern Hill,A,x',
        'Lantern Hil,A,y',
        'Lanter Hill,A,y',
        'New One,D,',
        'The New One,D,z',
      ];
      const tunes = choose(
        library,
        [3, 4, 6].map((line) => choice(line, { alike: 'merge' })),
        ...rows,
      );
      expect(tunes).toMatchObject([
        { action: 'update', after: { notes: 'x\nAlso: Lantern Hil\ny\nAlso: Lanter Hill' } },
        { action: 'merge', into: 0 },
        { action: 'merge', into: 0 },
        { action: 'create', content: { title: 'New One', notes: 'Also: The New One\nz' } },
        { action: 'merge', into: 3 },
      ]);
      // A second time there is nothing left to add.
      const first = tunes[0]!;
      if (first.action !== 'update') throw new Error('It was changed.');
      const again = choose(
        [first.after],
        [3, 4].map((line) => choice(line, { alike: 'merge' })),
        ...rows.slice(0, 4),
      );
      expect(again.slice(1).map(({ action }) => action)).toEqual(['merge', 'merge']);
      expect(again[0]!.action).toBe('unchanged');
    });

    it('keeps a tune apart whose other is left out, or is none of those alike', () => {
      const rows = ['title,key', 'New One,D', 'The New One,D'];
      const library = [stored('New One', { key: 'G' }), stored('Old One')];
      const left = choose(
        library,
        [choice(2, { alike: 'skip' }), choice(3, { alike: 'merge', with: 2 })],
        ...rows,
      );
      expect(left.map(({ action }) => action)).toEqual(['skip', 'create']);
      const other = choose(library, [choice(3, { alike: 'merge', with: library[1]!.id })], ...rows);
      expect(other.map(({ action }) => action)).toEqual(['create', 'create']);
    });
  });

  it('plans twenty thousand tunes of one name in a moment', () => {
    const library = Array.from({ length: 20_000 }, () => stored('Same'));
    const rows = Array.from({ length: 20_000 }, () => 'Same,A');
    const file = readCsv(['title,key', ...rows].join('\n'), 20_000);
    if ('reason' in file) throw new Error(file.reason);
    const started = process.cpuUsage();
    const { tunes } = planImport(file.tunes, library);
    expect(tunes.every(({ action }) => action === 'unchanged')).toBe(true);
    // Microseconds of work, whatever else the machine does; a search per tune would take minutes.
    expect(process.cpuUsage(started).user).toBeLessThan(5_000_000);
  });
});
