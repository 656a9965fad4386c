import type { Goal } from '@pegwell/shared/session/evening';
import type { Compiled } from './compiled';
import type { Stage } from './stage';
import type { Steps } from './steps';
import { SubsetTable, type Milestone } from './subset-table';
import { TreeBound } from './tree-bound';
import { TooManyStands, TuningMoves } from './tuning-moves';
import type { Plan } from './units';
import { mostPegs, type Weights } from './weights';

/** How much may go into the table of all kinds together, and into each table of some kinds. */
export interface BoundLimits {
  readonly joints: number;
  /** Cells times moves tried for each; about 5 ms per million. Of a table of all kinds that follows every group. */
  readonly whole: number;
  /** Of one that has to leave groups out. */
  readonly together: number;
  readonly apart: number;
}

/** Made in a few milliseconds, and enough for most evenings. */
export const SMALL_BOUND: BoundLimits = { joints: 400, whole: 3_000_000, together: 400_000, apart: 100_000 };
/** Made in tenths of a second. */
export const LARGE_BOUND: BoundLimits = {
  joints: 400,
  whole: 12_000_000,
  together: 12_000_000,
  apart: 3_000_000,
};

/** More pins than these are followed as groups that are still to come. */
const MOST_MILESTONES = 4;

/**
 * What the first two levels still cost at least, from the tunings alone. A table over all kinds is the best
 * bound; where it had to leave groups out, spanning trees over all of them stand beside it, and tables of fewer
 * kinds each, whose pegs add up.
 */
export class Bound {
  /** Whether one table of all kinds follows everything, so that more work would add nothing. */
  readonly full: boolean;
  private readonly parts: readonly (readonly TuningBound[])[];
  private readonly milestones: readonly Milestone[];
  private readonly mostPegs: number;
  /** By position: milestones at or after it. */
  private readonly milestonesAhead: Int32Array;
  /** By position: breaks at or after it, each of which may take one turning place off the clock. */
  private readonly breaksAhead: Int32Array;
  private readonly joints = new WeakMap<Stage, (Int32Array | undefined)[]>();
  private readonly awaited = new WeakMap<Stage, readonly Awaited[]>();

  constructor(
    compiled: Compiled,
    private readonly plan: Plan,
    private readonly goal: Goal,
    private readonly weights: Weights,
    limits: BoundLimits,
    steps: Steps,
  ) {
    this.milestones = milestonesOf(plan);
    this.mostPegs = mostPegs(compiled);
    const everyone = compiled.kinds.map((_, k) => k);
    const table = (kinds: readonly number[], whole: number, part: number): SubsetTable | null => {
      try {
        const tunings = new TuningMoves(compiled, kinds, goal, limits.joints, steps);
        return new SubsetTable(tunings, plan, this.milestones, { whole, part }, steps);
      } catch (error) {
        if (error instanceof TooManyStands) return null;
        throw error;
      }
    };
    const together = table(everyone, limits.whole, limits.together);
    const parts: (readonly TuningBound[])[] = together ? [[together]] : [];
    if (together && !together.complete) parts.push([new TreeBound(together.tunings, plan, steps)]);
    if (everyone.length > 1 && !together?.complete) {
      parts.push(clusters(everyone, (kinds) => table(kinds, limits.apart, limits.apart)));
    }
    this.parts = parts;
    this.full = together?.full ?? false;
    const isMilestone = new Set(this.milestones.map(({ position }) => position));
    this.milestonesAhead = fromTheEnd(plan, (position) => isMilestone.has(position));
    this.breaksAhead = fromTheEnd(plan, (position) => plan.setStart[position]!);
  }

