import { randomUUID } from 'node:crypto';
import fc from 'fast-check';
import { createTuneSchema } from '@pegwell/shared/contract/tunes';
import { BUILT_IN_KINDS } from '@pegwell/shared/music/instrument';
import { MODES } from '@pegwell/shared/music/mode';
import { midiOf, spell, type Accidental, type Letter } from '@pegwell/shared/music/pitch';
import { sameTuned, type Tuned } from '@pegwell/shared/music/tuning';
import type { Accepted } from '@pegwell/shared/tunes/kind-tunings';
import { INVENTED, INVENTED_SOURCE } from '../../demo/invented-tunes';
import { COMMON, COMMON_SOURCE, FROM_MEMORY, MEMORY_SOURCE } from '../../demo/traditional-tunes';
import { writeTable } from '../../demo/tune-row';
import type { StoredTune, TuneContent } from '../tune-content';
import { planImport } from './plan-import';
import { readAbc } from './read-abc';
import { readCsv } from './read-csv';
import { writeAbc } from './write-abc';
import { writeCsv } from './write-csv';

// contract.md: "importing it again changes nothing", for any tune that can be stored.

/** Signs that mean something to CSV, ABC, spreadsheets or line readers. */
const AWKWARD = [
  ...`"',;:%\\&=+-@|[]{}$*_^~<>/#'\`uvHcAaOoEeN123 `,
  ...['\t', '\u00a0', '\u2028', '\u0085', '\ufeff', '\u200b', 'é', 'e\u0301', '♯', '🎻', '＝'],
  ...['%%', 'X:1', 'K:A', '+:', '&eacute;', '\\u00e9', "'=", ' or ', 'any', '"""'],
];
const LINES = [...AWKWARD, '\n', '\r\n', '\r', '\n\n'];

const text = (units: readonly string[], max: number) =>
  fc.oneof(
    fc.string({ unit: fc.constantFrom(...units), maxLength: 12 }),
    fc.string({ unit: 'grapheme', maxLength: max }),
  );

/** As the API would take it: what it refuses is no case. */
const field = (
  name: 'title' | 'rhythm' | 'parts' | 'composer' | 'source' | 'notes',
  units: readonly string[],
) =>
  text(units, 20)
    .map((value) => createTuneSchema.shape[name].safeParse(value))
    .filter(({ success }) => success)
    .map(({ data }) => data ?? null);

const pitch = (standard: string) =>
  fc
    .tuple(
      fc.constantFrom<Letter>('C', 'D', 'E', 'F', 'G', 'A', 'B'),
      fc.constantFrom<Accidental>('', '', '#', 'b', '##', 'bb'),
      fc.constantFrom(-1, 0, 0, 0, 1),
    )
    .map(
      ([letter, sign, octave]) =>
        spell(letter, sign, Math.floor(midiOf(standard) / 12) - 1 + octave)?.name ?? standard,
    );

const stated: fc.Arbitrary<Accepted> = fc
  .tuple(
    ...BUILT_IN_KINDS.map((kind) => {
      const tuned: fc.Arbitrary<Tuned> = fc.record({
        pitches: fc.oneof(
          fc.constant(kind.courses.map(({ standard }) => standard)),
          // A banjo's capo spelling as pegs: shown in full, or it would be read with a capo.
          fc.constant(
            kind.id === 'banjo' ? ['A4', 'D3', 'A3', 'D4', 'E4'] : kind.courses.map((c) => c.standard),
          ),
          fc.tuple(...kind.courses.map(({ standard }) => pitch(standard))),
        ),
        capo: fc.oneof(fc.constant(0), fc.integer({ min: 0, max: 12 })),
      });
      const list = fc.uniqueArray(tuned, { minLength: 1, maxLength: 3, comparator: sameTuned });
      return fc.oneof(fc.constant(undefined), fc.constant('any' as const), list);
    }),
  )
  .map((lists) =>
    Object.fromEntries(
      BUILT_IN_KINDS.flatMap(({ id }, index) => {
        const list = lists[index];
        return list === undefined ? [] : [[id, list]];
      }),
    ),
  );

const tonics = [...'CDEFGAB'].flatMap((letter) => ['', '#', 'b'].map((sign) => letter + sign));

const content: fc.Arbitrary<TuneContent> = fc.record({
  title: field('title', AWKWARD).filter((title): title is string => title !== null),
  key: fc.constantFrom(...tonics),
  mode: fc.constantFrom(...MODES),
  rhythm: field('rhythm', AWKWARD),
  parts: field('parts', LINES),
  composer: field('composer', LINES),
  source: field('source', LINES),
  notes: field('notes', LINES),
  stated,
});

const library: fc.Arbitrary<StoredTune[]> = fc
  .array(fc.tuple(fc.uuid(), content), { minLength: 1, maxLength: 4 })
  .map((tunes) =>
    tunes.map(([id, each]) => ({
      ...{ id, settingId: id, createdAt: new Date(0), updatedAt: new Date(0) },
      ...each,
    })),
  );

