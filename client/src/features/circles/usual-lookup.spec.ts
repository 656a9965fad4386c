import type { UsualTuning } from '@pegwell/shared/contract/circles';
import { describe, expect, it } from 'vitest';
import { usualTuning } from './usual-lookup';

describe('what a kind usually has', () => {
  // score.md, "Tunes": the built-in usual tunings.
  it.each([
    ['fiddle', 'A', 'modal', 'GDAE'],
    ['banjo', 'G', 'major', 'gDGBD'],
    ['banjo', 'A', 'mixolydian', 'gDGBD capo 2'],
    ['banjo', 'D', 'dorian', 'gCGCD capo 2'],
    ['banjo', 'C', 'major', 'gCGCD'],
    ['banjo', 'A', 'aeolian', 'gDGCD capo 2'],
    ['banjo', 'E', 'major', 'any'],
    ['guitar', 'G', 'major', 'any'],
  ] as const)('%s in %s %s: %s', (kind, key, mode, tuning) => {
    expect(usualTuning([], kind, key, mode)).toBe(tuning);
  });

  const own = (key: string | null, family: UsualTuning['family'], tuning: string): UsualTuning => ({
    ...{ kind: 'banjo', key, family, tuning, own: true },
  });

  it('goes by the circle’s own row for the key, however the tonic is spelled', () => {
    expect(usualTuning([own('A#', 'major', 'gDGBD capo 3')], 'banjo', 'Bb', 'major')).toBe('gDGBD capo 3');
  });

  it('puts the circle’s own default before the built-in keys, and its own keys before that', () => {
    const rows = [own(null, null, 'gCGBD'), own('A', 'major', 'gDGBD capo 2')];
    expect(usualTuning(rows, 'banjo', 'G', 'major')).toBe('gCGBD');
    expect(usualTuning(rows, 'banjo', 'A', 'lydian')).toBe('gDGBD capo 2');
  });

  it('takes a row that is shown but built in for no row of the circle’s', () => {
    const shown = { ...own('A', 'major', 'gCGCD'), own: false };
    expect(usualTuning([shown], 'banjo', 'A', 'major')).toBe('gDGBD capo 2');
  });
});
