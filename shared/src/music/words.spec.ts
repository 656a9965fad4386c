import { describe, expect, it } from 'vitest';
import { BUILT_IN_KINDS, builtInKind } from './instrument';
import { retuneSteps, TURNING_HABITS } from './retune-steps';
import { signedSemitones, stepWords } from './step-words';
import { parseTuning } from './tuning';
import type { Tuned } from './tuning';
import { capoWords, moveWords, pegName, pegNameInFull, retuneWords, turningOrder, turnWords } from './words';

const fiddle = builtInKind('fiddle')!;
const banjo = builtInKind('banjo')!;
const mandolin = builtInKind('mandolin')!;
const dulcimer = builtInKind('dulcimer')!;

function tuned(kindId: string, text: string): Tuned {
  const parsed = parseTuning(builtInKind(kindId)!, text);
  if (!parsed.ok) throw new Error(parsed.reason);
  return parsed.value;
}

describe('stepWords', () => {
  // look.md, "Words on screen": a half step, a whole step, 1½ steps; a semitone, a tone by locale.
  it.each([
    [1, 'a half step', 'a semitone'],
    [2, 'a whole step', 'a tone'],
    [3, '1½ steps', '1½ tones'],
    [4, '2 steps', '2 tones'],
    [-5, '2½ steps', '2½ tones'],
    [7, '3½ steps', '3½ tones'],
    [12, '6 steps', '6 tones'],
  ])('%i: %s', (semitones, steps, tones) => {
    expect(stepWords(semitones)).toBe(steps);
    expect(stepWords(semitones, 'tones')).toBe(tones);
  });

  it('has the number to stand behind', () => {
    expect([2, -2, 0].map(signedSemitones)).toEqual(['+2', '−2', '0']);
  });
});

describe('a peg', () => {
  it('keeps its letter, and is told from another of that letter', () => {
    expect(pegName(fiddle, 1)).toBe('D peg');
    expect(pegNameInFull(fiddle, 1)).toBe('D peg (3rd)');
    expect(pegName(banjo, 0)).toBe('g peg (5th)');
    expect(pegName(banjo, 1)).toBe('D peg (4th)');
    expect(pegName(banjo, 3)).toBe('B peg');
    expect(pegName(mandolin, 0)).toBe('G pegs');
    expect(pegName(dulcimer, 2)).toBe('D pegs (melody)');
  });

  it('is named like no other of its kind', () => {
    for (const kind of BUILT_IN_KINDS) {
      const names = kind.courses.map((_, index) => pegName(kind, index).toLowerCase());
      expect(new Set(names).size).toBe(names.length);
    }
  });

  it('that a kind has not is a programmer’s error', () => {
    expect(() => pegName(fiddle, 4)).toThrow(RangeError);
  });
});

describe('turnWords', () => {
  // look.md and score.md: "D peg (3rd): up a whole step, from D to E"; "the G peg: from A down to G".
  it.each([
    [fiddle, 1, 'D4', 'E4', 'D peg up a whole step, to E', 'D peg (3rd): up a whole step, from D to E'],
    [fiddle, 0, 'A3', 'G3', 'G peg down a whole step, to G', 'G peg (4th): down a whole step, from A to G'],
    [fiddle, 0, 'G3', 'D3', 'G peg down 2½ steps, to D', 'G peg (4th): down 2½ steps, from G to D'],
    [fiddle, 3, 'E5', 'C#5', 'E peg down 1½ steps, to C#', 'E peg (1st): down 1½ steps, from E to C#'],
    [banjo, 3, 'B3', 'C4', 'B peg up a half step, to C', 'B peg (2nd): up a half step, from B to C'],
    [
      banjo,
      1,
      'D3',
      'C3',
      'D peg (4th) down a whole step, to C',
      'D peg (4th): down a whole step, from D to C',
    ],
    [mandolin, 0, 'G3', 'A3', 'G pegs up a whole step, to A', 'G pegs (4th): up a whole step, from G to A'],
    [fiddle, 0, 'G3', 'G2', 'G peg down 6 steps, to G2', 'G peg (4th): down 6 steps, from G3 to G2'],
    [fiddle, 2, 'A4', 'A4', 'A peg stays at A', 'A peg (2nd): stays at A'],
    [mandolin, 2, 'A4', 'A4', 'A pegs stay at A', 'A pegs (2nd): stay at A'],
    [fiddle, 3, 'C#5', 'Db5', 'E peg stays at Db', 'E peg (1st): stays at Db'],
  ] as const)('$0.id course $1 from $2 to $3', (kind, course, from, to, short, full) => {
    expect(turnWords(kind, course, from, to)).toMatchObject({ short, full });
  });

  it('gives direction, semitones and number, and a form for a voice', () => {
    expect(turnWords(fiddle, 3, 'E5', 'C#5')).toMatchObject({
      direction: 'down',
      semitones: -3,
      number: '−3',
      spoken: 'E peg (1st): down 1½ steps, from E to C sharp',
    });
    expect(turnWords(banjo, 3, 'B3', 'Bb3').spoken).toBe('B peg (2nd): down a half step, from B to B flat');
    expect(turnWords(fiddle, 0, 'F##3', 'Abb3').spoken).toBe('G peg (4th): stays at A double flat');
    expect(turnWords(fiddle, 1, 'D4', 'E4', 'tones').full).toBe('D peg (3rd): up a tone, from D to E');
  });
});

