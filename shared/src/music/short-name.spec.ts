import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { midiOf } from './pitch';
import { nearestPitch, readNotes, spelled } from './short-name';

const notes = (text: string, count: number): string => {
  const reading = readNotes(text, count);
  return reading.ok
    ? reading.notes.map(spelled).join(' ')
    : `${reading.before.map(spelled).join(' ')} | ${reading.unread}`;
};

describe('readNotes', () => {
  it.each([
    ['GDAE', 4, 'G D A E'],
    ['gdae', 4, 'G D A E'],
    ['A E-A  C#', 4, 'A E A C#'],
    ['AEAC♯', 4, 'A E A C#'],
    ['GDGB♭D', 5, 'G D G Bb D'],
    // b after a letter alters it ...
    ['gDGBbD', 5, 'G D G Bb D'],
    ['AbEAE', 4, 'Ab E A E'],
    ['bbDGBD', 5, 'Bb D G B D'],
    // ... and is a string where only that gives the right number ...
    ['gdgbd', 5, 'G D G B D'],
    ['eadgbe', 6, 'E A D G B E'],
    ['bbbb', 4, 'B B B B'],
    // ... those that stand earlier altering first ...
    ['bbb', 2, 'Bb B'],
    ['bbbb', 3, 'Bb B B'],
    ['gdgbbd', 5, 'G D Gb B D'],
    // ... but never across a space or hyphen, as a capital or as the sign.
    ['g d g b d', 5, 'G D G B D'],
    ['g-b', 1, 'G B'],
    ['GB', 1, 'G B'],
    ['G♭BD', 4, 'Gb B D'],
    // Another number of notes is given as it is first read.
    ['GDA', 4, 'G D A'],
    ['', 4, ''],
  ])('reads %j for %i strings as %j', (text, count, expected) => {
    expect(notes(text, count)).toBe(expected);
  });

  it.each([
    ['GDHE', 'G D | H'],
    ['GD?!AE', 'G D | ?!'],
    ['#GDAE', ' | #'],
    ['G D A E #', 'G D A E | #'],
    ['GDA##E', 'G D A# | #'],
  ])('says of %j what could not be read', (text, expected) => {
    expect(notes(text, 4)).toBe(expected);
  });

  it('stays quick on long runs of b', () => {
    const started = performance.now();
    readNotes('b b'.repeat(40), 24);
    readNotes('b'.repeat(120), 24);
    readNotes(`${'b'.repeat(47)} b`, 24);
    expect(performance.now() - started).toBeLessThan(1000);
  });
});

describe('nearestPitch', () => {
  // score.md, "Reading a short name": the examples, and the lower one at exactly 6.
  it.each([
    ['D', '', 'G3', 'D3'],
    ['F', '', 'G3', 'F3'],
    ['E', '', 'G3', 'E3'],
    ['C', '', 'D4', 'C4'],
    ['C', '', 'D3', 'C3'],
    ['C', '#', 'G3', 'C#3'],
    ['D', 'b', 'G3', 'Db3'],
    ['B', '#', 'C4', 'B#3'],
    ['C', 'b', 'B3', 'Cb4'],
  ] as const)('%s%s nearest to %s is %s', (letter, accidental, standard, expected) => {
    expect(nearestPitch([letter, accidental], standard)?.name).toBe(expected);
  });

  it('lies from 6 below to 5 above the standard pitch', () => {
    const letter = fc.constantFrom(...(['C', 'D', 'E', 'F', 'G', 'A', 'B'] as const));
    const standard = fc
      .tuple(letter, fc.integer({ min: 1, max: 7 }))
      .map(([name, octave]) => `${name}${octave}`);
    fc.assert(
      fc.property(
        letter,
        fc.constantFrom('' as const, '#' as const, 'b' as const),
        standard,
        (name, sign, near) => {
          const distance = nearestPitch([name, sign], near)!.midi - midiOf(near);
          expect(distance).toBeGreaterThanOrEqual(-6);
          expect(distance).toBeLessThanOrEqual(5);
        },
      ),
    );
  });

  it('is none where it could not be written', () => {
    expect(nearestPitch(['A', ''], 'C0')).toBeNull();
  });
});
