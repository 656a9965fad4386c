import { describe, expect, it } from 'vitest';
import { centsFromEqual, FIFTH_WIDER, targetFrequency } from './temperament';

describe('pure fifths from A', () => {
  // The ratios 3:2 themselves: 440 / 1.5 / 1.5, 440 / 1.5, 440, 440 x 1.5; -3.9, -2.0, 0, +2.0 cents from equal.
  it.each([
    ['G3', 55, 195.556, -3.9],
    ['D4', 62, 293.333, -2.0],
    ['A4', 69, 440, 0],
    ['E5', 76, 660, 2.0],
  ])('%s', (_, midi, hertz, cents) => {
    expect(targetFrequency(midi, 440, 'fifths')).toBeCloseTo(hertz, 3);
    expect(centsFromEqual(midi, 'fifths')).toBeCloseTo(cents, 1);
  });

  it('keep their octaves, and leave what is far from A alone', () => {
    expect(targetFrequency(57, 440, 'fifths')).toBeCloseTo(220, 9);
    expect(targetFrequency(64, 440, 'fifths')).toBeCloseTo(330, 9);
    expect(centsFromEqual(73, 'fifths')).toBe(0);
    expect(FIFTH_WIDER).toBeCloseTo(1.955, 3);
  });
});

describe('equal temperament', () => {
  // ISO 16:1975 for 440; MIDI numbers and formula: J. Wolfe, UNSW Physics.
  it('is the table of pitches, higher or lower with the A of the room', () => {
    expect(targetFrequency(55, 440, 'equal')).toBeCloseTo(195.998, 3);
    expect(targetFrequency(69, 415, 'equal')).toBe(415);
    expect(targetFrequency(81, 466, 'equal')).toBeCloseTo(932, 9);
  });
});
