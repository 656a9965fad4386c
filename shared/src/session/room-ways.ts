import type { Chair, Evening, EveningTune } from './evening';
import { arrivalOf } from './kind-paths';
import { changesOf, standsFor, type Change, type Stand } from './kind-steps';
import { compareLevels, levelsOf } from './levels';
import type { OrderPlace } from './running-order';

/** One way in which the whole room can stand, and the least that it costs to stand so. */
export interface Way {
  /** By kind: the number of its stand. */
  readonly stands: readonly number[];
  /** By level in the goal's order. Spaced rhythms and key changes depend on the order alone and are left out. */
  readonly cost: readonly number[];
}

interface Option {
  readonly stand: number;
  /** Chairs for whom it is not the first choice. */
  readonly second: number;
}

/** What a tune asks of the room: by kind, the stands it accepts, or null where the kind keeps what it has. */
export interface Asked {
  readonly kinds: readonly (readonly Option[] | null)[];
  /** The same for tunes that ask the same. */
  readonly key: string;
}

/** Thrown where the room can stand in more ways than there is time to weigh. */
export class TooManyWays extends Error {}

/** The number of the free stand. */
const FREE = 0;

/**
 * The room through an evening, all kinds together: from the ways to stand before a tune to those after it.
 * A dynamic program, as in choices.ts, but with stands that keep their number all evening, so that ways
 * reckoned from the front and from the back meet anywhere, around a tune that is not there yet.
 */
export class RoomWays {
  readonly opening: readonly Way[];
  /** How many more steps of one kind may be weighed before {@link TooManyWays}; set by who asks. */
  stepsLeft = Infinity;
  private readonly kinds: readonly NumberedStands[];
  private readonly index: Readonly<
    Record<'pegs' | 'stops' | 'breaks' | 'second' | 'capo' | 'semitones', number>
  >;

  constructor(evening: Evening) {
    const order = levelsOf(evening.goal);
    this.index = {
      pegs: order.indexOf('pegChanges'),
      stops: order.indexOf('retuneStops'),
      breaks: order.indexOf('ruleBreaks'),
      second: order.indexOf('secondChoices'),
      capo: order.indexOf('capoMoves'),
      semitones: order.indexOf('semitones'),
    };
    this.kinds = evening.chairs
      .filter(({ count }) => count > 0)
      .map((chair) => new NumberedStands(chair, arrivalOf(evening, chair.kind)));
    this.opening = [{ stands: this.kinds.map(({ arrival }) => arrival), cost: order.map(() => 0) }];
  }

  asked({ accepted }: Pick<EveningTune, 'accepted'>): Asked {
    const kinds = this.kinds.map((kind) => kind.accepting(accepted[kind.id] ?? 'any'));
    const key = kinds.map((list) => list?.map(({ stand, second }) => `${stand}.${second}`).join() ?? '');
    return { kinds, key: key.join(';') };
  }

  /** @throws TooManyWays */
  after(
    ways: readonly Way[],
    asked: Asked,
    place: Pick<OrderPlace, 'offClock' | 'inMedley'>,
  ): readonly Way[] {
    let halves: Half[] = ways.map(({ stands, cost }) => halfOf(stands, cost, false, false));
    for (const [k, options] of asked.kinds.entries()) {
      if (options === null) continue;
      this.stepsLeft -= halves.length * options.length;
      if (this.stepsLeft < 0) throw new TooManyWays();
      if (options.length === 1) {
        for (const half of halves) this.step(half, k, options[0]!, place);
        continue;
      }
      const made: Half[] = [];
      for (const half of halves) {
        for (const option of options) {
          const copy = halfOf(half.stands, half.cost, half.turned, half.broken);
          this.step(copy, k, option, place);
          made.push(copy);
        }
      }
      halves = cheapest(made);
    }
    // Who turned at this place does not matter at the next.
    for (const half of halves) half.turned = half.broken = false;
    return cheapest(halves);
  }

  /** Takes a half on by one kind. */
  private step(
    half: Half,
    k: number,
    { stand, second }: Option,
    { offClock, inMedley }: Pick<OrderPlace, 'offClock' | 'inMedley'>,
  ): void {
    const { index } = this;
    const { stands, cost } = half;
    const change = this.kinds[k]!.change(stands[k]!, stand);
    stands[k] = stand;
    cost[index.pegs]! += change.pegs;
    cost[index.second]! += second;
    cost[index.semitones]! += change.semitones;
    if (!offClock) {
      cost[index.capo]! += change.capo;
      if (change.turns && !half.turned) cost[index.stops]! += 1;
      half.turned ||= change.turns;
    }
    if (inMedley) {
      if (change.changes && !half.broken) cost[index.breaks]! += 1;
      half.broken ||= change.changes;
    }
  }
}

interface Half {
  readonly stands: number[];
  readonly cost: number[];
  /** At this place somebody has turned (on the clock), or changed (inside a medley). */
  turned: boolean;
  broken: boolean;
}

function halfOf(stands: readonly number[], cost: readonly number[], turned: boolean, broken: boolean): Half {
  return { stands: stands.slice(), cost: cost.slice(), turned, broken };
}

/** Of halves with the same future, the cheapest. */
function cheapest(halves: Half[]): Half[] {
  if (halves.length < 2) return halves;
  const best = new Map<string, Half>();
  for (const half of halves) {
    const key = `${half.stands.join()}${half.turned ? 't' : ''}${half.broken ? 'b' : ''}`;
    const rival = best.get(key);
    if (rival === undefined || compareLevels(half.cost, rival.cost) < 0) best.set(key, half);
  }
  return [...best.values()];
}

/** The stands of one kind by number, as they are met; and the changes between them, reckoned once. */
class NumberedStands {
  readonly id: string;
  readonly arrival: number;
  private readonly numbers = new Map<string, number>([['', FREE]]);
  private readonly stands: Stand[] = [{ tuned: null, position: 0, same: '' }];
  private readonly changes: Change[][] = [[]];
  private readonly changeOf: (from: Stand, to: Stand) => Change;

  constructor(
    private readonly chair: Chair,
    arrival: Stand,
  ) {
    this.id = chair.kind.id;
    this.changeOf = changesOf(chair);
    this.arrival = this.numberOf(arrival);
  }

  accepting(accepted: EveningTune['accepted'][string]): Asked['kinds'][number] {
    if (accepted === 'any' || accepted.length === 0) return null;
    return standsFor(accepted).map((stand) => ({
      stand: this.numberOf(stand),
      second: stand.position > 0 ? this.chair.count : 0,
    }));
  }

  change(from: number, to: number): Change {
    return (this.changes[from]![to] ??= this.changeOf(this.stands[from]!, this.stands[to]!));
  }

  private numberOf(stand: Stand): number {
    const known = this.numbers.get(stand.same);
    if (known !== undefined) return known;
    const number = this.stands.push(stand) - 1;
    this.numbers.set(stand.same, number);
    this.changes.push([]);
    return number;
  }
}
