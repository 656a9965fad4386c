import { closedSets, setsOf, type ClosedSets } from './closed-sets';
import type { Steps } from './steps';
import { NEVER, type TuningMove, type TuningMoves } from './tuning-moves';
import type { Plan } from './units';

/** A fixed unit that the tables wait for. */
export interface Milestone {
  readonly unit: number;
  readonly position: number;
  /** Positions before it, and after, that are not fixed. */
  readonly freeBefore: number;
  readonly freeAfter: number;
}

/** Cells times moves tried for each: of a table that follows every group, and of one that leaves some out. */
export interface TableWork {
  readonly whole: number;
  readonly part: number;
}

/** Something that must still come: entries of a group, or one unit with rules of its own. */
interface Element {
  readonly group: number;
  readonly unit: number | null;
  /** Free entries it stands for, and how many positions it takes at least as long as it is not done. */
  count: number;
  atLeast: number;
}

/**
 * The least pegs and turning places that are still to come from a joint stand, when each of a set of elements
 * must be visited at least once more.
 *
 * This is a shortest path over subsets (Held & Karp 1962), filled from the empty set up. Visiting a group
 * once is enough, because leaving a tune out never costs more (the triangle inequality, with kinds that are silent
 * at a tune free to turn along with others: see TuningMoves). A visit is a
 * group's *last*: so the groups that are done before a milestone have all their free entries before it, no
 * more of them than there are free positions; and those not done each have an entry after it. Medleys are
 * passed from end to end, and before/after pairs in their order. Other positions and breaks play no part, so
 * the table bounds every order from below.
 *
 * A group that can be played wherever another has just been is brought along by it: it takes no visit of its own
 * while the other is still to come. So only closed sets have cells, which are far fewer than all (15 groups of an
 * evening with alternatives and silent kinds: some 2,000 of 32,768). What a set says of positions is read
 * either way in favour of passing a milestone: brought along counts as not done before it, and as not needing a
 * place after it.
 *
 * Where there are more elements than the work allowed, pairs are read as mere members of their groups, and
 * then the groups nearest to another are left out; both only lower the bound.
 */
export class SubsetTable {
  /** By unit: the bits it keeps set until it is placed. */
  readonly bitsOf: readonly number[];
  /** Whether every group is followed. */
  readonly complete: boolean;
  /** Whether every unit with rules of its own is followed too, so that more work would add nothing. */
  readonly full: boolean;
  private readonly size: number;
  /** By mask: its closed set. */
  private readonly setOf: Int32Array;
  private readonly sets: number;
  private readonly cells: Int32Array;

  constructor(
    readonly tunings: TuningMoves,
    private readonly plan: Plan,
    private readonly milestones: readonly Milestone[],
    work: TableWork,
    steps: Steps,
  ) {
    const { elements, bitsOf, complete, full } = this.chosen(work);
    this.bitsOf = bitsOf;
    this.complete = complete;
    this.full = full;
    this.size = elements.length;
    const closures = this.closures(elements);
    const closed = closedSets(closures, Infinity)!;
    this.setOf = setsOf(closed.masks, closures);
    this.sets = closed.masks.length;
    this.cells = this.filled(elements, closed, steps);
  }

  /** What is still to come from a joint stand; read by TuningMoves. */
  toGo(mask: number, joint: number, milestonesLeft: number): number {
    return this.cells[(milestonesLeft * this.sets + this.setOf[mask]!) * this.tunings.joinedStands + joint]!;
  }