  /**
   * The bound as the high number of a score, for a state whose entries up to `position` are placed.
   * @param rows packed states, the one asked for beginning at `at`
   */
  toGo(stage: Stage, rows: Int32Array, at: number, position: number): number {
    const joints = this.jointsOf(stage, rows[at + stage.words]!);
    const awaited = this.awaitedBy(stage);
    const breaks = this.breaksAhead[position]!;
    let best = 0;
    let index = 0;
    for (const tables of this.parts) {
      let pegs = 0;
      let turns = 0;
      let sure = 0;
      for (const table of tables) {
        const { ofClass, fixedAfter } = awaited[index]!;
        let mask = fixedAfter[position]!;
        for (let c = 0; c < ofClass.length; c++) {
          if (ofClass[c] !== 0 && stage.left(rows, at, c) > 0) mask |= ofClass[c]!;
        }
        const cost = table.toGo(mask, joints[index]!, this.milestonesAhead[position]!);
        index++;
        const itsTurns = table.tunings.turns(cost);
        const itsPegs = table.tunings.pegs(cost);
        pegs += itsPegs;
        if (itsTurns > turns) [turns, sure] = [itsTurns, itsPegs];
        else if (itsTurns === turns) sure = Math.max(sure, itsPegs);
      }
      const stops = Math.max(0, turns - breaks);
      // With stops first, a table's pegs are the least only for its least turns.
      const known = this.goal === 'pegs' ? pegs : turns >= breaks ? sure : 0;
      // A tree is no order: it may cost more pegs than any order can.
      best = Math.max(best, Math.min(known, this.mostPegs) * this.weights.peg + stops * this.weights.stop);
    }
    return best;
  }

  private jointsOf(stage: Stage, joint: number): Int32Array {
    let known = this.joints.get(stage);
    if (known === undefined) this.joints.set(stage, (known = []));
    return (known[joint] ??= this.lookedUp(stage, joint));
  }

  private lookedUp(stage: Stage, joint: number): Int32Array {
    const tunings = stage.joints.stands[joint]!.map((stand, k) => stage.joints.tuning(k, stand));
    return Int32Array.from(this.parts.flat(), (table) => table.tunings.joint(tunings));
  }

  /** Per table: what a class still brings, and what fixed units bring from a position on. */
  private awaitedBy(stage: Stage): readonly Awaited[] {
    const known = this.awaited.get(stage);
    if (known !== undefined) return known;
    const { setStart, fixedUnitAt } = this.plan;
    const made = this.parts.flat().map(({ bitsOf }): Awaited => {
      const fixedAfter = new Int32Array(setStart.length + 1);
      for (let position = setStart.length - 1; position >= 0; position--) {
        const unit = fixedUnitAt[position]!;
        fixedAfter[position] = fixedAfter[position + 1]! | (unit === -1 ? 0 : bitsOf[unit]!);
      }
      return { ofClass: Int32Array.from(stage.members, ([member]) => bitsOf[member!]!), fixedAfter };
    });
    this.awaited.set(stage, made);
    return made;
  }
}

type TuningBound = Pick<SubsetTable, 'tunings' | 'bitsOf' | 'toGo'>;

interface Awaited {
  readonly ofClass: Int32Array;
  readonly fixedAfter: Int32Array;
}

function fromTheEnd({ setStart }: Plan, counts: (position: number) => boolean): Int32Array {
  const ahead = new Int32Array(setStart.length + 1);
  for (let position = setStart.length - 1; position >= 0; position--) {
    ahead[position] = ahead[position + 1]! + (counts(position) ? 1 : 0);
  }
  return ahead;
}

/** Fixed units that are not the beginning of the evening; of many, some spread over it. */
function milestonesOf({ units, fixedUnitAt }: Plan): readonly Milestone[] {
  const all: Milestone[] = [];
  const freeInAll = fixedUnitAt.filter((unit) => unit === -1).length;
  let free = 0;
  fixedUnitAt.forEach((unit, position) => {
    if (unit === -1) free++;
    else if (free > 0 && units[unit]!.fixedAt === position) {
      all.push({ unit, position, freeBefore: free, freeAfter: freeInAll - free });
    }
  });
  if (all.length <= MOST_MILESTONES) return all;
  return Array.from({ length: MOST_MILESTONES }, (_, index) => {
    return all[Math.floor(((index + 0.5) * all.length) / MOST_MILESTONES)]!;
  });
}

/** Kinds put together as long as their table stays complete and small. */
function clusters(
  kinds: readonly number[],
  table: (kinds: readonly number[]) => SubsetTable | null,
): readonly SubsetTable[] {
  let tables = kinds.flatMap((k) => table([k]) ?? []);
  for (let merged = true; merged;) {
    merged = false;
    for (let a = 0; a < tables.length && !merged; a++) {
      for (let b = a + 1; b < tables.length && !merged; b++) {
        const both = table([...tables[a]!.tunings.kinds, ...tables[b]!.tunings.kinds]);
        if (!both?.complete) continue;
        tables = [...tables.filter((_, index) => index !== a && index !== b), both];
        merged = true;
      }
    }
  }
  return tables;
}
