import { builtInKind } from '@pegwell/shared/music/instrument';
import { describe, expect, it } from 'vitest';
import { arrivalWords, instrumentsWords, savingWords, titleOf } from './rack-words';
import { PLAN, shown } from './racks-fixtures';

const fiddle = builtInKind('fiddle')!;
const cost = (pegChanges: number, stops: number) => ({ pegChanges, stops, semitones: 2 * pegChanges });

describe('words for a rack', () => {
  it.each([
    [1, cost(3, 1), cost(3, 1), ''],
    [2, cost(2, 1), cost(7, 2), ''],
    [2, cost(7, 2), cost(7, 2), 'As with one fiddle.'],
    [2, cost(6, 3), cost(7, 2), 'Fewer pegs than with one fiddle, at more stops.'],
    [3, cost(0, 0), cost(0, 0), 'There is nothing to turn with one fiddle either.'],
  ])('of %i instruments at %j, alone %j', (many, now, alone, words) => {
    expect(savingWords(fiddle, many, { ...PLAN, cost: now, alone })).toBe(words);
  });

  it.each([
    [{ arrives: 'opening', tuning: 'GDAE' }, true, 'GDAE', 'As everybody arrives.'],
    [{ arrives: 'opening', tuning: null }, true, 'AEAE', 'Tune it before you come.'],
    [{ arrives: 'free', tuning: null }, true, 'AEAE', 'Tune it before you come.'],
    [{ arrives: 'tuned', tuning: 'AEAE' }, true, 'AEAE', 'As entered here.'],
    [{ arrives: 'free', tuning: null }, false, null, 'Not needed tonight.'],
    [{ arrives: 'free', tuning: null }, true, null, 'As it stands: no tune says a tuning.'],
  ] as const)('of one that comes %j, played %s, in %s', (instrument, played, bring, words) => {
    expect(arrivalWords(instrument, played, bring && shown(bring))).toBe(words);
  });

  it('counts instruments, and names an open place by what may be called there', () => {
    expect([1, 2, 4].map((many) => instrumentsWords(fiddle, many))).toEqual([
      'one fiddle',
      'two fiddles',
      'four fiddles',
    ]);
    expect(titleOf({ id: 'e', title: null, key: 'A', mode: 'modal' })).toBe('A modal tunes');
  });
});
