import { FREE, type CompiledEntry } from './compiled';
import type { Joints } from './joints';
import type { Steps } from './steps';
import type { Weights } from './weights';

/** More ways than this to tune for one entry, all kinds together, and the search does not try. */
const MOST_WAYS = 600;

/** Thrown where an entry has more ways to tune than the search takes on. */
export class TooManyWays extends Error {}

/** All ways to go on with a unit from one joint stand. The cost is that of the place before it and within it. */
export interface Moves {
  /** Joint stands after the unit. */
  readonly to: Int32Array;
  /** Cost where the place before the unit is on the clock. */
  readonly onHigh: Float64Array;
  readonly onLow: Float64Array;
  /** Cost where it is off the clock. */
  readonly offHigh: Float64Array;
  readonly offLow: Float64Array;
}

interface Way {
  readonly to: number;
  readonly high: number;
  readonly low: number;
}

/**
 * Remembers the moves from every joint stand with every unit. Units whose entries read alike at this grain
 * share them.
 */
export class MoveTable {
  private readonly signatures = new Map<string, number>();
  private readonly sequences: (readonly CompiledEntry[])[] = [];
  private readonly moves: (Moves | undefined)[][] = [];

  constructor(
    readonly joints: Joints,
    private readonly weights: Weights,
    private readonly effort: Steps,
  ) {}

  /** Two sequences of entries have the same signature where they offer the same tunings and choices. */
  signature(entries: readonly CompiledEntry[]): number {
    const key = entries.map((entry) => this.reads(entry)).join('/');
    let signature = this.signatures.get(key);
    if (signature === undefined) {
      signature = this.sequences.push(entries) - 1;
      this.signatures.set(key, signature);
      this.moves.push([]);
    }
    return signature;
  }

  from(joint: number, signature: number): Moves {
    const row = this.moves[signature]!;
    return (row[joint] ??= this.worked(joint, this.sequences[signature]!));
  }

  private reads({ options }: CompiledEntry): string {
    return options.map((list, k) => (list === null ? 'any' : this.listed(list, k))).join(';');
  }

  private listed(list: readonly { stance: number; second: number }[], kind: number): string {
    if (this.joints.grain === 'stance')
      return list.map(({ stance, second }) => `${stance}:${second}`).join(',');
    return this.tunings(list, kind).join(',');
  }

  private tunings(list: readonly { stance: number }[], kind: number): number[] {
    const { tuningOf } = this.joints.compiled.kinds[kind]!;
    return [...new Set(list.map(({ stance }) => tuningOf[stance]!))].sort((a, b) => a - b);
  }

  private worked(joint: number, entries: readonly CompiledEntry[]): Moves {
    const on = this.through(joint, entries, true);
    const off = this.through(joint, entries, false);
    return {
      to: Int32Array.from(on, ({ to }) => to),
      onHigh: Float64Array.from(on, ({ high }) => high),
      onLow: Float64Array.from(on, ({ low }) => low),
      offHigh: Float64Array.from(off, ({ high }) => high),
      offLow: Float64Array.from(off, ({ low }) => low),
    };
  }

  /** The best way to each stand, through all entries of a unit; places within it are on the clock. */
  private through(joint: number, entries: readonly CompiledEntry[], onClock: boolean): Way[] {
    let ways: Way[] = [{ to: joint, high: 0, low: 0 }];
    entries.forEach((entry, index) => {
      const best = new Map<number, Way>();
      for (const way of ways) {
        for (const step of this.ways(way.to, entry, index > 0 || onClock, index > 0)) {
          const [high, low] = [way.high + step.high, way.low + step.low];
          const rival = best.get(step.to);
          if (rival && (rival.high < high || (rival.high === high && rival.low <= low))) continue;
          best.set(step.to, { to: step.to, high, low });
        }
      }
      ways = [...best.values()];
    });
    return ways.sort((a, b) => a.to - b.to);
  }

  /** Every way to tune for one entry. */
  private ways(joint: number, entry: CompiledEntry, onClock: boolean, inMedley: boolean): Way[] {
    const { kinds } = this.joints.compiled;
    const { weights, joints } = this;
    const from = joints.stands[joint]!;
    const ways: Way[] = [];
    const to = [...from];
    let count = 1;
    for (const list of entry.options) count *= list?.length ?? 1;
    if (count > MOST_WAYS) throw new TooManyWays();
    this.effort.take(count);
    choose(0, 0, 0, false, false);
    return ways;

    function choose(k: number, high: number, low: number, turns: boolean, changes: boolean): void {
      if (k === kinds.length) {
        const stop = turns && onClock ? weights.stop : 0;
        const broken = changes && inMedley ? weights.ruleBreak : 0;
        ways.push({ to: joints.of([...to]), high: high + stop + broken, low });
        return;
      }
      const kind = kinds[k]!;
      const list = entry.options[k] ?? null;
      if (list === null) {
        to[k] = from[k]!;
        choose(k + 1, high, low, turns, changes);
        return;
      }
      const before = from[k]!;
      const tuningBefore = joints.tuning(k, before);
      for (const { stance, second } of list) {
        const after = joints.grain === 'tuning' ? kind.tuningOf[stance]! : stance;
        to[k] = after;
        const pair = tuningBefore * kind.tunings + joints.tuning(k, after);
        const pegs = kind.pegs[pair]!;
        const capoMoves = before !== FREE && joints.capo(k, before) !== joints.capo(k, after);
        // At the grain of tunings ranks are not looked at: a bound may leave costs out, never add any.
        const ranked = joints.grain === 'tuning' ? 0 : second * weights.second;
        choose(
          k + 1,
          high + pegs * weights.peg,
          low +
            kind.semitones[pair]! * weights.semitone +
            ranked +
            (capoMoves && onClock ? kind.count * weights.capo : 0),
          turns || pegs > 0,
          changes || pegs > 0 || capoMoves,
        );
      }
    }
  }
}
