/** Numbers that come again with their seed (mulberry32). */
export class Random {
  private state: number;

  constructor(seed: number) {
    this.state = Math.imul(seed, 2654435761) >>> 0;
  }

  /** From 0 to below 1. */
  next(): number {
    this.state = (this.state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(this.state ^ (this.state >>> 15), 1 | this.state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  }

  below(count: number): number {
    return Math.floor(this.next() * count);
  }

  pick<T>(list: readonly T[]): T {
    return list[this.below(list.length)]!;
  }

  /** A few come often, most seldom: the n-th of a list about 1/n as often as the first. */
  skewed(count: number): number {
    let total = 0;
    for (let rank = 1; rank <= count; rank++) total += 1 / rank;
    let left = this.next() * total;
    for (let rank = 1; rank <= count; rank++) {
      left -= 1 / rank;
      if (left < 0) return rank - 1;
    }
    return count - 1;
  }

  shuffled<T>(list: readonly T[]): T[] {
    const shuffled = [...list];
    for (let index = shuffled.length - 1; index > 0; index--) {
      const other = this.below(index + 1);
      [shuffled[index], shuffled[other]] = [shuffled[other]!, shuffled[index]!];
    }
    return shuffled;
  }
}
