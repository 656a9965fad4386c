import { builtInKind } from '@pegwell/shared/music/instrument';
import { describe, expect, it } from 'vitest';
import {
  agoOf,
  inOrder,
  priceOf,
  retuneLabel,
  sidesOf,
  stringLetters,
  titleOf,
  turnNow,
  underTitle,
  untilRetune,
} from './follow-words';
import { move } from './follow-fixtures';

const banjo = builtInKind('banjo')!;
const tune = { title: 'Millrace Waltz', key: 'D', mode: 'major', rhythm: 'waltz', minutes: null } as const;
const open = { title: null, key: 'A', mode: 'modal', rhythm: null, minutes: 40 } as const;

describe('what the phone says', () => {
  it('names a tune, its key and rhythm, and an open place by what may be called', () => {
    expect([titleOf(tune), underTitle(tune)]).toEqual(['Millrace Waltz', 'D · waltz']);
    expect(underTitle({ ...tune, mode: 'dorian', rhythm: null })).toBe('D dorian');
    expect([titleOf(open), underTitle(open)]).toEqual([
      'A modal tunes',
      'open place · 40 min · whoever calls',
    ]);
  });

  // The retunes of score.md's worked example 1, and a banjo's capo.
  it('puts a price on a move', () => {
    expect(priceOf(null)).toBe('stay');
    expect(priceOf(move('fiddle', 'GDAE', 'AEAE'))).toBe('2 pegs');
    expect(retuneLabel(move('fiddle', 'GDAE', 'ADAE'))).toBe('retune 1 peg');
    expect(priceOf(move('banjo', 'gDGBD', 'gDGBD capo 2'))).toBe('capo on at fret 2');
    expect(retuneLabel(move('banjo', 'gCGCD capo 2', 'gDGBD'))).toBe('retune 2 pegs, capo off');
  });

  it('says what to do now, a capo that goes before the pegs and one that comes after them', () => {
    // score.md, "Words of safety": first capo off.
    const [off, on] = [move('banjo', 'gCGCD capo 2', 'gDGBD'), move('banjo', 'gCGCD', 'gDGBD capo 2')];
    expect(turnNow(move('fiddle', 'GDAE', 'ADAE'))).toBe('Retune 1 peg now');
    expect(turnNow(off)).toBe('Now retune 2 pegs, capo off');
    expect(inOrder('capo off', ['pegs'], sidesOf(off)!.to)).toEqual(['Capo off', 'pegs']);
    expect(inOrder('capo on at fret 2', ['pegs'], sidesOf(on)!.to)).toEqual(['pegs', 'Capo on at fret 2']);
  });

  it('writes a banjo’s fifth in lower case', () => {
    expect(stringLetters(banjo, ['G4', 'D3', 'G3', 'B3', 'D4'])).toEqual(['g', 'D', 'G', 'B', 'D']);
    expect(stringLetters(builtInKind('fiddle')!, ['A3', 'E4', 'A4', 'C#5'])).toEqual(['A', 'E', 'A', 'C#']);
  });

  it('says how long it stays as it is', () => {
    expect(untilRetune(3)).toBe('Stay as you are for 3 tunes, this one included.');
    expect(untilRetune(1)).toBe('');
    expect(untilRetune(null)).toBe('Nothing more to turn this evening.');
  });

  it.each([
    [8_200, '8 s'],
    [89_000, '89 s'],
    [120_000, '2 min'],
    [7_200_000, '2 h'],
  ])('says how long ago %i ms is: %s', (ms, words) => expect(agoOf(ms)).toBe(words));
});
