import { describe, expect, it } from 'vitest';
import { frequencyOf, midiOf } from './pitch';
import { NEWTONS_PER_POUND, stringTension, stringTensionPounds, tensionRatio, tensionWords } from './tension';

describe('the ratio of tensions', () => {
  // Mersenne's law; score.md, "Retune": 2^(d/6).
  it.each([
    [1, 1.122462, '+12.2 %'],
    [2, 1.259921, '+26.0 %'],
    [3, 1.414214, '+41.4 %'],
    [-2, 0.793701, '−20.6 %'],
    [-5, 0.561231, '−43.9 %'],
    [0, 1, '+0.0 %'],
  ])('of %i semitones is %f', (semitones, ratio, words) => {
    expect(tensionRatio(semitones)).toBeCloseTo(ratio, 6);
    expect(tensionWords(semitones)).toBe(words);
  });

  // D'Addario's published chart, to 0.1 lb: the ratio lies between those of the unrounded tensions.
  it.each([
    ['J6902B', 'B3', 11.9, 'C4', 13.3],
    ['J6904B', 'D3', 12.3, 'C3', 9.7],
    ['J6905B', 'G4', 11.0, 'A4', 13.9],
  ])('is that of the published chart: %s from %s (%f lb) to %s (%f lb)', (_, from, start, to, end) => {
    const ratio = tensionRatio(midiOf(to) - midiOf(from));
    expect(ratio).toBeGreaterThan((end - 0.05) / (start + 0.05));
    expect(ratio).toBeLessThan((end + 0.05) / (start - 0.05));
  });
});

describe('string tension', () => {
  // D'Addario, "A complete technical reference for fretted instrument string tensions"; scales in inches.
  it.each([
    ['guitar PL010', 0.00002215, 25.5, 'E4', 16.2],
    ['guitar PL013', 0.00003744, 25.5, 'B3', 15.4],
    ['guitar NW046', 0.00038216, 25.5, 'E2', 17.5],
    ['guitar PB032', 0.00021018, 25.5, 'D3', 30.5],
    ['banjo J6902B', 0.0000268, 26.5, 'B3', 11.9],
    ['banjo J6902B', 0.0000268, 26.5, 'C4', 13.3],
    ['banjo J6904B', 0.0000783, 26.5, 'D3', 12.3],
    ['banjo J6904B', 0.0000783, 26.5, 'C3', 9.7],
    ['banjo J6905B', 0.00001794, 19.625, 'G4', 11.0],
    ['banjo J6905B', 0.00001794, 19.625, 'A4', 13.9],
    ['mandolin J7401', 0.0000268, 13.875, 'E5', 23.2],
    ['mandolin J7404', 0.0003285, 13.875, 'G3', 25.1],
  ])('of %s (%f lb/in, %f in) at %s is %f lb', (_, unitWeight, scale, pitch, pounds) => {
    const tension = stringTensionPounds(unitWeight, scale, frequencyOf(midiOf(pitch)));
    expect(Math.abs(tension - pounds)).toBeLessThan(0.06);
  });

  // gperciva/artifastring, violin II (research data, not a maker's chart): within 2.5 %.
  it.each([
    ['G3', 60.9, 0.00386, 0.321],
    ['D4', 69.6, 0.00193, 0.324],
    ['A4', 52.6, 0.000661, 0.32],
    ['E5', 75.1, 0.000418, 0.32],
  ])('of a violin %s is %f N', (pitch, newtons, mass, length) => {
    const tension = stringTension(mass, length, frequencyOf(midiOf(pitch)));
    expect(Math.abs(tension / newtons - 1)).toBeLessThan(0.025);
  });

  it('is the same in either unit', () => {
    // To 0.1 %: the chart's formula has gravity as 386.4 in/s2, which is 386.09.
    const inch = 0.0254;
    const pound = 0.45359237;
    const newtons = stringTension((0.0000268 * pound) / inch, 26.5 * inch, 246.942);
    expect(newtons / NEWTONS_PER_POUND / stringTensionPounds(0.0000268, 26.5, 246.942)).toBeCloseTo(1, 2);
  });

  it('rises by the ratio when the pitch does', () => {
    const low = stringTension(0.000661, 0.32, frequencyOf(69));
    expect(stringTension(0.000661, 0.32, frequencyOf(71)) / low).toBeCloseTo(tensionRatio(2), 9);
  });
});
