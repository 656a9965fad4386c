import { frequencyOf, midiOf } from '@pegwell/shared/music/pitch';
import { describe, expect, it } from 'vitest';
import { Ear, FRAME } from './ear';
import { hear, rangesOf, START, type Reading, type Telling, type TunerGoal, type TunerState } from './tuner';

const hertz = (pitch: string, cents = 0): number => frequencyOf(midiOf(pitch)) * 2 ** (cents / 1200);
const FIDDLE = ['G3', 'D4', 'A4', 'E5'];
const PEGS = ['G peg (4th)', 'D peg (3rd)', 'A peg (2nd)', 'E peg (1st)'];

/** One string of a fiddle in standard tuning, on its way. */
function goal(index: number, to: string, more: Partial<TunerGoal> = {}): TunerGoal {
  const strings = FIDDLE.map((pitch, each) => ({ peg: PEGS[each]!, hertz: hertz(pitch) }));
  return { strings, index, target: hertz(to), capo: 0, danger: 100, ...more };
}

/** Milliseconds between readings: 1,024 samples at 44.1 kHz. */
const HOP = 23;

/** Plays a script of plucks, each some milliseconds long with a pause after it, and says what was told. */
class Evening {
  state: TunerState = START;
  private at = 0;
  readonly told: Telling[] = [];

  constructor(private readonly goal: TunerGoal) {}

  /** A pluck that dies away; the pitch goes from one to another in its time. */
  pluck(from: number, to = from, ms = 600): this {
    const steps = Math.round(ms / HOP);
    for (let step = 0; step < steps; step++) {
      const pitch = from * (to / from) ** (step / steps);
      this.read({ hertz: pitch, level: -20 - step * 0.4 });
    }
    return this.rest();
  }

  rest(ms = 300): this {
    for (let step = 0; step < ms / HOP; step++) this.read({ hertz: null, level: -70 });
    return this;
  }

  read(reading: Omit<Reading, 'at'>): void {
    this.at += HOP;
    this.state = hear(this.state, { ...reading, at: this.at }, this.goal);
    if (this.told.at(-1) !== this.state.telling) this.told.push(this.state.telling);
  }
}

describe('the tuner', () => {
  it('follows the right string up and is done when it stayed for half a second', () => {
    const evening = new Evening(goal(1, 'E4'));
    evening.pluck(hertz('D4')).pluck(hertz('D4', 60), hertz('E4', -40));
    expect(evening.state.telling).toBe('tuning');
    expect(evening.state.toGo).toBeGreaterThan(30);
    evening.pluck(hertz('E4', -2), hertz('E4', 1), 400);
    expect(evening.state.telling).toBe('there');
    evening.pluck(hertz('E4'), hertz('E4'), 800);
    expect(evening.state.telling).toBe('done');
  });

  it('follows one down too', () => {
    const evening = new Evening(goal(3, 'D5'));
    evening.pluck(hertz('E5')).pluck(hertz('E5', -50), hertz('D5', 30)).pluck(hertz('D5'), hertz('D5'), 800);
    expect(evening.told).toEqual(['quiet', 'tuning', 'there', 'done']);
  });

  it('names the string that sounds when it is another', () => {
    const evening = new Evening(goal(1, 'E4'));
    evening.pluck(hertz('D4')).pluck(hertz('A4', 5));
    expect(evening.state).toMatchObject({ telling: 'wrong', wrongPeg: 'A peg (2nd)' });
    evening.pluck(hertz('D4', 20));
    expect(evening.state).toMatchObject({ telling: 'tuning', wrongPeg: null });
  });

  it('does not name a string that only rings along for a moment', () => {
    const evening = new Evening(goal(1, 'E4'));
    evening.pluck(hertz('D4')).pluck(hertz('A4'), hertz('A4'), 100).pluck(hertz('D4', 50));
    expect(evening.told).not.toContain('wrong');
  });

  it('asks about the peg after three plucks without movement, and not before', () => {
    const evening = new Evening(goal(1, 'E4'));
    evening.pluck(hertz('D4')).pluck(hertz('D4', 2)).pluck(hertz('D4', -1));
    expect(evening.told).not.toContain('still');
    evening.pluck(hertz('D4', 1));
    expect(evening.state.telling).toBe('still');
    evening.pluck(hertz('D4', 30));
    expect(evening.state.telling).toBe('tuning');
  });

  it('does not ask while the pitch creeps', () => {
    const evening = new Evening(goal(1, 'E4'));
    for (let cents = 0; cents <= 150; cents += 10) evening.pluck(hertz('D4', cents));
    expect(evening.told).not.toContain('still');
  });

  it('stops one that goes past the mark, and more firmly where the string is in danger', () => {
    const evening = new Evening(goal(1, 'E4', { danger: 80 }));
    evening.pluck(hertz('D4')).pluck(hertz('E4', 25));
    expect(evening.state.telling).toBe('past');
    evening.pluck(hertz('E4', 95));
    expect(evening.state.telling).toBe('danger');
  });

  it('says that a peg slips: it was there and has gone back', () => {
    const evening = new Evening(goal(1, 'E4'));
    evening.pluck(hertz('D4')).pluck(hertz('E4', -20), hertz('E4'), 700).pluck(hertz('E4', -60));
    expect(evening.state.telling).toBe('slipped');
  });

  it('sees a capo that was left on', () => {
    const evening = new Evening(goal(1, 'E4', { capo: 2 }));
    evening.pluck(hertz('D4', 200));
    expect(evening.state.telling).toBe('capo');
    const without = new Evening(goal(1, 'E4', { capo: 2 }));
    without.pluck(hertz('D4')).pluck(hertz('E4'), hertz('E4'), 900);
    expect(without.told).not.toContain('capo');
    expect(without.state.telling).toBe('done');
  });

  it('takes what is near no string for nothing', () => {
    const evening = new Evening(goal(1, 'E4'));
    evening.pluck(hertz('C6'));
    expect(evening.state).toEqual(START);
  });
});

