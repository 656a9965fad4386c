/** A tune that asks for a tuning. Tunes that ask for none lie in the stretch of places before the next that does. */
export interface RackAsk {
  /** Index of the tuning. */
  readonly tuning: number;
  /** One of the places since the ask before is off the clock; before the first ask there always is one. */
  readonly offClock: boolean;
}

/** Between tunings by index: at `from * tunings + to`. Both figures obey the triangle inequality. */
export interface RackMoves {
  readonly tunings: number;
  readonly pegs: readonly number[];
  readonly semitones: readonly number[];
}

/** In place of a tuning's index: tuned at home to whatever it is first played in. */
export const FREE = -1;

export interface RackCost {
  readonly pegChanges: number;
  /** Places on the clock where this player turns a peg. */
  readonly stops: number;
  readonly semitones: number;
}

/** How the instrument that serves an ask stood before it. */
export interface Serving {
  /** Index of its tuning, or FREE. */
  readonly from: number;
  /** Since it was last played there was a place off the clock or a stop: retuning it costs no stop. */
  readonly ready: boolean;
}

export interface RackCourse {
  readonly cost: RackCost;
  /** By ask. */
  readonly servings: readonly Serving[];
}

// The three figures are digits of one integer. A digit holds 300 tunes with 24 pegs, each over all of MIDI.
const STOP = 2 ** 20;
const PEG = 2 ** 30;

/**
 * The cheapest way through a fixed row of asks with a few instruments: the offline k-server problem (Chrobak,
 * Karloff, Payne, Vishwanathan 1991), to which stops are added. Exact, because some cheapest way does this:
 *
 * - An instrument goes straight from the tuning it was last played in to that of its next ask, at one place
 *   between the two. A tuning on the way that is not played costs nothing less (triangle inequality) and no
 *   fewer places.
 * - A tuning that is on an instrument is played on that one, and no other is tuned to it. Had another come
 *   there, the two could change parts from then on: the other then goes straight to where the first would have
 *   gone, with all places to choose from that it had and more.
 * - So each retune has a run of places to choose from, from after the last tune on that instrument to the tune
 *   that needs it. A run with a place off the clock costs no stop. To meet all others with the fewest stops,
 *   go from left to right and stop only where a run ends that holds no stop yet, at its very end: any stop that
 *   meets it may be moved there without leaving a run that has not ended. Hence one bit an instrument is all
 *   there is to remember: whether such a place has come since it was last played.
 *
 * A state is therefore what the instruments stand in, each ready or not, in no order: the one that was played
 * last, which all states of a layer share, and the sorted codes of the others, twice the tuning plus one where
 * ready, as one key. 200 tunes in any of 14 tunings on four instruments make at most 72,000 states: 10 ms once
 * warm, 60 tunes 1.3 ms (processor time, one core of a two-core virtual machine).
 *
 * @param starts by instrument: index of its tuning, or FREE
 */
export function cheapestCourse(
  asks: readonly RackAsk[],
  starts: readonly number[],
  { tunings, pegs, semitones }: RackMoves,
): RackCourse {
  const free = 2 * tunings + 1;
  const base = free + 1;
  const price = pegs.map((count, index) => count * PEG + semitones[index]!);
  const [first = free, ...rest] = starts.map((start) => (start === FREE ? free : 2 * start + 1));
  const others = rest.sort((a, b) => a - b);
  const nodeOf = new Int32Array(base ** others.length).fill(-1);

  let layer = new Layer(nodeOf, base);
  layer.reach(layer.key(others, -1, 0, false), 0, -1, -1);
  let held = first;
  const layers = asks.map(({ tuning, offClock }) => {
    layer.close();
    const before = layer;
    layer = new Layer(nodeOf, base);
    if (offClock) held |= 1;
    for (let node = 0; node < before.keys.length; node++) {
      const spent = before.cost[node]!;
      const has = readKey(before.keys[node]!, base, offClock, tuning, others);
      if (held >> 1 === tuning) {
        layer.reach(layer.key(others, -1, 0, false), spent, node, held);
        continue;
      }
      if (has >= 0) {
        layer.reach(layer.key(others, has, held, false), spent, node, others[has]!);
        continue;
      }
      for (let index = -1; index < others.length; index++) {
        const code = index < 0 ? held : others[index]!;
        if (index > 0 && others[index - 1] === code) continue;
        const stops = (code & 1) === 0;
        const add = code === free ? 0 : price[(code >> 1) * tunings + tuning]! + (stops ? STOP : 0);
        layer.reach(layer.key(others, index, held, stops), spent + add, node, code);
      }
    }
    held = 2 * tuning;
    return layer;
  });

  let node = layer.cost.reduce((best, cost, index) => (cost < layer.cost[best]! ? index : best), 0);
  const total = layer.cost[node]!;
  const servings: Serving[] = [];
  for (const { served, parent } of layers.reverse()) {
    const code = served[node]!;
    servings.push({ from: code === free ? FREE : code >> 1, ready: (code & 1) === 1 });
    node = parent[node]!;
  }
  const cost = {
    pegChanges: Math.floor(total / PEG),
    stops: Math.floor((total % PEG) / STOP),
    semitones: total % STOP,
  };
  return { cost, servings: servings.reverse() };
}

/** Reads a key into `codes`. @returns where an instrument stands in the tuning, one that is not ready before others; else -1 */
function readKey(key: number, base: number, offClock: boolean, tuning: number, codes: number[]): number {
  let left = key;
  let has = -1;
  for (let index = 0; index < codes.length; index++) {
    const code = offClock ? (left % base) | 1 : left % base;
    left = Math.floor(left / base);
    codes[index] = code;
    if (has < 0 && code >> 1 === tuning) has = index;
  }
  return has;
}

/** The states after one ask, each with the cheapest way to it. A layer's own arrays stay small: they grow fast. */
class Layer {
  readonly keys: number[] = [];
  readonly cost: number[] = [];
  /** Node of the layer before. */
  readonly parent: number[] = [];
  /** Code of the instrument that serves, as it stood before. */
  readonly served: number[] = [];

  /** @param nodeOf by key, all -1; shared, one open layer at a time */
  constructor(
    private readonly nodeOf: Int32Array,
    private readonly base: number,
  ) {}

  /** The key of sorted codes, the one at `out` (-1: none) replaced by another; all ready after a stop. */
  key(codes: readonly number[], out: number, by: number, stops: boolean): number {
    const ready = stops ? 1 : 0;
    let coming = out < 0 ? -1 : by | ready;
    let key = 0;
    for (let index = codes.length - 1; index >= 0; index--) {
      if (index === out) continue;
      const code = codes[index]! | ready;
      if (coming >= code) {
        key = key * this.base + coming;
        coming = -1;
      }
      key = key * this.base + code;
    }
    return coming < 0 ? key : key * this.base + coming;
  }

  reach(key: number, cost: number, parent: number, served: number): void {
    const node = this.nodeOf[key]!;
    if (node >= 0 && cost >= this.cost[node]!) return;
    const at = node >= 0 ? node : this.keys.length;
    this.nodeOf[key] = at;
    this.keys[at] = key;
    this.cost[at] = cost;
    this.parent[at] = parent;
    this.served[at] = served;
  }

  close(): void {
    for (const key of this.keys) this.nodeOf[key] = -1;
  }
}
