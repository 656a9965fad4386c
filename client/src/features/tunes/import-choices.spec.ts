import type { ImportReport } from '@pegwell/shared/contract/tunes';
import { describe, expect, it } from 'vitest';
import { choiceOf, choose, countFound, countWrites, NO_CHOICES, takeAllFound } from './import-choices';

const found = [{ kind: 'fiddle', tuning: 'AEAE', said: 'AEAE' }];
const report: ImportReport = {
  ...{ format: 'csv', encoding: 'utf-8', read: 3, created: 2, updated: 0, unchanged: 1, skipped: 0 },
  problems: [],
  tunes: [
    { line: 2, title: 'One', action: 'create', found },
    { line: 3, title: 'Two', action: 'create', alike: [] },
    { line: 4, title: 'Three', action: 'unchanged', found: [...found, { ...found[0]!, kind: 'banjo' }] },
  ],
};

describe('what a host chooses of an import', () => {
  it('takes every tuning that was found, or none, and leaves the rest as it was said', () => {
    const skip = choose(NO_CHOICES, { line: 2, found: [], alike: 'skip' });
    const all = takeAllFound(skip, report, true);
    expect([...all.values()]).toEqual([
      { line: 2, found: ['fiddle'], alike: 'skip' },
      { line: 4, found: ['fiddle', 'banjo'], alike: 'keep' },
    ]);
    expect(countFound(all, report)).toEqual({ found: 3, taken: 3 });
    expect(countFound(takeAllFound(all, report, false), report)).toEqual({ found: 3, taken: 0 });
    expect(choiceOf(skip, 3)).toEqual({ line: 3, found: [], alike: 'keep' });
  });

  it('counts what will be written', () => {
    expect(countWrites(NO_CHOICES, report)).toBe(2);
    expect(countWrites(choose(NO_CHOICES, { line: 3, found: [], alike: 'skip' }), report)).toBe(1);
    expect(countWrites(choose(NO_CHOICES, { line: 3, found: [], alike: 'merge' }), report)).toBe(2);
    // A tune that would not change does by a tuning that is taken.
    expect(countWrites(takeAllFound(NO_CHOICES, report, true), report)).toBe(3);
  });
});
