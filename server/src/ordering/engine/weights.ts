import type { Goal } from '@pegwell/shared/session/evening';
import type { Compiled } from './compiled';

/**
 * A score as two numbers: `high` holds the first three levels of the goal, `low` the other four and, last,
 * how many entries moved, each level a digit wide enough for the worst order of this evening. Two such pairs
 * add digit by digit and compare like scores.
 *
 * Where the digits of `low` would pass 2^53, those at its end are left out (weight 0), and the search proves
 * that many levels fewer. It takes hundreds of tunes and dozens of chairs to get there.
 */
export interface Weights {
  readonly peg: number;
  readonly stop: number;
  readonly ruleBreak: number;
  readonly second: number;
  readonly capo: number;
  readonly key: number;
  readonly semitone: number;
  readonly moved: number;
  /** Levels that have a digit, 6 or 7. */
  readonly levels: number;
  /** The digits of a pair, level by level in the goal's order. */
  read(high: number, low: number): readonly number[];
}

/** More pegs than any order can turn, over all chairs. */
export function mostPegs({ kinds, entries }: Compiled): number {
  return kinds.reduce((sum, kind) => sum + Math.max(0, ...kind.pegs), 0) * entries.length;
}

export function weightsFor(compiled: Compiled, goal: Goal): Weights {
  const { kinds, entries } = compiled;
  const count = entries.length;
  const pegs = mostPegs(compiled);
  let semitones = 0;
  let capos = 0;
  for (const kind of kinds) {
    semitones += Math.max(0, ...kind.semitones) * count;
    if (new Set(kind.capoOf.slice(1)).size > 1) capos += kind.count * count;
  }
  let seconds = 0;
  for (const { options } of entries) {
    for (const list of options) seconds += Math.max(0, ...(list ?? []).map(({ second }) => second));
  }
  const [first, second] = goal === 'stops' ? [count, pegs] : [pegs, count];
  const high = digits([first, second, 2 * count]);
  const low = digits([seconds, capos, count, semitones, count]);
  if (high.weights.includes(0)) throw new RangeError('More chairs and tunes than any evening has');
  const [peg, stop] =
    goal === 'stops' ? [high.weights[1]!, high.weights[0]!] : [high.weights[0]!, high.weights[1]!];
  return {
    peg,
    stop,
    ruleBreak: high.weights[2]!,
    second: low.weights[0]!,
    capo: low.weights[1]!,
    key: low.weights[2]!,
    semitone: low.weights[3]!,
    moved: low.weights[4]!,
    levels: 3 + low.weights.slice(0, 4).filter((weight) => weight > 0).length,
    read: (highValue, lowValue) => [...high.read(highValue), ...low.read(lowValue).slice(0, 4)],
  };
}

interface Digits {
  readonly weights: readonly number[];
  read(value: number): readonly number[];
}

/** Weights for digits of which each may reach its greatest, first digit heaviest; 0 for those with no room. */
function digits(greatest: readonly number[]): Digits {
  let fitting = greatest.length;
  const product = (): number => greatest.slice(0, fitting).reduce((size, most) => size * (most + 1), 1);
  while (fitting > 0 && product() > Number.MAX_SAFE_INTEGER / 4) fitting--;
  const weights = greatest.map(() => 0);
  let weight = 1;
  for (let digit = fitting - 1; digit >= 0; digit--) {
    weights[digit] = weight;
    weight *= greatest[digit]! + 1;
  }
  return {
    weights,
    read: (value) => {
      let rest = value;
      return weights.map((size) => {
        if (size === 0) return 0;
        const digit = Math.floor(rest / size);
        rest -= digit * size;
        return digit;
      });
    },
  };
}
