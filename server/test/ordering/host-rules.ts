import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';

/** Whether a whole order keeps the host's rules, each said as score.md says it. */
export function keepsRules(problem: OrderingProblem, order: readonly string[]): boolean {
  const at = new Map(order.map((id, position) => [id, position]));
  const setOf = problem.sets.flatMap((set, index) => set.map(() => index));
  return (
    Object.entries(problem.pins).every(([id, position]) => order[position] === id) &&
    problem.befores.every(([first, second]) => at.get(first)! < at.get(second)!) &&
    problem.medleys.every((medley) => {
      const start = at.get(medley[0]!)!;
      return medley.every(
        (id, index) => order[start + index] === id && setOf[start + index] === setOf[start],
      );
    })
  );
}

/** The same rules asked tune by tune, as an order grows. Tunes are indices in the host's order. */
export class GrowingOrder {
  private readonly pin = new Map<number, number>();
  private readonly pinnedAt = new Map<number, number[]>();
  private readonly earlier: readonly number[];
  private readonly follower: readonly number[][];
  private readonly leader: readonly number[][];
  private readonly setStart: readonly boolean[];

  constructor(problem: OrderingProblem) {
    const ids = problem.sets.flat();
    const index = new Map(ids.map((id, position) => [id, position]));
    this.setStart = problem.sets.flatMap((set) => set.map((_, position) => position === 0));
    for (const [id, position] of Object.entries(problem.pins)) {
      this.pin.set(index.get(id)!, position);
      this.pinnedAt.set(position, [...(this.pinnedAt.get(position) ?? []), index.get(id)!]);
    }
    const earlier = ids.map(() => 0);
    for (const [first, second] of problem.befores) earlier[index.get(second)!]! |= 1 << index.get(first)!;
    this.earlier = earlier;
    this.follower = ids.map(() => []);
    this.leader = ids.map(() => []);
    for (const medley of problem.medleys) {
      for (let place = 1; place < medley.length; place++) {
        const [a, b] = [index.get(medley[place - 1]!)!, index.get(medley[place]!)!];
        this.follower[a]!.push(b);
        this.leader[b]!.push(a);
      }
    }
  }

  /** Whether any rule names the tune, so that it is not as good as another. */
  names(tune: number): boolean {
    const one = 1 << tune;
    return (
      this.pin.has(tune) ||
      this.earlier[tune] !== 0 ||
      this.earlier.some((mask) => (mask & one) !== 0) ||
      this.follower[tune]!.length + this.leader[tune]!.length > 0
    );
  }

  /**
   * @param previous the tune before, -1 at the beginning
   * @param placed bits of the tunes placed so far (those that rules name, at least)
   */
  mayCome(tune: number, position: number, previous: number, placed: number): boolean {
    if ((this.pin.get(tune) ?? position) !== position) return false;
    if (this.pinnedAt.get(position)?.some((pinned) => pinned !== tune)) return false;
    if ((this.earlier[tune]! & ~placed) !== 0) return false;
    if (previous !== -1 && this.follower[previous]!.some((next) => next !== tune)) return false;
    const leaders = this.leader[tune]!;
    return leaders.length === 0 || (!this.setStart[position] && leaders.every((led) => led === previous));
  }

  mayEnd(last: number): boolean {
    return last === -1 || this.follower[last]!.length === 0;
  }

  inMedley(previous: number, tune: number): boolean {
    return previous !== -1 && this.follower[previous]!.includes(tune);
  }
}
