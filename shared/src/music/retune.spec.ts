import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { builtInKind, standardPitches } from './instrument';
import { retune } from './retune';
import { parseTuning } from './tuning';

const fiddle = builtInKind('fiddle')!;
const banjo = builtInKind('banjo')!;

function between(id: string, from: string, to: string): ReturnType<typeof retune> {
  const kind = builtInKind(id)!;
  const [start, end] = [parseTuning(kind, from), parseTuning(kind, to)];
  if (!start.ok || !end.ok) throw new Error(`${from} or ${to} could not be read`);
  return retune(kind, start.value.pitches, end.value.pitches);
}

describe('the retune of a fiddle', () => {
  // facts.md, "Fiddle tunings": changes from GDAE (Wikipedia "Cross tuning"; waxandwane.org; fiddletails.com).
  it.each([
    ['GDAE', [0, 0, 0, 0]],
    ['ADAE', [2, 0, 0, 0]],
    ['AEAE', [2, 2, 0, 0]],
    ['GDGD', [0, 0, -2, -2]],
    ['GDAD', [0, 0, 0, -2]],
    ['DDAD', [-5, 0, 0, -2]],
    ['AEAC#', [2, 2, 0, -3]],
    ['AEAD', [2, 2, 0, -2]],
    ['EDAE', [-3, 0, 0, 0]],
    ['EEAE', [-3, 2, 0, 0]],
    ['FCGD', [-2, -2, -2, -2]],
    ['GDGB', [0, 0, -2, -5]],
    ['ADAD', [2, 0, 0, -2]],
  ])('from GDAE to %s is %j', (to, deltas) => {
    expect(between('fiddle', 'GDAE', to).deltas).toEqual(deltas);
  });

  // facts.md, "Retune check", strings / semitones; the same both ways.
  it.each([
    ['GDAE', 'ADAE', 1, 2],
    ['GDAE', 'AEAE', 2, 4],
    ['GDAE', 'GDGD', 2, 4],
    ['GDAE', 'DDAD', 2, 7],
    ['GDAE', 'AEAC#', 3, 7],
    ['ADAE', 'AEAE', 1, 2],
    ['ADAE', 'GDGD', 3, 6],
    ['AEAE', 'GDGD', 4, 8],
    ['AEAE', 'AEAC#', 1, 3],
    ['AEAC#', 'AEAD', 1, 1],
    ['GDAD', 'DDAD', 1, 5],
    ['AEAE', 'DDAD', 3, 11],
  ])('%s - %s turns %i strings by %i semitones', (from, to, pegChanges, semitones) => {
    expect(between('fiddle', from, to)).toMatchObject({ pegChanges, semitones });
    expect(between('fiddle', to, from)).toMatchObject({ pegChanges, semitones });
  });
});

describe('the retune of a banjo', () => {
  // facts.md, "Five-string banjo", pairs.
  it.each([
    ['gDGBD', 'gDGCD', 1, 1],
    ['gDGBD', 'gCGBD', 1, 2],
    ['gDGBD', 'gCGCD', 2, 3],
    ['gCGCD', 'gCGBD', 1, 1],
    ['gCGCD', 'gDGCD', 1, 2],
    ['gDGBD', 'aDF#AD', 3, 5],
    ['gCGCD', 'aDF#AD', 4, 8],
  ])('%s - %s turns %i strings by %i semitones', (from, to, pegChanges, semitones) => {
    expect(between('banjo', from, to)).toMatchObject({ pegChanges, semitones });
  });
});

describe('doubled courses', () => {
  // score.md, "Retune": peg changes and semitones count pegs.
  it('count each peg', () => {
    expect(between('mandolin', 'GDAE', 'AEAE')).toEqual({
      deltas: [2, 2, 0, 0],
      pegChanges: 4,
      semitones: 8,
    });
    expect(between('dulcimer', 'DAD', 'DAC')).toEqual({ deltas: [0, 0, -2], pegChanges: 2, semitones: 4 });
  });
});

describe('the eight tunings in every order', () => {
  // facts.md, "Best order of one tune each": all 8! orders.
  const names = ['GDAE', 'ADAE', 'AEAE', 'GDGD', 'DDAD', 'AEAC#', 'GDAD', 'AEAD'];
  const table = names.map((from) => names.map((to) => between('fiddle', from, to)));

  function extremes(
    measure: 'pegChanges' | 'semitones',
    fromStandard: boolean,
  ): { best: number; worst: number } {
    let best = Infinity;
    let worst = 0;
    let orders = 0;
    const visit = (last: number | null, left: readonly number[], cost: number): void => {
      if (left.length === 0) {
        orders += 1;
        best = Math.min(best, cost);
        worst = Math.max(worst, cost);
      }
      for (const next of left) {
        const step = last === null ? 0 : table[last]![next]![measure];
        visit(
          next,
          left.filter((other) => other !== next),
          cost + step,
        );
      }
    };
    visit(
      fromStandard ? 0 : null,
      names.map((_, index) => index),
      0,
    );
    expect(orders).toBe(40320);
    return { best, worst };
  }

  it('turn at least 8 strings, from a free start or from GDAE, and 21 at worst from a free start', () => {
    expect(extremes('pegChanges', false)).toEqual({ best: 8, worst: 21 });
    expect(extremes('pegChanges', true).best).toBe(8);
  });

  it('turn at least 18 semitones from a free start, 21 from GDAE', () => {
    expect(extremes('semitones', false).best).toBe(18);
    expect(extremes('semitones', true).best).toBe(21);
  });
});

describe('any retune', () => {
  const tuning = fc.tuple(
    ...standardPitches(fiddle).map((name) =>
      fc.constantFrom('A', 'D', 'F#', 'Bb').map((note) => note + name.slice(-1)),
    ),
  );

  it('goes back as it came, is nothing to itself, and is no longer by a tuning between', () => {
    fc.assert(
      fc.property(tuning, tuning, tuning, (a, b, c) => {
        const there = retune(fiddle, a, b);
        const back = retune(fiddle, b, a);
        expect(back.deltas.map((delta) => 0 - delta)).toEqual(there.deltas);
        expect(back.pegChanges).toBe(there.pegChanges);
        expect(retune(fiddle, a, a)).toEqual({ deltas: [0, 0, 0, 0], pegChanges: 0, semitones: 0 });
        const straight = retune(fiddle, a, c);
        const around = retune(fiddle, b, c);
        expect(straight.pegChanges).toBeLessThanOrEqual(there.pegChanges + around.pegChanges);
        expect(straight.semitones).toBeLessThanOrEqual(there.semitones + around.semitones);
      }),
    );
  });

  it('between tunings of another number of strings is a programmer’s error', () => {
    expect(() => retune(banjo, ['G3'], ['G3'])).toThrow(RangeError);
  });
});
