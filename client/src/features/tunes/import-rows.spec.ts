import type { ImportReport } from '@pegwell/shared/contract/tunes';
import { describe, expect, it } from 'vitest';
import { importRows } from './import-rows';

const report = (tunes: ImportReport['tunes'], problems: ImportReport['problems']): ImportReport => ({
  ...{
    format: 'abc',
    encoding: 'utf-8',
    read: tunes.length,
    created: 0,
    updated: 0,
    unchanged: 0,
    skipped: 0,
  },
  tunes,
  problems,
});

describe('the lines of an import', () => {
  it('puts a problem with the tune that begins at or above its line', () => {
    const { rows, notes } = importRows(
      report(
        [
          { line: 1, title: 'First', action: 'create' },
          { line: 8, title: 'Second', action: 'skip' },
          { line: 20, title: 'Third', action: 'skip' },
        ],
        [
          { line: 22, tune: 'Third', message: 'third' },
          { line: 12, tune: 'Second', message: 'second, again' },
          { line: 8, tune: 'Second', message: 'second' },
        ],
      ),
    );
    expect(rows.map(({ reasons }) => reasons)).toEqual([[], ['second', 'second, again'], ['third']]);
    expect(notes).toEqual([]);
  });

  it('keeps what concerns no tune that is left out as a note of the file', () => {
    const { notes } = importRows(
      report(
        [{ line: 3, title: 'First', action: 'create' }],
        [
          { line: 1, tune: null, message: 'A column is not known.' },
          { line: 4, tune: null, message: 'Something after the tune.' },
        ],
      ),
    );
    expect(notes.map(({ line }) => line)).toEqual([1, 4]);
  });
});