const RATE = 44_100;

/** Hops until the tuner is within five cents for good, in milliseconds from the first sample of the sound. */
function settlesAfter(sound: Float32Array, pitch: number, its: TunerGoal): number {
  const ear = new Ear(RATE);
  const hop = 1024;
  let state = START;
  let settled = Infinity;
  for (let end = hop; end <= sound.length; end += hop) {
    const frame = new Float32Array(FRAME);
    frame.set(sound.subarray(Math.max(0, end - FRAME), end), Math.max(0, FRAME - end));
    const heard = ear.hear(frame, rangesOf(its));
    state = hear(state, { at: (end / RATE) * 1000, hertz: heard?.hertz ?? null, level: -20 }, its, {
      tolerance: 0,
      hold: Infinity,
    });
    const off = state.toGo === null ? Infinity : Math.abs(-state.toGo - 1200 * Math.log2(pitch / its.target));
    if (off > 5) settled = Infinity;
    else settled = Math.min(settled, (end / RATE) * 1000);
  }
  return settled;
}

describe('settling within five cents', () => {
  /** Karplus & Strong, "Digital synthesis of plucked-string and drum timbres" (1983): noise in a loop that softens. */
  function karplusStrong(pitch: number, seconds: number): { sound: Float32Array; pitch: number } {
    let state = 42;
    const random = (): number => (state = (state * 48_271) % 2_147_483_647) / 2_147_483_647 - 0.5;
    const length = Math.round(RATE / pitch - 0.5);
    const sound = new Float32Array(RATE * seconds);
    for (let at = 0; at < sound.length; at++) {
      sound[at] = at <= length ? random() : 0.498 * (sound[at - length]! + sound[at - length - 1]!);
    }
    // The loop is half a sample longer than its whole number.
    return { sound, pitch: RATE / (length + 0.5) };
  }

  it.each(['G3', 'D4', 'A4'])('takes less than 0.7 s for a plucked %s', (name) => {
    const { sound, pitch } = karplusStrong(hertz(name), 1.5);
    const index = FIDDLE.indexOf(name);
    expect(settlesAfter(sound, pitch, goal(index, name))).toBeLessThan(700);
  });

  it('takes less than 0.7 s for a bowed one, and a vibrato of 15 cents either way is read as its middle', () => {
    const pitch = hertz('A4');
    let phase = 0;
    const sound = Float32Array.from({ length: RATE * 2 }, (_, at) => {
      const bend = 15 * Math.sin((2 * Math.PI * 5.5 * at) / RATE);
      phase += (2 * Math.PI * pitch * 2 ** (bend / 1200)) / RATE;
      const swell = Math.min(1, at / (RATE * 0.08));
      let value = 0;
      for (let n = 1; n <= 12; n++) value += Math.sin(n * phase) / n;
      return value * 0.2 * swell;
    });
    expect(settlesAfter(sound, pitch, goal(2, 'A4'))).toBeLessThan(700);
  });
});
