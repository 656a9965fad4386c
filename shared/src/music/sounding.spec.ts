import { describe, expect, it } from 'vitest';
import { builtInKind } from './instrument';
import { NAMED_TUNINGS } from './named-tunings';
import { midiOf } from './pitch';
import { soundingPitches, soundsAs } from './sounding';
import { parseTuning } from './tuning';
import { namedTuning } from './tuning-names';

const banjo = builtInKind('banjo')!;
const fiddle = builtInKind('fiddle')!;

describe('what sounds with a capo', () => {
  // facts.md: "double D" aDADE, "A modal" aEADE, "open A" aEAC#E are double C, sawmill, open G with capo 2.
  it.each([
    ['gCGCD', 'aDADE'],
    ['gDGCD', 'aEADE'],
    ['gDGBD', 'aEAC#E'],
    ['gDGBbD', 'aEACE'],
  ])('%s with capo 2 sounds %s', (short, sounding) => {
    const open = parseTuning(banjo, short);
    expect(open.ok && soundsAs(banjo, { ...open.value, capo: 2 })).toBe(sounding);
  });

  it('is each string raised by the fret, and what stands without one', () => {
    const pitches = ['G4', 'D3', 'G3', 'B3', 'D4'];
    expect(soundingPitches({ pitches, capo: 2 })).toEqual(['A4', 'E3', 'A3', 'C#4', 'E4']);
    expect(soundingPitches({ pitches, capo: 0 })).toBe(pitches);
    expect(soundingPitches({ pitches: ['A#3', 'F#4'], capo: 4 })).toEqual(['D4', 'A#4']);
  });

  // From fret 4 on an a for the fifth lies a tritone above G4 and is read below it.
  it('is read back as the tuning with its capo, for every named banjo tuning up to fret 3', () => {
    for (const { pitches } of NAMED_TUNINGS['banjo']!) {
      for (let capo = 1; capo <= 3; capo += 1) {
        const sounding = soundingPitches({ pitches, capo });
        expect(sounding.map(midiOf)).toEqual(pitches.map((name) => midiOf(name) + capo));
        const back = parseTuning(banjo, soundsAs(banjo, { pitches, capo }));
        expect(back).toEqual({ ok: true, value: { pitches, capo } });
      }
    }
  });
});

describe('the name of a tuning', () => {
  // Wikipedia "Cross tuning"; waxandwane.org: names are aliases, and one name can mean two tunings.
  it('goes by pitch, as it sounds', () => {
    expect(namedTuning(fiddle, ['A3', 'E4', 'A4', 'Db5'])?.names).toEqual(['calico', 'open A']);
    expect(namedTuning(fiddle, ['A3', 'E4', 'A4', 'B4'])).toBeUndefined();
    expect(namedTuning(fiddle, ['G3', 'D4', 'G4', 'D5'])?.names).toContain('sawmill');
    expect(namedTuning(banjo, ['G4', 'D3', 'G3', 'C4', 'D4'])?.names).toContain('sawmill');
    const highBass = NAMED_TUNINGS['fiddle']!.filter(({ names }) => names.includes('high bass'));
    expect(highBass).toHaveLength(2);
  });

  it('has a source or says that it has none, for every built-in tuning', () => {
    for (const named of Object.values(NAMED_TUNINGS).flat()) expect(named.provenance).not.toBe('');
  });
});
