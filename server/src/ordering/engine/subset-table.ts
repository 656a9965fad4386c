import type { Compiled } from './compiled';
import type { Goal } from '@pegwell/shared/session/evening';
import type { Steps } from './steps';

/** Table cells x moves tried for each; about 10 ms per million. */
export interface TableLimits {
  readonly joints: number;
  readonly work: number;
}

interface GroupMove {
  readonly to: number;
  readonly cost: number;
}

/**
 * For some of the kinds: the least pegs and turning places that are still to come from a joint stand, when
 * each of a set of groups must be visited at least once more, in any order. A group is what entries with the
 * same accepted tunings share.
 *
 * This is a shortest path over subsets (Held & Karp 1962), filled from the empty set up. Visiting each group
 * once is enough, because leaving a tune out never costs more (the triangle inequality); for the same
 * reason a group that suits the present stand is visited at once. Positions, pins and breaks play no part, so
 * it bounds every order from below.
 *
 * Where there are more groups than the limits allow, those nearest to another are left out; that only
 * lowers the bound.
 */
export class SubsetTable {
  /** By entry: the bit of its group, 0 where its group is not followed. */
  readonly bitOf: readonly number[];
  readonly groups: number;
  /** Whether every group is followed. */
  readonly complete: boolean;
  private readonly cells: Int32Array;
  private readonly joints: number[][] = [];
  private readonly known = new Map<string, number>();
  private readonly firstUnit: number;

  private constructor(
    private readonly compiled: Compiled,
    readonly kinds: readonly number[],
    private readonly goal: Goal,
    limits: TableLimits,
    steps: Steps,
  ) {
    const { entries } = compiled;
    const groupByKey = new Map<string, number>();
    const options: (readonly (readonly number[] | null)[])[] = [];
    const groupOf = entries.map((entry) => {
      const tunings = kinds.map((k) => this.tuningsOf(entry.options[k]!, k));
      if (tunings.every((list) => list === null)) return -1;
      const key = tunings.map((list) => list?.join(',') ?? 'any').join(';');
      let group = groupByKey.get(key);
      if (group === undefined) {
        group = options.push(tunings) - 1;
        groupByKey.set(key, group);
      }
      return group;
    });

    this.of(kinds.map((k) => compiled.kinds[k]!.tuningOf[compiled.kinds[k]!.opening]!));
    const moves: GroupMove[][][] = [];
    const mostTurns = options.length + 1;
    const peg = goal === 'pegs' ? mostTurns : 1;
    let dearest = 1;
    for (const k of kinds) dearest += Math.max(0, ...compiled.kinds[k]!.pegs);
    const turn = goal === 'pegs' ? 1 : dearest * mostTurns;
    this.firstUnit = Math.max(peg, turn);
    for (let joint = 0; joint < this.joints.length; joint++) {
      if (joint >= limits.joints) throw new TableTooLarge();
      steps.take(options.length);
      moves.push(options.map((lists) => this.movesFrom(joint, lists, peg, turn)));
    }

    const followed = this.followed(moves, limits.work);
    const bits = new Map(followed.map((group, bit) => [group, bit]));
    this.bitOf = groupOf.map((group) => (bits.has(group) ? 2 ** bits.get(group)! : 0));
    this.groups = followed.length;
    this.complete = followed.length === options.length;
    if (this.firstUnit * mostTurns * 2 > 2 ** 31 - 1 && goal === 'stops') throw new TableTooLarge();
    if (dearest * mostTurns * peg > 2 ** 31 - 1) throw new TableTooLarge();
    this.cells = this.filled(
      moves.map((row) => followed.map((group) => row[group]!)),
      steps,
    );
  }

  /** @returns null where these kinds stand in too many ways together. */
  static for(
    compiled: Compiled,
    kinds: readonly number[],
    goal: Goal,
    limits: TableLimits,
    steps: Steps,
  ): SubsetTable | null {
    try {
      return new SubsetTable(compiled, kinds, goal, limits, steps);
    } catch (error) {
      if (error instanceof TableTooLarge) return null;
      throw error;
    }
  }

  /** @param tunings of all kinds of the problem @returns the number by which the tables know them */
  joint(tunings: readonly number[]): number {
    return this.known.get(String.fromCharCode(...this.kinds.map((k) => tunings[k]!))) ?? -1;
  }

