import { randomUUID } from 'node:crypto';
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
