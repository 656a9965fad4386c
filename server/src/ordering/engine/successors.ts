import { latestStarts } from './feasible';
import type { Layer } from './layer';
import type { Stage } from './stage';
import { fitsAt, type Plan } from './units';

/**
 * Everything that can follow a state, in columns that are overwritten by the next call: the unit placed, the
 * position after it, how all kinds then stand, and the added cost.
 */
export class Successors {
  count = 0;
  unit = new Int32Array(64);
  joint = new Int32Array(64);
  high = new Float64Array(64);
  low = new Float64Array(64);
  private readonly latest: readonly number[];
  /** By class whose unit must wait for others: those others. */
  private readonly waits: readonly (readonly number[])[];
  /** By class: the last position at which it may still be unplaced; count where any is. */
  private readonly lastCall: Int32Array;
  private readonly fits: readonly (Uint8Array | null)[];
  private readonly hasDeadlines: boolean;
  /** From this position on, the place before an entry is on the clock and nothing ahead is fixed. */
  private readonly openFrom: number;
  /** By class: whether it shows a spaced rhythm, as far as the stage sees them. */
  private readonly spaced: Uint8Array;
  /** By class: whether some kind that other tunes name is silent in it. */
  private readonly silent: Uint8Array;

  /** @param together follow only one of the orders that are alike to this stage; see {@link staysTogether} */
  constructor(
    private readonly stage: Stage,
    private readonly together: boolean,
  ) {
    const { plan } = stage;
    const count = plan.setStart.length;
    this.latest = latestStarts(plan) ?? plan.units.map(() => count);
    this.waits = stage.members.map(([unit]) => plan.units[unit!]!.after);
    this.lastCall = Int32Array.from(stage.members, ([unit]) => {
      const { plain, entries } = plan.units[unit!]!;
      return plain ? count : Math.min(this.latest[unit!]!, count - entries.length);
    });
    this.fits = stage.members.map(([unit]) => fitting(plan, unit!));
    const { setStart, fixedUnitAt } = plan;
    this.openFrom = count;
    while (this.openFrom > 1 && !setStart[this.openFrom - 1] && fixedUnitAt[this.openFrom - 1] === -1)
      this.openFrom--;
    this.spaced = Uint8Array.from(stage.members, ([unit]) => {
      const keys = [stage.headKey[unit!]!, stage.tailKey[unit!]!];
      return keys.some((key) => stage.pairHigh[key * stage.keys + key] !== 0) ? 1 : 0;
    });
    const { entries, kinds } = stage.joints.compiled;
    const named = kinds.flatMap((_, k) => (entries.some(({ options }) => options[k] !== null) ? [k] : []));
    this.silent = Uint8Array.from(stage.members, ([unit]) => {
      const silentAt = (entry: number): boolean => named.some((k) => entries[entry]!.options[k] === null);
      return named.length > 1 && plan.units[unit!]!.entries.some(silentAt) ? 1 : 0;
    });
    this.hasDeadlines = plan.units.some(({ after }) => after.length > 0);
  }

  /** Whether nothing that must still come has become too late. */
  alive(rows: Int32Array, at: number, position: number): boolean {
    if (!this.hasDeadlines) return true;
    for (let c = 0; c < this.lastCall.length; c++) {
      if (this.lastCall[c]! < position && this.stage.left(rows, at, c) > 0) return false;
    }
    return true;
  }

  /** Fills the columns with what can follow a row of a layer. */
  after(layer: Layer, row: number, position: number): void {
    this.count = 0;
    const { stage } = this;
    const { plan } = stage;
    const at = row * layer.stride;
    const { rows } = layer;
    const fixed = plan.fixedUnitAt[position]!;
    if (fixed !== -1) {
      if (this.mayCome(plan.units[fixed]!.after, rows, at, position)) this.place(fixed, rows, at, position);
      return;
    }
    if (!this.alive(rows, at, position)) return;
    if (this.together && this.openFrom <= position && this.staysTogether(rows, at)) return;
    for (let c = 0; c < stage.members.length; c++) {
      if (stage.left(rows, at, c) === 0) continue;
      if (this.fits[c]?.[position] === 0) continue;
      if (!this.mayCome(this.waits[c]!, rows, at, position)) continue;
      this.place(stage.members[c]![0]!, rows, at, position);
    }
  }

