import type { UsualTuning } from '@pegwell/shared/contract/circles';
import { describe, expect, it } from 'vitest';
import { rowsOf, rowsToStore, type UsualRow } from './usual-rows';

const row = (key: string | null, family: UsualRow['family'], tuning: string): UsualRow => ({
  key,
  family,
  tuning,
});
const shown = (kind: string, each: UsualRow, own: boolean): UsualTuning => ({ kind, ...each, own });

describe('the rows of one kind', () => {
  it('leave out built-in keys that the circle’s own default hides', () => {
    const items = [
      shown('banjo', row(null, null, 'gCGBD'), true),
      shown('banjo', row('G', 'major', 'gDGBD'), false),
      shown('banjo', row('A', 'major', 'gDGBD capo 2'), true),
    ];
    expect(rowsOf(items, 'banjo').map(({ key }) => key)).toEqual([null, 'A']);
  });
});

describe('the rows to store', () => {
  const builtIn = [row(null, null, 'any'), row('G', 'major', 'gDGBD')];

  it('are none where all is as built in, however it is written', () => {
    const edited = [row(null, null, ' ANY '), row('G', 'major', 'g D G B D')];
    expect(rowsToStore([], 'banjo', edited)).toEqual({ rows: [], places: [-1, -1] });
  });

  it('keep what the circle has of other kinds', () => {
    const fiddle = shown('fiddle', row('A', 'major', 'AEAE'), true);
    const builtInFiddle = shown('fiddle', row(null, null, 'GDAE'), false);
    const { rows } = rowsToStore([fiddle, builtInFiddle], 'banjo', builtIn);
    expect(rows).toEqual([{ kind: 'fiddle', key: 'A', family: 'major', tuning: 'AEAE' }]);
  });

  it('say where each edited row stands among them', () => {
    const edited = [...builtIn, row('A', 'minor', 'gDGBD'), row('E', 'minor', 'gDGBD capo 4')];
    expect(rowsToStore([], 'banjo', edited).places).toEqual([-1, -1, 0, 1]);
  });

  it('hold a built-in key fast beside a default of the circle’s own, which would hide it', () => {
    const edited = [row(null, null, 'gCGBD'), row('G', 'major', 'gDGBD'), row('C', 'major', 'gCGBD')];
    const { rows, places } = rowsToStore([], 'banjo', edited);
    expect(rows.map(({ key }) => key)).toEqual([null, 'G']);
    expect(places).toEqual([0, 1, -1]);
  });
});
