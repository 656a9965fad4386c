import { describe, expect, it } from 'vitest';
import { BUILT_IN_KINDS, builtInKind } from './instrument';
import type { Mode } from './mode';
import { MODES } from './mode';
import { parseTonic } from './pitch';
import { showTuned } from './tuning';
import { BUILT_IN_USUAL, builtInUsual, usualFrom } from './usual-tunings';

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

  it('compare tonics by sound, and a circle’s own rows go first', () => {
    const own = [
      {
        kind: 'fiddle',
        tonic: 'A#',
        modes: ['major'],
        tuned: { pitches: ['F3', 'C4', 'G4', 'D5'], capo: 0 },
      },
      ...BUILT_IN_USUAL,
    ] as const;
    expect(usualFrom(own, 'fiddle', 10, 'major')).toBe(own[0].tuned);
    expect(usualFrom(own, 'fiddle', 10, 'minor')).toBe(builtInUsual('fiddle', 10, 'minor'));
  });
});