  /**
   * Where no break and nothing fixed is ahead, an entry that fits what the last one left, at no cost at all, may
   * as well come next: wherever an order has it, drawn forward to here it costs nothing, and the gap it leaves
   * costs no more than it did (the triangle inequality). Not so for spaced rhythms, which it may keep apart, nor
   * where kinds are silent later: two may have turned at it together that now turn at two tunes.
   * What is left out so has its like at this stage, but not at a finer one: no table may be read from it.
   */
  private staysTogether(rows: Int32Array, at: number): boolean {
    const { stage } = this;
    if (this.left(this.spaced, rows, at) > 1 || this.left(this.silent, rows, at) > 0) return false;
    const joint = rows[at + stage.words]!;
    for (let c = 0; c < stage.members.length; c++) {
      if (this.spaced[c] === 1 || stage.left(rows, at, c) === 0) continue;
      const unit = stage.members[c]![0]!;
      if (!stage.plan.units[unit]!.plain) continue;
      const pair = rows[at + stage.words + 1]! * stage.keys + stage.headKey[unit]!;
      if (stage.pairHigh[pair] !== 0 || stage.pairLow[pair] !== 0) continue;
      const { to, onHigh, onLow } = stage.moves.from(joint, stage.signature[unit]!);
      for (let way = 0; way < to.length; way++) {
        if (to[way] !== joint || onHigh[way] !== 0 || onLow[way] !== 0) continue;
        this.count = 1;
        this.unit[0] = unit;
        this.joint[0] = joint;
        this.high[0] = 0;
        this.low[0] = 0;
        return true;
      }
    }
    return false;
  }

  /** Units left of the classes marked. */
  private left(marked: Uint8Array, rows: Int32Array, at: number): number {
    let count = 0;
    for (let c = 0; c < marked.length; c++) if (marked[c] === 1) count += this.stage.left(rows, at, c);
    return count;
  }

  private mayCome(earlier: readonly number[], rows: Int32Array, at: number, position: number): boolean {
    for (const unit of earlier) {
      const { fixedAt } = this.stage.plan.units[unit]!;
      if (fixedAt !== null ? fixedAt >= position : this.stage.left(rows, at, this.stage.classOf[unit]!) > 0) {
        return false;
      }
    }
    return true;
  }

  private place(unit: number, rows: Int32Array, at: number, position: number): void {
    const { stage } = this;
    const moves = stage.moves.from(rows[at + stage.words]!, stage.signature[unit]!);
    const pair = rows[at + stage.words + 1]! * stage.keys + stage.headKey[unit]!;
    const offClock = stage.plan.setStart[position]!;
    const high = stage.insideHigh[unit]! + (offClock ? 0 : stage.pairHigh[pair]!);
    const low = offClock ? 0 : stage.pairLow[pair]!;
    const moveHigh = offClock ? moves.offHigh : moves.onHigh;
    const moveLow = offClock ? moves.offLow : moves.onLow;
    const ways = moves.to.length;
    if (this.count + ways > this.unit.length) this.grow(this.count + ways);
    for (let way = 0; way < ways; way++) {
      const index = this.count++;
      this.unit[index] = unit;
      this.joint[index] = moves.to[way]!;
      this.high[index] = high + moveHigh[way]!;
      this.low[index] = low + moveLow[way]!;
    }
  }

  private grow(atLeast: number): void {
    const room = 2 ** Math.ceil(Math.log2(atLeast));
    const [unit, joint, high, low] = [this.unit, this.joint, this.high, this.low];
    this.unit = new Int32Array(room);
    this.joint = new Int32Array(room);
    this.high = new Float64Array(room);
    this.low = new Float64Array(room);
    this.unit.set(unit);
    this.joint.set(joint);
    this.high.set(high);
    this.low.set(low);
  }
}

/** By position; null for a unit that fits wherever nothing is fixed, which is asked before. */
function fitting(plan: Plan, unit: number): Uint8Array | null {
  const { entries } = plan.units[unit]!;
  if (entries.length === 1) return null;
  return Uint8Array.from(plan.setStart, (_, position) => (fitsAt(plan, plan.units[unit]!, position) ? 1 : 0));
}
