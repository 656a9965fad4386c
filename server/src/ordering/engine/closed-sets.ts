/** Sets of elements that hold, with an element, all that can be played where it has just been. */
export interface ClosedSets {
  /** By set: its elements, as bits; in an order in which sets come before those they are in. */
  readonly masks: readonly number[];
  /** By set: those of its elements that no other of it brings along. */
  readonly firsts: readonly number[];
}

/** A column of all masks of so many bits is still made in a few milliseconds. */
const MOST_ELEMENTS = 20;

/**
 * All closed sets, where `closures` holds for each element, as bits, itself and what it brings along.
 *
 * Decides element by element, those that bring most along first: one that an earlier one has brought is in, any
 * other may be in or out.
 * @returns null where a table of all of them would try more visits than `most` for each stand
 */
export function closedSets(closures: readonly number[], most: number): ClosedSets | null {
  if (closures.length > MOST_ELEMENTS) return null;
  const bits = closures.map((closure, bit) => ({ closure, bit: 1 << bit }));
  bits.sort((a, b) => bitCount(b.closure) - bitCount(a.closure));
  const found: { mask: number; first: number }[] = [];
  let visits = 0;
  const decide = (index: number, mask: number, first: number, chosen: number): boolean => {
    if (index === bits.length) {
      found.push({ mask, first });
      visits += chosen;
      return visits <= most;
    }
    const { closure, bit } = bits[index]!;
    if (mask & bit) return decide(index + 1, mask, first, chosen);
    return (
      decide(index + 1, mask, first, chosen) && decide(index + 1, mask | closure, first | bit, chosen + 1)
    );
  };
  if (!decide(0, 0, 0, 0)) return null;
  found.sort((a, b) => a.mask - b.mask);
  return { masks: found.map(({ mask }) => mask), firsts: found.map(({ first }) => first) };
}

/** By any mask: the least closed set around it. */
export function setsOf(masks: readonly number[], closures: readonly number[]): Int32Array {
  const closed = new Int32Array(2 ** closures.length);
  const setOf = new Int32Array(closed.length);
  masks.forEach((mask, set) => (setOf[mask] = set));
  for (let mask = 1; mask < closed.length; mask++) {
    const bit = 31 - Math.clz32(mask);
    closed[mask] = closed[mask ^ (1 << bit)]! | closures[bit]!;
  }
  for (let mask = 1; mask < closed.length; mask++) setOf[mask] = setOf[closed[mask]!]!;
  return setOf;
}

function bitCount(mask: number): number {
  let count = 0;
  for (let rest = mask; rest !== 0; rest &= rest - 1) count++;
  return count;
}