  private chosen(work: TableWork): {
    elements: Element[];
    bitsOf: number[];
    complete: boolean;
    full: boolean;
  } {
    const { units } = this.plan;
    const { groupOf, moves } = this.tunings;
    const awaited = new Set(this.milestones.map(({ unit }) => unit));
    // Units with rules of their own, medleys last, so that pairs are given up first.
    const own = units.flatMap(({ plain, fixedAt }, unit) => (plain || fixedAt !== null ? [] : [unit]));
    own.sort((a, b) => units[b]!.entries.length - units[a]!.entries.length || a - b);
    let ways = 0;
    for (const row of moves) for (const list of row) ways += list.length;
    const each = ways / Math.max(1, moves[0]!.length);
    const fits = (groups: Iterable<number>, work: number): boolean => {
      const most = work / (this.milestones.length + 1) / each;
      return closedSets(this.closures(this.elements(own, [...groups])), most) !== null;
    };

    const rulesOfTheirOwn = own.length;
    let groups = this.groupsOf(own, awaited);
    while (own.length > 0 && !fits(groups, work.whole)) {
      own.pop();
      groups = this.groupsOf(own, awaited);
    }
    const complete = fits(groups, work.whole);
    let followed = [...groups];
    while (!complete && followed.length > 0 && !fits(followed, work.part)) {
      const nearest = this.nearest(followed);
      followed = followed.filter((group) => group !== nearest);
    }

    const elements = this.elements(own, followed);
    const bitsOf = units.map(({ entries, fixedAt }, unit) => {
      const itself = elements.findIndex((element) => element.unit === unit);
      if (itself !== -1) return 2 ** itself;
      if (awaited.has(unit)) return 0;
      let bits = 0;
      for (const entry of entries) {
        const index = followed.indexOf(groupOf[entry]!);
        if (index === -1) continue;
        bits |= 2 ** index;
        if (fixedAt === null) elements[index]!.count++;
        // Still to come perhaps only for a fixed entry, which takes none of the free positions.
        else elements[index]!.atLeast = 0;
      }
      return bits;
    });
    return { elements, bitsOf, complete, full: complete && own.length === rulesOfTheirOwn };
  }

  private elements(own: readonly number[], groups: readonly number[]): Element[] {
    const elements: Element[] = groups.map((group) => ({ group, unit: null, count: 0, atLeast: 1 }));
    for (const unit of own) {
      const { length } = this.plan.units[unit]!.entries;
      elements.push({ group: -1, unit, count: length, atLeast: length });
    }
    return elements;
  }

  /** By element: itself, and the groups that can be played where it has just been, with nothing turned. */
  private closures(elements: readonly Element[]): number[] {
    const { groupOf } = this.tunings;
    return elements.map(({ group, unit }, index) => {
      const last = unit === null ? group : groupOf[this.plan.units[unit]!.entries.at(-1)!]!;
      let mask = 1 << index;
      if (last === -1) return mask;
      elements.forEach((other, bit) => {
        if (other.unit === null && bit !== index && this.tunings.follows(other.group, last)) mask |= 1 << bit;
      });
      return mask;
    });
  }

  /** Groups of the units that are not followed one by one. */
  private groupsOf(own: readonly number[], awaited: ReadonlySet<number>): Set<number> {
    const groups = new Set<number>();
    this.plan.units.forEach(({ entries }, unit) => {
      if (own.includes(unit) || awaited.has(unit)) return;
      for (const entry of entries) groups.add(this.tunings.groupOf[entry]!);
    });
    groups.delete(-1);
    return groups;
  }

  /** The group that costs least from where another has just been played. */
  private nearest(groups: readonly number[]): number {
    const { moves } = this.tunings;
    let [nearest, least] = [groups[0]!, Infinity];
    for (const group of groups) {
      for (const other of groups) {
        if (other === group) continue;
        for (const { to } of moves[0]![other]!) {
          for (const { cost } of moves[to]![group]!) if (cost < least) [nearest, least] = [group, cost];
        }
      }
    }
    return nearest;
  }

