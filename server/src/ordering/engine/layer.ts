/**
 * The states of a sweep after so many positions, in columns. States are rows of integers found by an
 * open-addressed table; counts are compared in full, never a hash or a product of them, which would pass
 * 2^53 and merge states in silence on long evenings.
 */
export class Layer {
  size = 0;
  rows: Int32Array;
  /** The least cost to get here. */
  high: Float64Array;
  low: Float64Array;
  /** Cost so far and the bound on what is to come, as it was when the state was met. */
  leastHigh: Float64Array;
  leastLow: Float64Array;
  /** Where from: the row in an earlier layer, and the unit placed since (a member of its class). */
  parent: Int32Array;
  unit: Int32Array;
  /** The same state in the table of the coarser stage; -1 where there is none. */
  coarse: Int32Array;
  /** Cost to go, once the sweep back has been made. */
  toGoHigh: Float64Array | null = null;
  toGoLow: Float64Array | null = null;
  private table: Int32Array;

  constructor(readonly stride: number) {
    const room = 16;
    this.rows = new Int32Array(room * stride);
    this.high = new Float64Array(room);
    this.low = new Float64Array(room);
    this.leastHigh = new Float64Array(room);
    this.leastLow = new Float64Array(room);
    this.parent = new Int32Array(room);
    this.unit = new Int32Array(room);
    this.coarse = new Int32Array(room);
    this.table = new Int32Array(room * 2).fill(-1);
  }

  /** The row of a state; -1 where it is not here. */
  find(state: Int32Array): number {
    const last = this.table.length - 1;
    for (let slot = this.hash(state, 0) & last; ; slot = (slot + 1) & last) {
      const row = this.table[slot]!;
      if (row === -1 || this.same(row, state)) return row;
    }
  }

  /** Adds a state that is not here. */
  add(state: Int32Array): number {
    if (this.size === this.high.length) this.grow();
    const row = this.size++;
    this.rows.set(state, row * this.stride);
    this.enter(row);
    return row;
  }

  /** Keeps only the rows named, in that order. */
  keep(rows: readonly number[]): void {
    const stride = this.stride;
    const kept = new Int32Array(Math.max(16, rows.length) * stride);
    rows.forEach((row, index) =>
      kept.set(this.rows.subarray(row * stride, (row + 1) * stride), index * stride),
    );
    this.rows = kept;
    const room = Math.max(16, rows.length);
    const floats = (column: Float64Array): Float64Array => fill(new Float64Array(room), column, rows);
    const ints = (column: Int32Array): Int32Array => fill(new Int32Array(room), column, rows);
    this.high = floats(this.high);
    this.low = floats(this.low);
    this.leastHigh = floats(this.leastHigh);
    this.leastLow = floats(this.leastLow);
    this.parent = ints(this.parent);
    this.unit = ints(this.unit);
    this.coarse = ints(this.coarse);
    this.size = rows.length;
    this.rebuild();
  }

  private grow(): void {
    const room = this.high.length * 2;
    this.rows = widened(new Int32Array(room * this.stride), this.rows);
    this.high = widened(new Float64Array(room), this.high);
    this.low = widened(new Float64Array(room), this.low);
    this.leastHigh = widened(new Float64Array(room), this.leastHigh);
    this.leastLow = widened(new Float64Array(room), this.leastLow);
    this.parent = widened(new Int32Array(room), this.parent);
    this.unit = widened(new Int32Array(room), this.unit);
    this.coarse = widened(new Int32Array(room), this.coarse);
    this.rebuild();
  }

  private rebuild(): void {
    this.table = new Int32Array(2 ** Math.ceil(Math.log2(this.high.length * 2))).fill(-1);
    for (let row = 0; row < this.size; row++) this.enter(row);
  }

  private enter(row: number): void {
    const last = this.table.length - 1;
    let slot = this.hash(this.rows, row * this.stride) & last;
    while (this.table[slot] !== -1) slot = (slot + 1) & last;
    this.table[slot] = row;
  }

  private hash(from: Int32Array, at: number): number {
    let hash = 0x9e3779b9;
    for (let index = 0; index < this.stride; index++) {
      hash = Math.imul(hash ^ from[at + index]!, 0x85ebca6b);
      hash ^= hash >>> 15;
    }
    return Math.imul(hash, 0xc2b2ae35) ^ (hash >>> 13);
  }

  private same(row: number, state: Int32Array): boolean {
    const at = row * this.stride;
    for (let index = 0; index < this.stride; index++) {
      if (this.rows[at + index] !== state[index]) return false;
    }
    return true;
  }
}

function widened<Column extends Int32Array | Float64Array>(wider: Column, column: Column): Column {
  wider.set(column);
  return wider;
}

function fill<Column extends Int32Array | Float64Array>(
  into: Column,
  from: Column,
  rows: readonly number[],
): Column {
  rows.forEach((row, index) => (into[index] = from[row]!));
  return into;
}
