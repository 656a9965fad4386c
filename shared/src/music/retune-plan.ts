import { cautions, LONGEST_SINGLE_STEP, type StringCaution, type StringMaterial } from './caution';
import type { InstrumentKind } from './instrument';
import { midiOf } from './pitch';
import { retune } from './retune';
import type { Tuned } from './tuning';
import { turningOrder } from './words';

/** A capo that goes on, comes off or moves; 0 is none. */
export interface CapoStep {
  readonly type: 'capo';
  readonly from: number;
  readonly to: number;
  /** The fret of the spike that the fifth string goes under; 0: out of it. Null where there is none. */
  readonly spike: number | null;
}

/** One string, brought from one pitch to another. */
export interface TurnStep {
  readonly type: 'turn';
  readonly courseIndex: number;
  /** Spelled pitches. */
  readonly from: string;
  readonly to: string;
  readonly direction: 'up' | 'down';
  /** MIDI numbers to come to, one after the other, with a rest between; the last is that of `to`. */
  readonly goes: readonly number[];
  readonly caution: StringCaution | null;
}

/** A look at the bridge, where it can move, and at all strings: a change on one moves the others. */
export interface CheckStep {
  readonly type: 'check';
  readonly bridge: boolean;
}

export type RetuneStep = CapoStep | TurnStep | CheckStep;

/** A fifth string's spike stands this many frets above the capo's (F. Ford, frets.com: 7 and 9 are usual). */
const SPIKE_ABOVE_CAPO = 5;

/** Kinds whose bridge cannot move or fall. */
const GLUED_BRIDGES: readonly string[] = ['guitar', 'ukulele'];

/**
 * A whole retune in a safe order: capo off and fifth string out of its spike; the strings that come down, one at
 * a time; those that go up; a look at the bridge and at every string; capo on. Empty where neither peg nor
 * capo moves. Common practice; a step of more than three semitones is taken in two goes.
 * @param material the player's own strings
 * @throws RangeError where a tuning has not the kind's number of courses
 */
export function retunePlan(
  kind: InstrumentKind,
  from: Tuned,
  to: Tuned,
  material: StringMaterial = {},
): readonly RetuneStep[] {
  const { deltas, pegChanges } = retune(kind, from.pitches, to.pitches);
  const capo = (before: number, after: number): CapoStep[] =>
    before === after ? [] : [{ type: 'capo', from: before, to: after, spike: spikeAt(kind, after) }];
  if (pegChanges === 0) return capo(from.capo, to.capo);
  const found = cautions(kind, from.pitches, to.pitches, material);
  const turns = turningOrder(deltas).map((courseIndex): TurnStep => {
    const delta = deltas[courseIndex]!;
    const [was, is] = [from.pitches[courseIndex]!, to.pitches[courseIndex]!];
    return {
      type: 'turn',
      courseIndex,
      from: was,
      to: is,
      direction: delta > 0 ? 'up' : 'down',
      goes: goesTo(midiOf(was), delta),
      caution: found.find((each) => each.courseIndex === courseIndex) ?? null,
    };
  });
  const check: CheckStep = { type: 'check', bridge: !GLUED_BRIDGES.includes(kind.id) };
  return [...capo(from.capo, 0), ...turns, check, ...capo(0, to.capo)];
}

/** The longer half first, so that the second ends under it. */
function goesTo(start: number, delta: number): readonly number[] {
  if (Math.abs(delta) <= LONGEST_SINGLE_STEP) return [start + delta];
  return [start + Math.sign(delta) * Math.ceil(Math.abs(delta) / 2), start + delta];
}

function spikeAt(kind: InstrumentKind, capo: number): number | null {
  if (kind.id !== 'banjo') return null;
  return capo === 0 ? 0 : SPIKE_ABOVE_CAPO + capo;
}
