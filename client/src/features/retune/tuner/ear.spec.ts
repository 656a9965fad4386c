import { describe, expect, it } from 'vitest';
import { centsBetween, frequencyOf } from '@pegwell/shared/music/pitch';
import { pluckedSamples } from '../tone';
import { Ear, FRAME, type Range } from './ear';

const RATE = 44_100;
const ear = new Ear(RATE);

/** A seeded generator (Park & Miller 1988), so that a failure can be had again. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 48_271) % 2_147_483_647) / 2_147_483_647;
}

interface String_ {
  readonly hertz: number;
  readonly random: () => number;
  /** Of the second partial over the first, in decibels; without, it is half as strong. */
  readonly secondOver?: number;
  /** Decibels of signal over noise. */
  readonly noise?: number;
}

/** A made string of 15 partials, the nth 1/n as strong, phases by chance. */
function made({ hertz, random, secondOver, noise }: String_): Float32Array {
  const partials = Array.from({ length: 15 }, (_, index) => ({
    n: index + 1,
    size: index === 1 && secondOver !== undefined ? 10 ** (secondOver / 20) : 1 / (index + 1),
    phase: random() * 2 * Math.PI,
  })).filter(({ n }) => n * hertz < RATE / 2);
  const frame = Float32Array.from({ length: FRAME }, (_, at) =>
    partials.reduce(
      (sum, { n, size, phase }) => sum + size * Math.sin((2 * Math.PI * n * hertz * at) / RATE + phase),
      0,
    ),
  );
  if (noise === undefined) return frame.map((value) => value / 5);
  const power = frame.reduce((sum, value) => sum + value * value, 0) / FRAME;
  const spread = Math.sqrt(power / 10 ** (noise / 10));
  // Two even draws make a normal one (Box & Muller 1958).
  const normal = () => Math.sqrt(-2 * Math.log(random() || 1e-9)) * Math.cos(2 * Math.PI * random());
  return frame.map((value) => (value + spread * normal()) / 5);
}

/** Where the string is looked for: a whole step either way. */
const around = (hertz: number): readonly Range[] => [
  { low: hertz * 2 ** (-2 / 12), high: hertz * 2 ** (2 / 12) },
];

/** E1 to E5, 40 cents flat to 40 sharp. */
function strings(count: number, seed: number) {
  const random = seeded(seed);
  return Array.from({ length: count }, () => {
    const named = frequencyOf(28 + Math.floor(random() * 49));
    return { named, hertz: named * 2 ** ((random() * 80 - 40) / 1200), random };
  });
}

const worst = (count: number, more: Omit<String_, 'hertz' | 'random'>): number =>
  strings(count, 7).reduce((most, { named, hertz, random }) => {
    const heard = ear.hear(made({ hertz, random, ...more }), around(named));
    return Math.max(most, heard ? Math.abs(centsBetween(hertz, heard.hertz)) : Infinity);
  }, 0);

describe('an ear for one string', () => {
  it('is at most half a cent off where nothing else sounds', () => expect(worst(400, {})).toBeLessThan(0.5));

  it('is at most two cents off with noise 20 dB below', () =>
    expect(worst(400, { noise: 20 })).toBeLessThan(2));

  it('takes no octave for the string, 2,000 times, also with the second partial 6 dB over the first', () => {
    let slips = 0;
    for (const { hertz, random } of strings(2_000, 11)) {
      // All that an instrument has may sound here: nothing but the sound itself says which octave it is.
      const heard = ear.hear(made({ hertz, random, secondOver: 6 }), [{ low: 30, high: 1_400 }]);
      if (!heard || Math.abs(centsBetween(hertz, heard.hertz)) > 50) slips++;
    }
    expect(slips).toBe(0);
  });

  it('does not take the octave above for the string', () => {
    const random = seeded(3);
    const octave = made({ hertz: 659.255, random });
    expect(ear.hear(octave, around(329.628))).toBeNull();
  });

  it.each([
    ['the A string of another', 440],
    ['a tune on the E string of another', 739.989],
    ['the same string of another, a little flat', 291],
  ])('keeps to its string beside %s, 10 dB below', (_, other) => {
    const random = seeded(9);
    const quiet = made({ hertz: other, random }).map((value) => value * 10 ** (-10 / 20));
    const both = made({ hertz: 293.665, random }).map((value, index) => value + (quiet[index] ?? 0));
    const fiddle = [...around(293.665), ...around(195.998), ...around(440), ...around(659.255)];
    const heard = ear.hear(both, fiddle);
    expect(Math.abs(centsBetween(293.665, heard?.hertz ?? 1))).toBeLessThan(6);
  });

  it('hears nothing in silence and in noise', () => {
    const random = seeded(5);
    expect(ear.hear(new Float32Array(FRAME), around(440))).toBeNull();
    expect(
      ear.hear(
        Float32Array.from({ length: FRAME }, () => random() - 0.5),
        around(440),
      ),
    ).toBeNull();
  });

  it("hears the page's own plucked tone where it says it is", () => {
    const tone = pluckedSamples(293.665, RATE, 2);
    const heard = ear.hear(tone.slice(RATE / 5, RATE / 5 + FRAME), around(293.665));
    expect(Math.abs(centsBetween(293.665, heard?.hertz ?? 0))).toBeLessThan(0.5);
  });
});
