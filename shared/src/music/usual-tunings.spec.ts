import { describe, expect, it } from 'vitest';
import { BUILT_IN_KINDS, builtInKind } from './instrument';
import type { Mode } from './mode';
import { modeFamily, MODES } from './mode';
import { parseTonic } from './pitch';
import { showTuned } from './tuning';
import { builtInUsual } from './usual-tunings';

function usual(kindId: string, tonic: string, mode: Mode): string {
  const tuned = builtInUsual(kindId, parseTonic(tonic)!.pitchClass, mode);
  return tuned === 'any' ? 'any' : showTuned(builtInKind(kindId)!, tuned);
}

describe('the built-in usual tunings', () => {
  // score.md, "Tunes": the built-in table.
  it.each([
    ['G', 'major', 'gDGBD'],
    ['A', 'major', 'gDGBD capo 2'],
    ['D', 'major', 'gCGCD capo 2'],
    ['C', 'major', 'gCGCD'],
    ['G', 'mixolydian', 'gDGBD'],
    ['A', 'mixolydian', 'gDGBD capo 2'],
    ['A', 'phrygian', 'gDGBD capo 2'],
    ['G', 'modal', 'gDGCD'],
    ['G', 'dorian', 'gDGCD'],
    ['G', 'minor', 'gDGCD'],
    ['G', 'aeolian', 'gDGCD'],
    ['A', 'modal', 'gDGCD capo 2'],
    ['A', 'minor', 'gDGCD capo 2'],
    ['D', 'dorian', 'gCGCD capo 2'],
    ['C', 'minor', 'any'],
    ['E', 'minor', 'any'],
    ['Bb', 'major', 'any'],
    ['G#', 'major', 'any'],
  ] as const)('banjo in %s %s: %s', (tonic, mode, expected) => {
    expect(usual('banjo', tonic, mode)).toBe(expected);
  });

  it('put four modes with minor and the others with major', () => {
    const minor = MODES.filter((mode) => modeFamily(mode) === 'minor');
    expect(minor.toSorted()).toEqual(['aeolian', 'dorian', 'minor', 'modal']);
    expect(modeFamily('mixolydian')).toBe('major');
  });

  it('leave a fiddle in GDAE in every key and every other kind as it stands', () => {
    for (const mode of MODES) {
      for (const tonic of ['C', 'C#', 'D', 'Eb', 'E', 'F', 'F#', 'G', 'Ab', 'A', 'Bb', 'B']) {
        expect(usual('fiddle', tonic, mode)).toBe('GDAE');
        for (const { id } of BUILT_IN_KINDS) {
          if (id !== 'fiddle' && id !== 'banjo') expect(usual(id, tonic, mode)).toBe('any');
        }
      }
    }
  });

  it('give the same for one sound under two names', () => {
    expect(usual('banjo', 'Cb', 'major')).toBe(usual('banjo', 'B', 'major'));
    expect(usual('banjo', 'B#', 'major')).toBe('gCGCD');
  });
});
