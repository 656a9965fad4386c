import { describe, expect, it } from 'vitest';
import type { InstrumentKind } from './instrument';
import { BUILT_IN_KINDS, builtInKind, hasLeastMargin, standardPitches } from './instrument';
import { NAMED_TUNINGS } from './named-tunings';
import { parsePitch } from './pitch';

describe('the built-in kinds', () => {
  // score.md, "Pitch and tuning": courses x pegs; facts.md, "Other instruments": standard pitches.
  it.each([
    ['fiddle', 'G3 D4 A4 E5', [1, 1, 1, 1]],
    ['banjo', 'G4 D3 G3 B3 D4', [1, 1, 1, 1, 1]],
    ['guitar', 'E2 A2 D3 G3 B3 E4', [1, 1, 1, 1, 1, 1]],
    ['mandolin', 'G3 D4 A4 E5', [2, 2, 2, 2]],
    ['tenor-banjo', 'G2 D3 A3 E4', [1, 1, 1, 1]],
    ['bouzouki', 'G2 D3 A3 D4', [2, 2, 2, 2]],
    ['ukulele', 'G4 C4 E4 A4', [1, 1, 1, 1]],
    ['dulcimer', 'D3 A3 D4', [1, 1, 2]],
    ['bass', 'E1 A1 D2 G2', [1, 1, 1, 1]],
  ])('%s stands %s', (id, pitches, pegs) => {
    const kind = builtInKind(id)!;
    expect(standardPitches(kind).join(' ')).toBe(pitches);
    expect(kind.courses.map((course) => course.pegs)).toEqual(pegs);
    expect(NAMED_TUNINGS[id]![0]!.pitches.join(' ')).toBe(pitches);
  });

  it('are all of those, with pitches that can be read and ordinals that differ', () => {
    expect(BUILT_IN_KINDS).toHaveLength(9);
    for (const kind of BUILT_IN_KINDS) {
      expect(new Set(kind.courses.map(({ ordinal }) => ordinal)).size).toBe(kind.courses.length);
      for (const { standard } of kind.courses) expect(parsePitch(standard)).not.toBeNull();
    }
  });

  it('name pegs by the letter of the standard pitch, a banjo’s fifth in lower case', () => {
    expect(builtInKind('fiddle')!.courses.map(({ name, ordinal }) => `${ordinal} ${name}`)).toEqual([
      '4th G',
      '3rd D',
      '2nd A',
      '1st E',
    ]);
    expect(builtInKind('banjo')!.courses.map(({ name }) => name)).toEqual(['g', 'D', 'G', 'B', 'D']);
    expect(builtInKind('kazoo')).toBeUndefined();
  });
});

describe('the courses with the least margin', () => {
  // score.md, "Words of safety": fiddle and mandolin E, guitar first, banjo first and fifth.
  it.each([
    ['fiddle', [3]],
    ['mandolin', [3]],
    ['guitar', [5]],
    ['banjo', [0, 4]],
    ['bass', []],
    ['ukulele', []],
  ])('%s: %j', (id, expected) => {
    const kind = builtInKind(id)!;
    expect(kind.courses.flatMap((_, index) => (hasLeastMargin(kind, index) ? [index] : []))).toEqual(
      expected,
    );
  });

  it('are the highest ones where a circle’s own kind does not say', () => {
    const own: InstrumentKind = {
      id: 'own',
      name: 'Cigar box',
      plural: 'Cigar boxes',
      courses: [
        { standard: 'G4', pegs: 1, name: 'G', ordinal: '3rd' },
        { standard: 'D4', pegs: 1, name: 'D', ordinal: '2nd' },
        { standard: 'G3', pegs: 1, name: 'G', ordinal: '1st' },
      ],
    };
    expect(own.courses.map((_, index) => hasLeastMargin(own, index))).toEqual([true, false, false]);
    expect(hasLeastMargin(own, 7)).toBe(false);
  });
});
