import type { Goal } from '@pegwell/shared/session/evening';
import type { Compiled, CompiledEntry } from './compiled';
import type { Steps } from './steps';

export interface TuningMove {
  /** The joint stand it leads to. */
  readonly to: number;
  /** Pegs and turning places, packed: see {@link TuningMoves.pegs}. */
  readonly cost: number;
}

/** Thrown where these kinds stand in too many ways together for a table. */
export class TooManyStands extends Error {}

const MOST_WAYS = 2000;
/** No order can go on from there. */
export const NEVER = 2 ** 30;

/**
 * Some of the kinds, at tunings alone: every way they can stand together, and what it costs to go from each to
 * each group. A group is what entries with the same accepted tunings share.
 *
 * A cost holds pegs and turning places as two digits of one integer, in the goal's order of the two.
 */
export class TuningMoves {
  /** By entry; -1 where it says `any` for all these kinds. */
  readonly groupOf: readonly number[];
  /** By joint stand and group. */
  readonly moves: readonly (readonly (readonly TuningMove[])[])[];
  /** By group and kind: the tunings accepted; null for all. */
  private readonly groups: (readonly (readonly number[] | null)[])[] = [];
  private readonly joints: number[][] = [];
  private readonly known = new Map<string, number>();
  /** By kind: the tunings that tunes state. */
  private readonly stated: readonly (readonly number[])[];
  private readonly peg: number;
  private readonly turn: number;

  /** @throws TooManyStands, OutOfSteps */
  constructor(
    private readonly compiled: Compiled,
    readonly kinds: readonly number[],
    private readonly goal: Goal,
    mostJoints: number,
    steps: Steps,
  ) {
    const groupByKey = new Map<string, number>();
    this.groupOf = compiled.entries.map((entry) => {
      const tunings = this.tuningsOf(entry);
      if (tunings.every((list) => list === null)) return -1;
      const key = tunings.map((list) => list?.join(',') ?? 'any').join(';');
      const known = groupByKey.get(key) ?? this.groups.push(tunings) - 1;
      groupByKey.set(key, known);
      return known;
    });
    // No path turns more often than there are entries, nor for more than the dearest move each time.
    const most = compiled.entries.length + 1;
    const dearest = kinds.reduce((sum, k) => sum + Math.max(0, ...compiled.kinds[k]!.pegs), 1);
    this.peg = goal === 'pegs' ? most : 1;
    this.turn = goal === 'pegs' ? 1 : dearest * most;
    if (dearest * most * most >= NEVER) throw new TooManyStands();

    this.stated = kinds.map((_, index) => [...new Set(this.groups.flatMap((lists) => lists[index] ?? []))]);
    this.of(kinds.map((k) => compiled.kinds[k]!.tuningOf[compiled.kinds[k]!.opening]!));
    const moves: (readonly TuningMove[])[][] = [];
    for (let joint = 0; joint < this.joints.length; joint++) {
      if (joint >= mostJoints) throw new TooManyStands();
      steps.take(this.groups.length * kinds.length);
      moves.push(this.groups.map((lists) => this.movesFrom(joint, lists)));
    }
    this.moves = moves;
  }

  get joinedStands(): number {
    return this.joints.length;
  }

  /** @param tunings of all kinds of the problem @returns the joint stand of these kinds */
  joint(tunings: readonly number[]): number {
    return this.known.get(String.fromCharCode(...this.kinds.map((k) => tunings[k]!))) ?? -1;
  }

  /** Whether one group can be played wherever another has just been played, with nothing turned. */
  follows(group: number, other: number): boolean {
    return this.groups[group]!.every((list, index) => {
      const theirs = this.groups[other]![index] ?? null;
      return list === null || (theirs !== null && theirs.every((tuning) => list.includes(tuning)));
    });
  }

  pegs(cost: number): number {
    return this.goal === 'pegs' ? Math.floor(cost / this.peg) : cost % this.turn;
  }

  turns(cost: number): number {
    return this.goal === 'pegs' ? cost % this.peg : Math.floor(cost / this.turn);
  }

  /** The least cost to each stand through entries in a row. */
  through(joint: number, entries: readonly number[]): readonly TuningMove[] {
    let ways = new Map<number, number>([[joint, 0]]);
    for (const entry of entries) {
      const group = this.groupOf[entry]!;
      if (group === -1) continue;
      const next = new Map<number, number>();
      for (const [from, before] of ways) {
        for (const { to, cost } of this.moves[from]![group]!) {
          next.set(to, Math.min(next.get(to) ?? NEVER, before + cost));
        }
      }
      ways = next;
    }
    return [...ways].map(([to, cost]) => ({ to, cost }));
  }

  private tuningsOf({ options }: CompiledEntry): readonly (readonly number[] | null)[] {
    return this.kinds.map((k) => {
      const { tuningOf } = this.compiled.kinds[k]!;
      const list = options[k] ?? null;
      return list && [...new Set(list.map(({ stance }) => tuningOf[stance]!))].sort((a, b) => a - b);
    });
  }

  private of(tunings: number[]): number {
    const key = String.fromCharCode(...tunings);
    const known = this.known.get(key) ?? this.joints.push(tunings) - 1;
    this.known.set(key, known);
    return known;
  }

  /**
   * Every way to go on with a group. A kind that is silent there may turn along where another must turn anyway:
   * the tune at which it really turned may be one that is left out, and then it turns here, at the next. Without
   * that, leaving tunes out could cost a turning place more.
   */
  private movesFrom(joint: number, lists: readonly (readonly number[] | null)[]): readonly TuningMove[] {
    const from = this.joints[joint]!;
    let partial = [{ tunings: [] as number[], pegs: 0 }];
    lists.forEach((list, index) => {
      const { pegs, tunings: width } = this.compiled.kinds[this.kinds[index]!]!;
      const before = from[index]!;
      partial = partial.flatMap((way) =>
        (list ?? this.within(index, before)).map((after) => ({
          tunings: [...way.tunings, after],
          pegs: way.pegs + pegs[before * width + after]!,
        })),
      );
      if (partial.length > MOST_WAYS) throw new TooManyStands();
    });
    const moves = partial.map(({ tunings, pegs }) => ({
      to: this.of(tunings),
      cost: pegs * this.peg + (pegs > 0 ? this.turn : 0),
    }));
    // To rest is never worse than another way: what that reaches is reached from the next group for no more. But a
    // search may go there all the same, so those stands are numbered too.
    const rests = from.every((before, index) => lists[index]?.includes(before) ?? true);
    return rests ? [{ to: joint, cost: 0 }] : moves;
  }

  /** Where a silent kind may go: it stays, or takes a tuning that some tune states. */
  private within(index: number, before: number): readonly number[] {
    return [before, ...this.stated[index]!.filter((tuning) => tuning !== before)];
  }
}
