import type { Stage } from './stage';

/**
 * The least key changes still to come: every tonic that is left and is not the last one played must be
 * entered once, and only a break, or a medley that ends in it, lets it be entered without a change of key.
 * Tonics inside medleys are left out of the count.
 */
export class KeyBound {
  /** By class: the bit of its tonic; 0 for medleys. */
  private readonly bits: Int32Array;
  private readonly isMedley: Uint8Array;
  private readonly bitOfKey: Int32Array;
  /** By position, of what is fixed there or later. */
  private readonly fixedBits: Int32Array;
  /** By position: breaks and fixed medleys there or later. */
  private readonly free: Int32Array;

  constructor(
    private readonly stage: Stage,
    private readonly weight: number,
  ) {
    const { plan, tonicOfKey } = stage;
    const count = plan.setStart.length;
    this.bitOfKey = Int32Array.from(tonicOfKey, (tonic) => (tonic < 0 ? 0 : 1 << tonic));
    const bitOf = plan.units.map(({ entries }, unit) =>
      entries.length > 1 ? 0 : this.bitOfKey[stage.headKey[unit]!]!,
    );
    this.bits = Int32Array.from(stage.members, ([member]) => bitOf[member!]!);
    this.isMedley = Uint8Array.from(stage.members, ([member]) =>
      plan.units[member!]!.entries.length > 1 ? 1 : 0,
    );
    this.fixedBits = new Int32Array(count + 1);
    this.free = new Int32Array(count + 1);
    for (let position = count - 1; position >= 0; position--) {
      const unit = plan.fixedUnitAt[position]!;
      const startsMedley =
        unit !== -1 && plan.units[unit]!.entries.length > 1 && plan.units[unit]!.fixedAt === position;
      this.fixedBits[position] = this.fixedBits[position + 1]! | (unit === -1 ? 0 : bitOf[unit]!);
      this.free[position] =
        this.free[position + 1]! + (plan.setStart[position] ? 1 : 0) + (startsMedley ? 1 : 0);
    }
  }

  /** As the low number of a score, for the packed state at `at` whose entries up to `position` are placed. */
  toGo(rows: Int32Array, at: number, position: number): number {
    const { stage } = this;
    let bits = this.fixedBits[position]!;
    let free = this.free[position]!;
    for (let c = 0; c < this.bits.length; c++) {
      if (stage.left(rows, at, c) === 0) continue;
      bits |= this.bits[c]!;
      free += this.isMedley[c]!;
    }
    bits &= ~this.bitOfKey[rows[at + stage.words + 1]!]!;
    let tonics = 0;
    for (let rest = bits; rest !== 0; rest &= rest - 1) tonics++;
    return Math.max(0, tonics - free) * this.weight;
  }
}
