import fc from 'fast-check';
import { Note } from 'tonal';
import { describe, expect, it } from 'vitest';
import { centsBetween, frequencyOf, midiOf, noteOf, parsePitch, parseTonic, pitchOf } from './pitch';

describe('the pitch table', () => {
  // ISO 16:1975 (A4 = 440 Hz); MIDI note numbers and frequencies: J. Wolfe, UNSW Physics.
  it.each([
    ['C3', 48, 130.813],
    ['D3', 50, 146.832],
    ['E3', 52, 164.814],
    ['F3', 53, 174.614],
    ['F#3', 54, 184.997],
    ['G3', 55, 195.998],
    ['A3', 57, 220.0],
    ['C4', 60, 261.626],
    ['D4', 62, 293.665],
    ['E4', 64, 329.628],
    ['G4', 67, 391.995],
    ['A4', 69, 440.0],
    ['C5', 72, 523.251],
    ['C#5', 73, 554.365],
    ['D5', 74, 587.33],
    ['E5', 76, 659.255],
  ])('%s is MIDI %i and %f Hz', (name, midi, hertz) => {
    expect(midiOf(name)).toBe(midi);
    expect(frequencyOf(midi)).toBeCloseTo(hertz, 3);
  });

  it('spells and counts as tonal does, over every letter, accidental and octave', () => {
    for (const letter of 'CDEFGAB') {
      for (const accidental of ['', '#', 'b', '##', 'bb']) {
        for (let octave = 0; octave <= 9; octave += 1) {
          const name = `${letter}${accidental}${octave}`;
          const theirs = Note.midi(name);
          const ours = parsePitch(name);
          if (theirs === null || theirs > 127) expect(ours, name).toBeNull();
          else expect(ours, name).toMatchObject({ name, letter, accidental, octave, midi: theirs });
          if (ours) expect(frequencyOf(ours.midi)).toBeCloseTo(Note.freq(name)!, 6);
        }
      }
    }
  });

  it('moves every pitch with the reference A', () => {
    expect(frequencyOf(69, 415)).toBe(415);
    expect(frequencyOf(57, 466)).toBe(233);
  });
});

describe('cents', () => {
  // Pure fifths from A, as many fiddlers tune: facts.md, 1200 log2(f2 / f1).
  it.each([
    ['G3', 195.556, -3.9],
    ['D4', 293.333, -2.0],
    ['A4', 440, 0],
    ['E5', 660, 2.0],
  ])('puts a pure %s of %f Hz at %f cents', (name, hertz, cents) => {
    expect(centsBetween(frequencyOf(midiOf(name)), hertz)).toBeCloseTo(cents, 1);
  });

  it('has 1200 in an octave and counts down as minus', () => {
    expect(centsBetween(220, 440)).toBe(1200);
    expect(centsBetween(440, 220)).toBe(-1200);
  });
});

describe('parsePitch', () => {
  it.each([
    ['Bb3', 'Bb3', 58],
    ['c♯5', 'C#5', 73],
    ['E♭4', 'Eb4', 63],
    ['bb3', 'Bb3', 58],
    ['b3', 'B3', 59],
    [' A4 ', 'A4', 69],
    ['B#3', 'B#3', 60],
    ['Cb4', 'Cb4', 59],
  ])('reads %j as %s', (text, name, midi) => {
    expect(parsePitch(text)).toMatchObject({ name, midi });
  });

  it.each(['', 'H3', 'A', 'A10', 'A-1', 'A4 E5', '4A', 'A#b3', 'A###3', 'Cb0b', 'G##9', 'B9', '♯5'])(
    'does not read %j',
    (text) => {
      expect(parsePitch(text)).toBeNull();
    },
  );

  it('never throws, and gives a name that reads back as itself', () => {
    fc.assert(
      fc.property(fc.string(), (text) => {
        const pitch = parsePitch(text);
        if (pitch) expect(parsePitch(pitch.name)).toEqual(pitch);
      }),
    );
  });

  it('is a programmer’s error where a known pitch is none', () => {
    expect(() => pitchOf('GDAE')).toThrow(RangeError);
    expect(() => midiOf('')).toThrow(RangeError);
  });
});

describe('noteOf', () => {
  it('leaves the octave off', () => {
    expect(noteOf('C#5')).toBe('C#');
  });
});

describe('parseTonic', () => {
  it.each([
    ['A', 'A', 9],
    ['Bb', 'Bb', 10],
    ['A#', 'A#', 10],
    ['f♯', 'F#', 6],
    ['Cb', 'Cb', 11],
    ['B#', 'B#', 0],
  ])('reads %s', (text, name, pitchClass) => {
    expect(parseTonic(text)).toEqual({ name, pitchClass });
  });

  it.each(['', 'H', 'A##', 'Am', 'none', 'A4', 'AB'])('does not read %j', (text) => {
    expect(parseTonic(text)).toBeNull();
  });
});
