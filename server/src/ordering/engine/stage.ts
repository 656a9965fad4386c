import type { Compiled } from './compiled';
import { Joints, type Grain } from './joints';
import { MoveTable } from './moves';
import type { Steps } from './steps';
import type { Plan } from './units';
import type { Weights } from './weights';

/**
 * How closely a sweep looks. `tunings`: entries with the same tunings are one class, and capos, ranks, rhythms
 * and keys cost nothing. `rhythms`: tunings and spaced rhythms. `keys`: all but spaced rhythms. `all`: everything.
 * What costs nothing at a coarser stage makes its cost to go a bound for the finer one.
 */
export type Closeness = 'tunings' | 'rhythms' | 'keys' | 'all';

export const stageSeesKeys = (closeness: Closeness): boolean => closeness === 'keys' || closeness === 'all';

/**
 * The units of a problem sorted into classes of which one is as good as another, and states packed as
 * integers: counts left per class, as many bits each as it needs, in words of 32.
 */
export class Stage {
  readonly joints: Joints;
  readonly moves: MoveTable;
  /** By class. Units without rules share classes; each other unit that is not fixed is its own. */
  readonly members: readonly (readonly number[])[];
  /** By unit; -1 for fixed units, which no state needs to count. */
  readonly classOf: Int32Array;
  /** By unit. */
  readonly signature: Int32Array;
  readonly headKey: Int32Array;
  readonly tailKey: Int32Array;
  /** By `tailKey * keys + headKey`: what two neighbours inside a set cost apart from tunings. */
  readonly pairHigh: Float64Array;
  readonly pairLow: Float64Array;
  readonly keys: number;
  /** By key: the tonic it shows, below 0 where it shows none. */
  readonly tonicOfKey: readonly number[];
  /** By class: where its count stands in a packed state. */
  readonly word: Int32Array;
  readonly shift: Int32Array;
  readonly mask: Int32Array;
  readonly words: number;
  /** By unit: spaced neighbours inside a medley, which cost the same wherever it stands. */
  readonly insideHigh: Float64Array;

  constructor(
    compiled: Compiled,
    readonly plan: Plan,
    weights: Weights,
    readonly closeness: Closeness,
    steps: Steps,
  ) {
    const seesKeys = stageSeesKeys(closeness);
    const seesSpaced = closeness === 'rhythms' || closeness === 'all';
    const grain: Grain = seesKeys ? 'stance' : 'tuning';
    this.joints = new Joints(compiled, grain);
    this.moves = new MoveTable(this.joints, weights, steps);
    const { units } = plan;
    const entriesOf = units.map((unit) => unit.entries.map((entry) => compiled.entries[entry]!));
    this.signature = Int32Array.from(entriesOf, (entries) => this.moves.signature(entries));

    // What neighbours see of each other: 0 is the start of a set, and everything at the coarsest stage.
    const seen = new Map<string, number>([['', 0]]);
    const faces: { tonic: number; spaced: boolean }[] = [{ tonic: -1, spaced: false }];
    const face = (tonic: number, spaced: boolean): number => {
      const key = `${tonic}${spaced ? ' spaced' : ''}`;
      const known = seen.get(key);
      if (known !== undefined) return known;
      seen.set(key, faces.length);
      return faces.push({ tonic, spaced }) - 1;
    };
    const keyOf = ({ tonic, spaced }: { tonic: number; spaced: boolean }): number => {
      return closeness === 'tunings' ? 0 : face(seesKeys ? tonic : -1, seesSpaced && spaced);
    };
    this.headKey = Int32Array.from(entriesOf, (entries) => keyOf(entries[0]!));
    this.tailKey = Int32Array.from(entriesOf, (entries) => keyOf(entries[entries.length - 1]!));
    this.keys = faces.length;
    this.tonicOfKey = faces.map(({ tonic }) => tonic);
    this.pairHigh = new Float64Array(this.keys * this.keys);
    this.pairLow = new Float64Array(this.keys * this.keys);
    faces.forEach((tail, t) =>
      faces.forEach((head, h) => {
        if (tail.spaced && head.spaced) this.pairHigh[t * this.keys + h] = weights.ruleBreak;
        if (tail.tonic >= 0 && head.tonic >= 0 && tail.tonic !== head.tonic) {
          this.pairLow[t * this.keys + h] = weights.key;
        }
      }),
    );
    this.insideHigh = Float64Array.from(entriesOf, (entries) => {
      const pairs = entries.filter((entry, index) => index > 0 && entry.spaced && entries[index - 1]!.spaced);
      return pairs.length * weights.ruleBreak;
    });

    const classes = new Map<string, number[]>();
    this.classOf = new Int32Array(units.length).fill(-1);
    units.forEach((unit, index) => {
      if (unit.fixedAt !== null) return;
      const key = unit.plain ? `${this.signature[index]} ${this.headKey[index]}` : `unit ${index}`;
      const members = classes.get(key);
      if (members) members.push(index);
      else classes.set(key, [index]);
    });
    this.members = [...classes.values()];
    this.members.forEach((members, index) => members.forEach((unit) => (this.classOf[unit] = index)));

    this.word = new Int32Array(this.members.length);
    this.shift = new Int32Array(this.members.length);
    this.mask = new Int32Array(this.members.length);
    let [word, used] = [0, 0];
    this.members.forEach(({ length }, index) => {
      const bits = 32 - Math.clz32(length);
      if (used + bits > 32) [word, used] = [word + 1, 0];
      this.word[index] = word;
      this.shift[index] = used;
      this.mask[index] = 2 ** bits - 1;
      used += bits;
    });
    this.words = word + 1;
  }

  /** Words of a state: its counts, how all kinds stand, and what the next neighbour sees. */
  get stride(): number {
    return this.words + 2;
  }

  /** Steps that one state counts for: those of many classes take longer to read. */
  get effort(): number {
    return 1 + (this.members.length >> 4);
  }

  left(rows: Int32Array, at: number, index: number): number {
    return (rows[at + this.word[index]!]! >>> this.shift[index]!) & this.mask[index]!;
  }

  /** Writes the state before the first entry. */
  start(into: Int32Array): void {
    into.fill(0, 0, this.words);
    this.members.forEach(({ length }, index) => {
      into[this.word[index]!]! |= length << this.shift[index]!;
    });
    into[this.words] = this.joints.opening;
    into[this.words + 1] = 0;
  }
}