  /** Pegs still to come, and turning places; least in the goal's order of the two. */
  pegs(mask: number, joint: number): number {
    const cell = this.cells[mask * this.joints.length + joint]!;
    return this.goal === 'pegs' ? Math.floor(cell / this.firstUnit) : cell % this.firstUnit;
  }

  turns(mask: number, joint: number): number {
    const cell = this.cells[mask * this.joints.length + joint]!;
    return this.goal === 'pegs' ? cell % this.firstUnit : Math.floor(cell / this.firstUnit);
  }

  private tuningsOf(list: readonly { stance: number }[] | null, kind: number): readonly number[] | null {
    if (list === null) return null;
    const { tuningOf } = this.compiled.kinds[kind]!;
    return [...new Set(list.map(({ stance }) => tuningOf[stance]!))].sort((a, b) => a - b);
  }

  private of(tunings: number[]): number {
    const key = String.fromCharCode(...tunings);
    let joint = this.known.get(key);
    if (joint === undefined) {
      joint = this.joints.push(tunings) - 1;
      this.known.set(key, joint);
    }
    return joint;
  }

  private movesFrom(
    joint: number,
    lists: readonly (readonly number[] | null)[],
    peg: number,
    turn: number,
  ): GroupMove[] {
    const from = this.joints[joint]!;
    let partial = [{ tunings: [] as number[], pegs: 0 }];
    lists.forEach((list, index) => {
      const { pegs, tunings: width } = this.compiled.kinds[this.kinds[index]!]!;
      const before = from[index]!;
      partial = partial.flatMap((way) =>
        (list ?? [before]).map((after) => ({
          tunings: [...way.tunings, after],
          pegs: way.pegs + pegs[before * width + after]!,
        })),
      );
      if (partial.length > MOST_WAYS) throw new TableTooLarge();
    });
    const moves = partial.map(({ tunings, pegs }) => ({
      to: this.of(tunings),
      cost: pegs * peg + (pegs > 0 ? turn : 0),
    }));
    // To stay is never worse than another way: what that reaches is reached from here for no more.
    const still = moves.find(({ to, cost }) => to === joint && cost === 0);
    return still ? [still] : moves;
  }

  /** The groups to follow: as many as the limits allow, the one nearest to another dropped first. */
  private followed(moves: readonly GroupMove[][][], work: number): number[] {
    let followed = moves[0]!.map((_, group) => group);
    let ways = 0;
    for (const row of moves) for (const list of row) ways += list.length;
    const each = ways / Math.max(1, followed.length);
    while (followed.length > 0 && 2 ** followed.length * followed.length * each > work) {
      const reach = followed.map((group) => {
        // The least cost of this group from stands where another group has just been played.
        let nearest = Infinity;
        for (const other of followed) {
          if (other === group) continue;
          for (const { to } of moves[0]![other]!) {
            for (const move of moves[to]![group]!) nearest = Math.min(nearest, move.cost);
          }
        }
        return nearest;
      });
      const nearest = reach.indexOf(Math.min(...reach));
      followed = followed.filter((_, index) => index !== nearest);
    }
    return followed;
  }

  private filled(moves: readonly GroupMove[][][], steps: Steps): Int32Array {
    const width = this.joints.length;
    const sets = 2 ** this.groups;
    const cells = new Int32Array(sets * width);
    for (let mask = 1; mask < sets; mask++) {
      steps.take(width);
      for (let joint = 0; joint < width; joint++) {
        const row = moves[joint]!;
        let least = 2 ** 31 - 1;
        // A group that suits this stand ends the row: what it leaves is the least there is.
        for (let rest = mask; rest !== 0; rest &= rest - 1) {
          const group = 31 - Math.clz32(rest & -rest);
          const without = (mask ^ (1 << group)) * width;
          const ways = row[group]!;
          const stays = ways.length === 1 && ways[0]!.to === joint;
          if (stays) {
            least = cells[without + joint]!;
            break;
          }
          for (const { to, cost } of ways) {
            const value = cost + cells[without + to]!;
            if (value < least) least = value;
          }
        }
        cells[mask * width + joint] = least;
      }
    }
    return cells;
  }
}

const MOST_WAYS = 2000;

class TableTooLarge extends Error {}
