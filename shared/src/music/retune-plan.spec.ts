import { describe, expect, it } from 'vitest';
import { BUILT_IN_KINDS, builtInKind, hasLeastMargin, type InstrumentKind } from './instrument';
import { NAMED_TUNINGS } from './named-tunings';
import { midiOf } from './pitch';
import { retunePlan, type RetuneStep, type TurnStep } from './retune-plan';
import { parseTuning, type Tuned } from './tuning';
import { pegNameInFull, turnWords } from './words';

const fiddle = builtInKind('fiddle')!;
const tuned = (kind: InstrumentKind, text: string): Tuned => {
  const parsed = parseTuning(kind, text);
  if (!parsed.ok) throw new Error(parsed.reason);
  return parsed.value;
};
const isTurn = (step: RetuneStep): step is TurnStep => step.type === 'turn';

/** Every tuning of the catalogue to every other of its kind, with and without a capo. */
const PAIRS = BUILT_IN_KINDS.flatMap((kind) => {
  const all = (NAMED_TUNINGS[kind.id] ?? []).flatMap(({ pitches }): Tuned[] => [
    { pitches, capo: 0 },
    { pitches, capo: 2 },
  ]);
  return all.flatMap((from) => all.map((to) => ({ kind, from, to })));
});

describe('a retune in steps', () => {
  it('takes the capo off, then down, then up, then checks, then puts the capo on', () => {
    const steps = retunePlan(
      fiddle,
      { ...tuned(fiddle, 'GDAE'), capo: 1 },
      { ...tuned(fiddle, 'AEAC#'), capo: 2 },
    );
    expect(steps.map((step) => (isTurn(step) ? `${step.from} ${step.to}` : step.type))).toEqual([
      'capo',
      'E5 C#5',
      'G3 A3',
      'D4 E4',
      'check',
      'capo',
    ]);
  });

  // score.md, words of safety: any step of more than 3 semitones in two goes, with a rest.
  it('takes a long way in two goes', () => {
    const [down] = retunePlan(fiddle, tuned(fiddle, 'GDAE'), tuned(fiddle, 'DDAD')).filter(isTurn);
    expect(down).toMatchObject({ from: 'G3', to: 'D3', goes: [52, 50] });
  });

  it('carries the caution of its string, stricter for gut', () => {
    const plan = (gut: boolean) =>
      retunePlan(fiddle, tuned(fiddle, 'GDAE'), tuned(fiddle, 'AEAE'), { gut }).filter(isTurn);
    expect(plan(false).map(({ caution }) => caution?.grade)).toEqual(['note', 'note']);
    expect(plan(true).map(({ caution }) => caution?.grade)).toEqual(['caution', 'caution']);
  });

  it('has pairs to be tried', () => expect(PAIRS.length).toBeGreaterThan(800));

  it('ends in the tuning asked for, whatever the pair', () => {
    for (const { kind, from, to } of PAIRS) {
      const strings = from.pitches.map(midiOf);
      let { capo } = from;
      for (const step of retunePlan(kind, from, to)) {
        if (step.type === 'capo') capo = step.to;
        if (isTurn(step)) strings[step.courseIndex] = step.goes.at(-1)!;
      }
      expect({ strings, capo }).toEqual({ strings: to.pitches.map(midiOf), capo: to.capo });
    }
  });

  it('takes no string past where it ends, nor turns one under a capo', () => {
    for (const { kind, from, to } of PAIRS) {
      let { capo } = from;
      for (const step of retunePlan(kind, from, to)) {
        if (step.type === 'capo') capo = step.to;
        if (!isTurn(step)) continue;
        expect(capo).toBe(0);
        const ends = [midiOf(step.from), midiOf(step.to)];
        for (const go of step.goes) {
          expect(go).toBeGreaterThanOrEqual(Math.min(...ends));
          expect(go).toBeLessThanOrEqual(Math.max(...ends));
        }
        const path = [ends[0]!, ...step.goes];
        expect(
          Math.max(...path.slice(1).map((midi, index) => Math.abs(midi - path[index]!))),
        ).toBeLessThanOrEqual(Math.max(3, Math.ceil(Math.abs(ends[1]! - ends[0]!) / 2)));
      }
    }
  });

  // score.md: never several slack at once. Each string that comes down is at its pitch before the next is touched.
  it('turns each string once, those that come down first', () => {
    for (const { kind, from, to } of PAIRS) {
      const turns = retunePlan(kind, from, to).filter(isTurn);
      expect(new Set(turns.map(({ courseIndex }) => courseIndex)).size).toBe(turns.length);
      const firstUp = turns.findIndex(({ direction }) => direction === 'up');
      if (firstUp !== -1)
        expect(turns.slice(firstUp).every(({ direction }) => direction === 'up')).toBe(true);
    }
  });

  // score.md, words of safety: the limits per string.
  it('warns of every raise above standard that score.md warns of', () => {
    for (const { kind, from, to } of PAIRS) {
      for (const step of retunePlan(kind, from, to).filter(isTurn)) {
        const above = midiOf(step.to) - midiOf(kind.courses[step.courseIndex]!.standard);
        const limit = hasLeastMargin(kind, step.courseIndex) ? 1 : 2;
        const warned = step.caution !== null && step.caution.grade !== 'none';
        expect(warned).toBe(step.direction === 'up' && above >= limit);
      }
    }
  });

  it('never renames a peg', () => {
    for (const { kind, from, to } of PAIRS) {
      for (const step of retunePlan(kind, from, to).filter(isTurn)) {
        const { full } = turnWords(kind, step.courseIndex, step.from, step.to);
        expect(full.startsWith(`${pegNameInFull(kind, step.courseIndex)}: `)).toBe(true);
      }
    }
  });
});