describe('a whole retune in one line', () => {
  it('names first what comes down, then what goes up', () => {
    expect(turningOrder([2, 0, -2, -2])).toEqual([2, 3, 0]);
    const [from, to] = [tuned('fiddle', 'GDAE').pitches, tuned('fiddle', 'GDGD').pitches];
    expect(retuneWords(fiddle, from, to)).toBe(
      'A peg down a whole step, to G; E peg down a whole step, to D',
    );
    const calico = tuned('fiddle', 'AEAC#').pitches;
    expect(retuneWords(fiddle, from, calico)).toBe(
      'E peg down 1½ steps, to C#; G peg up a whole step, to A; D peg up a whole step, to E',
    );
    expect(retuneWords(fiddle, from, from)).toBe('');
  });

  it.each([
    [0, 2, 'capo on at fret 2'],
    [2, 4, 'capo from 2 to 4'],
    [2, 0, 'capo off'],
    [2, 2, ''],
  ])('a capo from %i to %i: %j', (from, to, words) => {
    expect(capoWords(from, to)).toBe(words);
  });

  it.each([
    ['gDGBD', 'gDGBD', 'nothing to turn'],
    ['gDGBD', 'gDGBD capo 2', 'capo on at fret 2'],
    ['gDGBD capo 2', 'gDGCD', 'capo off; B peg up a half step, to C'],
    ['gDGBD', 'gDGCD capo 2', 'B peg up a half step, to C; capo on at fret 2'],
    ['gDGBD capo 2', 'gDGCD capo 2', 'B peg up a half step, to C'],
  ])('banjo from %s to %s: %s', (from, to, words) => {
    expect(moveWords(banjo, tuned('banjo', from), tuned('banjo', to))).toBe(words);
  });
});

describe('a retune step by step', () => {
  // score.md, "Words of safety": the order. Spike fret = 5 + capo fret: F. Ford, frets.com (7 and 9 usual).
  it('takes the capo off first and puts it on last', () => {
    expect(retuneSteps(banjo, tuned('banjo', 'gDGBD capo 2'), tuned('banjo', 'gCGCD capo 4'))).toEqual([
      'Capo off. Fifth string out of its spike.',
      'D peg (4th): down a whole step, from D to C. A little under, then up to pitch.',
      'B peg (2nd): up a half step, from B to C. Slowly, from below.',
      'See that the bridge stands upright, and check all strings again: one moves the others.',
      'Capo on at fret 4. Fifth string under the spike at fret 9.',
    ]);
  });

  it('is one line for a capo alone, and nothing where nothing moves', () => {
    const open = tuned('banjo', 'gDGBD');
    expect(retuneSteps(banjo, open, { ...open, capo: 2 })).toEqual([
      'Capo on at fret 2. Fifth string under the spike at fret 7.',
    ]);
    expect(retuneSteps(banjo, { ...open, capo: 2 }, open)).toEqual([
      'Capo off. Fifth string out of its spike.',
    ]);
    expect(retuneSteps(banjo, open, open)).toEqual([]);
  });

  it('speaks of spikes and bridges only where there are any', () => {
    const guitar = builtInKind('guitar')!;
    const steps = retuneSteps(guitar, tuned('guitar', 'EADGBE capo 2'), tuned('guitar', 'DADGBE'));
    expect(steps).toEqual([
      'Capo off.',
      'E peg (6th): down a whole step, from E to D. A little under, then up to pitch.',
      'Check all strings again: one moves the others.',
    ]);
    expect(TURNING_HABITS.length).toBeGreaterThan(0);
  });
});
