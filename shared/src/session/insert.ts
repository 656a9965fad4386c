import type { Evening, EveningTune } from './evening';
import { compareLevels, levelsOf, type Level } from './levels';
import { TooManyWays } from './room-ways';
import { Weighing } from './weighing';

/** What one more tune costs at a place, which is counted in the evening's own sets. */
export interface Price {
  readonly setIndex: number;
  /** Where in that set the tune would stand. */
  readonly index: number;
  /** `pegChanges` with the tune at that place less without it. */
  readonly pegChanges: number;
  /**
   * The same for every level; null where so many tunings are accepted that only pegs were weighed, kind by
   * kind and whatever the goal.
   */
  readonly levels: Readonly<Record<Level, number>> | null;
}

interface Spot {
  readonly setIndex: number;
  readonly index: number;
  /** The same through the evening. */
  readonly position: number;
  readonly offClock: readonly [own: boolean, next: boolean];
}

/** Steps (of one kind, from one way to stand to another) for an evening, and for one tune at one of its places. */
const EVENING_STEPS = 40_000;
const PLACE_STEPS = 2_000;

/**
 * What one more tune costs at every place of an evening at once: what scoring each order anew would say (a
 * differential test holds it to that), for a hundredth of the work.
 */
export class Insertions {
  private readonly spots: readonly Spot[];
  private readonly together: Weighing | null;
  private alone: readonly Weighing[] | null = null;

  /** @param fixed how many tunes at the head of the first set keep their place (while live, the one that is now) */
  constructor(
    private readonly evening: Evening,
    private readonly fixed = 0,
  ) {
    this.spots = spotsOf(evening.sets).filter(({ setIndex, index }) => setIndex > 0 || index >= fixed);
    this.together = orNull(() => new Weighing(evening, EVENING_STEPS));
  }

  /** At every place, in the order of the evening. */
  everywhere(tune: EveningTune): readonly Price[] {
    const costs = this.costs(tune, this.spots);
    return this.spots.map((spot, place) => this.priced(spot, costs[place]!));
  }

  /**
   * At the place where the whole evening scores best by its goal; of equal ones the last, so that tunes that
   * are free anywhere follow each other. Null where no place is left.
   */
  cheapest(tune: EveningTune): Price | null {
    const costs = this.costs(tune, this.spots);
    let best = 0;
    for (let place = 1; place < costs.length; place++) {
      if (compareLevels(costs[place]!, costs[best]!) <= 0) best = place;
    }
    return costs.length === 0 ? null : this.priced(this.spots[best]!, costs[best]!);
  }

  /** As the next one: behind what is fixed or, where nothing is, behind the last tune of the evening. */
  next(tune: EveningTune): Price | null {
    const { sets } = this.evening;
    const setIndex =
      this.fixed > 0
        ? 0
        : Math.max(
            0,
            sets.findLastIndex((set) => set.length > 0),
          );
    const index = this.fixed > 0 ? this.fixed : (sets[setIndex]?.length ?? 0);
    const spot = this.spots.find((each) => each.setIndex === setIndex && each.index === index);
    return spot ? this.priced(spot, this.costs(tune, [spot])[0]!) : null;
  }

  /** By spot and level; where there are too many ways, of pegs alone. */
  private costs(tune: EveningTune, spots: readonly Spot[]): readonly (readonly number[])[] {
    const costs = this.together && orNull(() => addedAt(this.together!, tune, spots, PLACE_STEPS));
    if (costs) return costs;
    this.alone ??= this.evening.chairs.map(
      (chair) => new Weighing({ ...this.evening, chairs: [chair], goal: 'pegs' }, Infinity),
    );
    const kinds = this.alone.map((kind) => addedAt(kind, tune, spots, Infinity));
    return spots.map((_, place) => [kinds.reduce((sum, kind) => sum + kind[place]![0]!, 0)]);
  }

  private priced({ setIndex, index }: Spot, cost: readonly number[]): Price {
    const order = levelsOf(this.evening.goal);
    if (cost.length < order.length) return { setIndex, index, pegChanges: cost[0]!, levels: null };
    const levels = {} as Record<Level, number>;
    for (const [at, level] of order.entries()) levels[level] = cost[at]!;
    return { setIndex, index, pegChanges: levels.pegChanges, levels };
  }
}

/** Every place of these sets, empty ones too. A board without a set gets its first with its first tune. */
function spotsOf(sets: Evening['sets']): readonly Spot[] {
  if (sets.length === 0) return [{ setIndex: 0, index: 0, position: 0, offClock: [true, true] }];
  let start = 0;
  return sets.flatMap((set, setIndex) => {
    const spots = Array.from({ length: set.length + 1 }, (_, index): Spot => {
      // The tune that follows is the first of another set, or now has one before it.
      return { setIndex, index, position: start + index, offClock: [index === 0, index === set.length] };
    });
    start += set.length;
    return spots;
  });
}

function addedAt(
  weighing: Weighing,
  tune: EveningTune,
  spots: readonly Spot[],
  steps: number,
): readonly (readonly number[])[] {
  const added = weighing.adding(tune, steps);
  return spots.map(({ position, offClock }) => added(position, offClock));
}

function orNull<T>(weigh: () => T): T | null {
  try {
    return weigh();
  } catch (error) {
    if (error instanceof TooManyWays) return null;
    throw error;
  }
}