  /** Table by table, from the one with no milestone ahead to the one with all. */
  private filled(elements: readonly Element[], { masks, firsts }: ClosedSets, steps: Steps): Int32Array {
    const { tunings, plan, milestones, size, setOf } = this;
    const width = tunings.joinedStands;
    const sets = masks.length;
    const cells = new Int32Array((milestones.length + 1) * sets * width);
    const sum = (mask: number, of: (element: Element) => number): number =>
      elements.reduce((total, element, bit) => total + (mask & (1 << bit) ? of(element) : 0), 0);
    const left = masks.map((mask) => sum(mask, ({ count }) => count));
    const undone = firsts.map((mask) => sum(mask, ({ atLeast }) => atLeast));
    const all = left[sets - 1]!;
    const { start, to, cost } = this.columns(elements);
    const bitOf = new Map(elements.flatMap(({ unit }, bit) => (unit === null ? [] : [[unit, bit] as const])));
    const waits = elements.map(({ unit }) => this.waits(unit, bitOf));
    const milestoneWaits = milestones.map(({ unit }) => this.waits(unit, bitOf).mask);
    const passing = milestones.map(({ unit }) =>
      tunings.moves.map((_, joint) => tunings.through(joint, plan.units[unit]!.entries)),
    );

    for (let ahead = 0; ahead <= milestones.length; ahead++) {
      const base = ahead * sets;
      const next = milestones.length - ahead;
      const milestone = milestones[next];
      for (let set = 0; set < sets; set++) {
        if (set === 0 && ahead === 0) continue;
        const mask = masks[set]!;
        steps.take(width);
        const mayPass =
          milestone !== undefined &&
          all - left[set]! <= milestone.freeBefore &&
          undone[set]! <= milestone.freeAfter &&
          (mask & milestoneWaits[next]!) === 0;
        let open = 0;
        for (let bit = 0; bit < size; bit++) {
          if (firsts[set]! & (1 << bit) && !(mask & waits[bit]!.mask) && ahead <= waits[bit]!.ahead)
            open |= 1 << bit;
        }
        for (let joint = 0; joint < width; joint++) {
          const row = joint * size;
          let least = NEVER;
          if (mayPass) {
            const beyond = (base - sets + set) * width;
            for (const move of passing[next]![joint]!)
              least = Math.min(least, move.cost + cells[beyond + move.to]!);
          }
          for (let rest = open; rest !== 0; rest &= rest - 1) {
            const bit = 31 - Math.clz32(rest & -rest);
            const without = (base + setOf[mask ^ (1 << bit)]!) * width;
            const first = start[row + bit]!;
            const end = start[row + bit + 1]!;
            // With no milestone ahead, what suits this stand ends the row: what it leaves is the least.
            if (ahead === 0 && end === first + 1 && to[first] === joint && cost[first] === 0) {
              least = cells[without + joint]!;
              break;
            }
            for (let way = first; way < end; way++) {
              const value = cost[way]! + cells[without + to[way]!]!;
              if (value < least) least = value;
            }
          }
          cells[(base + set) * width + joint] = least < NEVER ? least : NEVER;
        }
      }
    }
    return cells;
  }

  /** Moves in columns: those from a joint stand with an element begin at `start[joint * elements + element]`. */
  private columns(elements: readonly Element[]): { start: Int32Array; to: Int32Array; cost: Int32Array } {
    const { moves } = this.tunings;
    const lists: (readonly TuningMove[])[] = moves.flatMap((row, joint) =>
      elements.map(({ group, unit }) =>
        unit === null ? row[group]! : this.tunings.through(joint, this.plan.units[unit]!.entries),
      ),
    );
    const start = new Int32Array(lists.length + 1);
    lists.forEach((list, index) => (start[index + 1] = start[index]! + list.length));
    const flat = lists.flat();
    return {
      start,
      to: Int32Array.from(flat, (move) => move.to),
      cost: Int32Array.from(flat, (move) => move.cost),
    };
  }

  /** Elements that must be done first, and the most milestones that may be ahead. */
  private waits(unit: number | null, bitOf: ReadonlyMap<number, number>): { mask: number; ahead: number } {
    let mask = 0;
    let ahead = this.milestones.length;
    if (unit === null) return { mask, ahead };
    for (const earlier of this.plan.units[unit]!.after) {
      mask |= 1 << (bitOf.get(earlier) ?? 31);
      const index = this.milestones.findIndex((milestone) => milestone.unit === earlier);
      if (index !== -1) ahead = Math.min(ahead, this.milestones.length - 1 - index);
    }
    return { mask: mask & 0x7fffffff, ahead };
  }
}