const FORMATS = {
  csv: { write: writeCsv, read: (file: string) => readCsv(file, 5_000) },
  abc: { write: writeAbc, read: (file: string) => readAbc(file, 5_000) },
};

describe.each(['csv', 'abc'] as const)('a library as %s', (format) => {
  const { write, read } = FORMATS[format];
  const planned = (file: string, onto: readonly StoredTune[]) => {
    const tunes = read(file);
    if ('reason' in tunes) throw new Error(tunes.reason);
    return { ...planImport(tunes.tunes, onto), fileProblems: tunes.problems };
  };

  it('changes nothing when it is read again', () => {
    fc.assert(
      fc.property(library, (tunes) => {
        const { tunes: rows, problems, fileProblems } = planned(write(tunes), tunes);
        expect([...problems, ...fileProblems]).toEqual([]);
        expect(rows.map(({ action }) => action)).toEqual(tunes.map(() => 'unchanged'));
      }),
      { numRuns: 200 },
    );
  });

  it('makes the same library in an empty circle', () => {
    fc.assert(
      fc.property(library, (tunes) => {
        const { tunes: rows, problems } = planned(write(tunes), []);
        expect(problems).toEqual([]);
        expect(rows.map((row) => (row.action === 'create' ? row.content : row.action))).toEqual(
          tunes.map(({ title, key, mode, rhythm, parts, composer, source, notes, stated: said }) => ({
            ...{ title, key, mode, rhythm, parts, composer, source, notes, stated: said },
          })),
        );
      }),
      { numRuns: 200 },
    );
  });

  it('changes nothing either when its ids were taken out, tunes of one name in file order', () => {
    fc.assert(
      fc.property(content, fc.array(fc.uuid(), { minLength: 2, maxLength: 3 }), (each, ids) => {
        const tunes = ids.map((id, index) => ({
          ...{ ...each, id, settingId: id, createdAt: new Date(0), updatedAt: new Date(0) },
          notes: `note ${index}`,
        }));
        const file = ids.reduce((whole, id) => whole.replaceAll(id, ''), write(tunes));
        const { tunes: rows } = planned(file, tunes);
        expect(rows.map(({ action }) => action)).toEqual(tunes.map(() => 'unchanged'));
      }),
      { numRuns: 100 },
    );
  });
});

/** As a library stores it, each with an id of its own. */
const storedAs = (tunes: readonly TuneContent[]): StoredTune[] =>
  tunes.map((tune) => {
    const id = randomUUID();
    return { ...{ id, settingId: id, createdAt: new Date(0), updatedAt: new Date(0) }, ...tune };
  });

describe.each(['csv', 'abc'] as const)('a whole library as %s', (format) => {
  const { write, read } = FORMATS[format];
  const changes = (library: readonly StoredTune[]) => {
    const file = read(write(library));
    if ('reason' in file) throw new Error(file.reason);
    const { tunes, problems } = planImport(file.tunes, library);
    return {
      problems: [...file.problems, ...problems],
      actions: new Set(tunes.map(({ action }) => action)),
      read: tunes.length,
    };
  };
  const nothing = (count: number) => ({ problems: [], actions: new Set(['unchanged']), read: count });

  it('of 2,000 generated tunes changes nothing when it is read again', () => {
    const tunes = fc.array(content, { minLength: 2_000, maxLength: 2_000 });
    fc.assert(
      fc.property(tunes, (all) => expect(changes(storedAs(all))).toEqual(nothing(2_000))),
      // Not shrunk, which would take an hour: the properties above find small ones.
      { numRuns: 1, endOnFailure: true },
    );
  });

  it('of the demo changes nothing', () => {
    const tables = [
      { source: COMMON_SOURCE, rows: COMMON },
      { source: MEMORY_SOURCE, rows: FROM_MEMORY },
      { source: INVENTED_SOURCE, rows: INVENTED },
    ];
    const file = readCsv(writeTable(tables).toString(), 1_000);
    if ('reason' in file) throw new Error(file.reason);
    const made = planImport(file.tunes, []).tunes;
    const tunes = made.flatMap((tune) => (tune.action === 'create' ? [tune.content] : []));
    expect(tunes).toHaveLength(file.tunes.length);
    expect(tunes.length).toBeGreaterThan(50);
    expect(changes(storedAs(tunes))).toEqual(nothing(tunes.length));
  });
});

describe('a CSV file', () => {
  it('holds no cell that a spreadsheet would take for a formula', () => {
    fc.assert(
      fc.property(library, (tunes) => {
        // Cells by the rules of RFC 4180, read here without Pegwell's reader.
        const cells = [
          ...writeCsv(tunes).matchAll(/(?<=^|,|\r\n)(?:"((?:[^"]|"")*)"|([^",\r\n]*))(?=,|\r\n|$)/g),
        ];
        expect(cells.length).toBeGreaterThanOrEqual((tunes.length + 1) * 18);
        for (const [, quoted, plain] of cells) expect(quoted ?? plain).not.toMatch(/^[=+\-@\t\r\n]/);
      }),
      { numRuns: 100 },
    );
  });
});
