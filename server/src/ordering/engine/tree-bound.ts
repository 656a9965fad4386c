import type { Steps } from './steps';
import type { TuningMoves } from './tuning-moves';
import type { Plan } from './units';

/** More groups than bits in a mask are not followed. */
const MOST_GROUPS = 30;
const ASCENTS = 200;
/** What rounding may have added; costs themselves are whole. */
const GRAIN = 1e-6;

/**
 * The least pegs and turning places still to come, from spanning trees: an order that visits every group that
 * is left is a path, a path is a tree, and the cheapest tree is quickly found however many groups there are.
 *
 * A price on each group, paid for each of the two ways that lead past it, makes trees look like paths (Held &
 * Karp 1970, "The traveling-salesman problem and minimum spanning trees"). Any prices give a true bound; these
 * are found once, for all groups from the opening. Where a table over subsets can hold all groups it is exact,
 * and better than this.
 *
 * Between two groups the cost is the least over all ways to stand after the one, so alternatives and kinds that
 * are silent only lower the bound. Of pins, pairs and medleys only their groups are seen.
 */
export class TreeBound {
  /** By unit: the bits it keeps set until it is placed. */
  readonly bitsOf: readonly number[];
  private readonly size: number;
  /** By `a * size + b`: the least cost between two groups, whichever comes first. */
  private readonly between: Float64Array;
  /** By `joint * size + group`. */
  private readonly first: Float64Array;
  private readonly prices: Float64Array;
  /** By mask of groups left: all but the way from the stand to the first of them. */
  private readonly trees = new Map<number, number>();

  constructor(
    readonly tunings: TuningMoves,
    plan: Plan,
    steps: Steps,
  ) {
    const { groupOf, moves } = tunings;
    const groups = [...new Set(groupOf)].filter((group) => group !== -1).slice(0, MOST_GROUPS);
    this.size = groups.length;
    this.bitsOf = plan.units.map(({ entries }) => {
      const bits = entries.map((entry) => groups.indexOf(groupOf[entry]!));
      return bits.reduce((mask, bit) => (bit === -1 ? mask : mask | (1 << bit)), 0);
    });
    steps.take(ASCENTS * this.size + moves.length * this.size);
    this.first = Float64Array.from(
      moves.flatMap((row) => groups.map((group) => Math.min(...row[group]!.map(({ cost }) => cost)))),
    );
    this.between = new Float64Array(this.size ** 2).fill(Infinity);
    for (const row of moves) {
      groups.forEach((group, a) => {
        for (const { to } of row[group]!) for (let b = 0; b < this.size; b++) this.shorten(a, b, to);
      });
    }
    this.prices = new Float64Array(this.size);
    this.ascend();
  }

  /** What is still to come from a joint stand; read by TuningMoves. */
  toGo(mask: number, joint: number): number {
    if (mask === 0) return 0;
    let tree = this.trees.get(mask);
    if (tree === undefined) this.trees.set(mask, (tree = this.tree(mask)));
    return Math.max(0, Math.ceil(tree + this.firstWay(mask, joint).cost - GRAIN));
  }

  private shorten(a: number, b: number, stand: number): void {
    const cost = Math.min(this.between[a * this.size + b]!, this.first[stand * this.size + b]!);
    this.between[a * this.size + b] = cost;
    this.between[b * this.size + a] = Math.min(this.between[b * this.size + a]!, cost);
  }

  private firstWay(mask: number, joint: number): { cost: number; bit: number } {
    let [cost, first] = [Infinity, 0];
    for (let rest = mask; rest !== 0; rest &= rest - 1) {
      const bit = 31 - Math.clz32(rest & -rest);
      const way = this.first[joint * this.size + bit]! + this.prices[bit]!;
      if (way < cost) [cost, first] = [way, bit];
    }
    return { cost, bit: first };
  }

  /**
   * The cheapest tree over the groups of a mask (Prim 1957), and the way on from the last of them to nowhere,
   * which costs its price alone; less every price twice.
   * @param degrees by group, raised by the ways that lead past it
   */
  private tree(mask: number, degrees?: Int32Array): number {
    const { size, between, prices } = this;
    const start = 31 - Math.clz32(mask);
    const near = new Float64Array(size).fill(Infinity);
    const from = new Int32Array(size).fill(start);
    let cost = 0;
    let last = start;
    let ways = 0;
    for (let left = mask, at = start; ;) {
      left &= ~(1 << at);
      ways += prices[at]!;
      if (prices[at]! < prices[last]!) last = at;
      if (left === 0) break;
      let [next, least] = [-1, Infinity];
      for (let rest = left; rest !== 0; rest &= rest - 1) {
        const bit = 31 - Math.clz32(rest & -rest);
        const way = between[at * size + bit]! + prices[at]! + prices[bit]!;
        if (way < near[bit]!) [near[bit], from[bit]] = [way, at];
        if (near[bit]! < least) [next, least] = [bit, near[bit]!];
      }
      cost += least;
      if (degrees) {
        degrees[next]!++;
        degrees[from[next]!]!++;
      }
      at = next;
    }
    if (degrees) degrees[last]!++;
    return cost + prices[last]! - 2 * ways;
  }

  /** Raises the bound from the opening, groups that trees lead past too often becoming dearer. */
  private ascend(): void {
    if (this.size < 3) return;
    const all = 2 ** this.size - 1;
    let best = -Infinity;
    let kept = this.prices.slice();
    let stride = 0;
    for (let round = 0; round < ASCENTS; round++) {
      const degrees = new Int32Array(this.size);
      const opening = this.firstWay(all, 0);
      degrees[opening.bit]!++;
      const bound = this.tree(all, degrees) + opening.cost;
      if (round === 0) stride = Math.abs(bound) / this.size / 2;
      if (bound > best) [best, kept] = [bound, this.prices.slice()];
      for (let bit = 0; bit < this.size; bit++) this.prices[bit]! += stride * (degrees[bit]! - 2);
      stride *= 0.97;
    }
    this.prices.set(kept);
  }
}
