import type { Evening, EveningTune } from './evening';
import { compareLevels, levelsOf } from './levels';
import { RoomWays, type Asked, type Way } from './room-ways';
import { placesOf, placing, type OrderPlace } from './running-order';

type Cost = readonly number[];

/**
 * An evening weighed from both ends, so that one more tune can be weighed anywhere in it: `before[p]` are the
 * ways to stand before place p with the least each costs, `toGo[p]` the least that is still to come from
 * there. Costs are by level, in the goal's order.
 */
export class Weighing {
  private readonly ways: RoomWays;
  private readonly places: readonly OrderPlace[];
  private readonly asks: readonly Asked[];
  private readonly before: readonly (readonly Way[])[];
  private readonly toGo: readonly (readonly Way[])[];
  /** By place and kind: whether the kind is told a tuning there or later. */
  private readonly told: readonly (readonly boolean[])[];
  private readonly placeOf: ReturnType<typeof placing>;
  private readonly breaks: number;
  private readonly keys: number;
  /** The cost of the choices without any more tune. */
  private readonly without: Cost;
  /** By what a tune asks, then by position and off the clock or not. */
  private readonly known = new Map<string, Cost[]>();

  /** @throws TooManyWays where more than `steps` would have to be weighed */
  constructor(evening: Evening, steps: number) {
    this.ways = new RoomWays(evening);
    this.ways.stepsLeft = steps;
    this.placeOf = placing(evening);
    const order = levelsOf(evening.goal);
    this.breaks = order.indexOf('ruleBreaks');
    this.keys = order.indexOf('keyChanges');
    this.places = placesOf(evening);
    this.asks = this.places.map(({ tune }) => this.ways.asked(tune));

    const before: (readonly Way[])[] = [this.ways.opening];
    for (const [p, place] of this.places.entries()) {
      before.push(this.ways.after(before[p]!, this.asks[p]!, place));
    }
    this.before = before;

    const end = this.places.length;
    const told = new Array<readonly boolean[]>(end + 1);
    told[end] = this.ways.opening[0]!.stands.map(() => false);
    for (let p = end - 1; p >= 0; p--) {
      told[p] = told[p + 1]!.map((later, k) => later || this.asks[p]!.kinds[k] !== null);
    }
    this.told = told;

    const nothing = order.map(() => 0);
    const toGo = new Array<Way[]>(end + 1);
    this.toGo = toGo;
    for (let p = end; p >= 0; p--) {
      const here: Way[] = (toGo[p] = []);
      for (const { stands } of before[p]!) {
        if (this.fromHere(p, stands)) continue;
        const next =
          p === end ? null : this.ways.after([{ stands, cost: nothing }], this.asks[p]!, this.places[p]!);
        here.push({ stands, cost: next === null ? nothing : this.least(next, p + 1)! });
      }
    }
    this.without = this.fromHere(0, this.ways.opening[0]!.stands)!;
  }

  /**
   * What a tune adds to each level where it is played as number `p` (from 0).
   * @returns reckons one place; `offClock` is said of the place before the tune and of the one that follows it
   * @throws TooManyWays (from what is returned) where more than `steps` would have to be weighed at a place
   */
  adding(tune: EveningTune, steps: number): (p: number, offClock: readonly [boolean, boolean]) => Cost {
    const asked = this.ways.asked(tune);
    let known = this.known.get(asked.key);
    if (!known) this.known.set(asked.key, (known = []));
    return (p, offClock) => {
      const next = this.places[p];
      const own = this.placeOf(this.places[p - 1]?.tune ?? null, tune, offClock[0]);
      const follows = next && this.placeOf(tune, next.tune, offClock[1]);
      // What the choices cost whatever the key and rhythm: once for all tunes that ask the same.
      const where = 4 * p + (offClock[0] ? 2 : 0) + (offClock[1] ? 1 : 0);
      let chosen = known[where];
      if (!chosen) {
        this.ways.stepsLeft = steps;
        known[where] = chosen = this.weighed(asked, p, own, follows);
      }
      const cost = chosen.map((value, level) => value - this.without[level]!);
      if (next) this.count(next, -1, cost);
      this.count(own, 1, cost);
      if (follows) this.count(follows, 1, cost);
      return cost;
    };
  }

  /** What depends on the order alone. */
  private count(place: OrderPlace, times: number, cost: number[]): void {
    if (place.spacedPair) cost[this.breaks]! += times;
    if (place.keyChange) cost[this.keys]! += times;
  }

  private weighed(asked: Asked, p: number, own: OrderPlace, follows: OrderPlace | undefined): Cost {
    let ways = this.ways.after(this.before[p]!, asked, own);
    let at = p;
    // Up to the first tune before which the room stands as it might have stood anyway.
    if (follows) ways = this.ways.after(ways, this.asks[at++]!, follows);
    for (;;) {
      const least = this.least(ways, at);
      if (least !== null) return least;
      ways = this.ways.after(ways, this.asks[at]!, this.places[at]!);
      at++;
    }
  }

  /** The least cost of going on from one of these ways before place p; null where one of them is not known. */
  private least(ways: readonly Way[], p: number): Cost | null {
    let best: Cost | null = null;
    for (const { stands, cost } of ways) {
      const toGo = this.fromHere(p, stands);
      if (!toGo) return null;
      const sum = cost.map((value, level) => value + toGo[level]!);
      if (best === null || compareLevels(sum, best) < 0) best = sum;
    }
    return best;
  }

  /** What is still to come where the room stands so; kinds that are told nothing any more may stand as they like. */
  private fromHere(p: number, stands: readonly number[]): Cost | undefined {
    const told = this.told[p]!;
    return this.toGo[p]!.find((way) => way.stands.every((stand, k) => !told[k] || stand === stands[k]))?.cost;
  }
}
