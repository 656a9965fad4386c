import type { Goal } from '@pegwell/shared/session/evening';
import type { Compiled } from './compiled';
import { SubsetTable, type TableLimits } from './subset-table';
import type { Stage } from './stage';
import type { Steps } from './steps';
import type { Plan } from './units';
import type { Weights } from './weights';

/** The table of all kinds together may leave groups out; the tables of some kinds may not. */
const ALL: TableLimits = { joints: 400, work: 12_000_000 };
const SOME: TableLimits = { joints: 400, work: 3_000_000 };

/**
 * What the first two levels still cost at least, from the tunings alone. A table over all kinds is the best
 * bound; where it had to leave groups out, tables of fewer kinds each stand beside it, whose pegs add up.
 */
export class Bound {
  private readonly parts: readonly (readonly SubsetTable[])[];
  /** By position: breaks at or after it, each of which may take one turning place off the clock. */
  private readonly breaksAhead: Int32Array;
  private readonly joints = new WeakMap<Stage, (Int32Array | undefined)[]>();
  private readonly follow = new WeakMap<Stage, readonly Followed[]>();

  constructor(
    private readonly compiled: Compiled,
    private readonly plan: Plan,
    private readonly goal: Goal,
    private readonly weights: Weights,
    steps: Steps,
  ) {
    const everyone = compiled.kinds.map((_, k) => k);
    const together = SubsetTable.for(compiled, everyone, goal, ALL, steps);
    const parts: (readonly SubsetTable[])[] = together ? [[together]] : [];
    if (everyone.length > 1 && !together?.complete) parts.push(clusters(compiled, goal, steps));
    this.parts = parts;
    const { setStart } = plan;
    this.breaksAhead = new Int32Array(setStart.length + 1);
    for (let position = setStart.length - 1; position >= 0; position--) {
      this.breaksAhead[position] = this.breaksAhead[position + 1]! + (setStart[position] ? 1 : 0);
    }
  }

  /**
   * The bound as the high number of a score, for a state whose entries up to `position` are placed.
   * @param rows packed states, the one asked for beginning at `at`
   */
  toGo(stage: Stage, rows: Int32Array, at: number, position: number): number {
    const joint = rows[at + stage.words]!;
    const tableJoints = this.tableJoints(stage, joint);
    let [index, best] = [0, 0];
    const followed = this.followed(stage);
    for (const tables of this.parts) {
      let [pegs, turns, sure] = [0, 0, 0];
      for (const table of tables) {
        const { ofClass, fixedAfter } = followed[index]!;
        let mask = fixedAfter[position]!;
        for (let c = 0; c < ofClass.length; c++) {
          if (ofClass[c] !== 0 && stage.left(rows, at, c) > 0) mask |= ofClass[c]!;
        }
        const at2 = tableJoints[index]!;
        index++;
        const itsTurns = table.turns(mask, at2);
        const itsPegs = table.pegs(mask, at2);
        pegs += itsPegs;
        if (itsTurns > turns) [turns, sure] = [itsTurns, itsPegs];
        else if (itsTurns === turns) sure = Math.max(sure, itsPegs);
      }
      const breaks = this.breaksAhead[position]!;
      const stops = Math.max(0, turns - breaks);
      // With stops first, a table's pegs are the least only for its least turns.
      const known = this.goal === 'pegs' ? pegs : turns >= breaks ? sure : 0;
      best = Math.max(best, known * this.weights.peg + stops * this.weights.stop);
    }
    return best;
  }

  private tableJoints(stage: Stage, joint: number): Int32Array {
    let known = this.joints.get(stage);
    if (known === undefined) this.joints.set(stage, (known = []));
    return (known[joint] ??= this.lookedUp(stage, joint));
  }

  private lookedUp(stage: Stage, joint: number): Int32Array {
    const tunings = stage.joints.stands[joint]!.map((stand, k) => stage.joints.tuning(k, stand));
    return Int32Array.from(this.parts.flat(), (table) => table.joint(tunings));
  }

  /** Per table: the groups that a class still brings, and those that fixed units bring from a position on. */
  private followed(stage: Stage): readonly Followed[] {
    const known = this.follow.get(stage);
    if (known !== undefined) return known;
    const { units, setStart } = this.plan;
    const made = this.parts.flat().map(({ bitOf }): Followed => {
      const bits = units.map(({ entries }) => entries.reduce((mask, entry) => mask | bitOf[entry]!, 0));
      const fixedAfter = new Int32Array(setStart.length + 1);
      for (let position = setStart.length - 1; position >= 0; position--) {
        const unit = this.plan.fixedUnitAt[position]!;
        fixedAfter[position] = fixedAfter[position + 1]! | (unit === -1 ? 0 : bits[unit]!);
      }
      return { ofClass: Int32Array.from(stage.members, ([member]) => bits[member!]!), fixedAfter };
    });
    this.follow.set(stage, made);
    return made;
  }
}

interface Followed {
  readonly ofClass: Int32Array;
  readonly fixedAfter: Int32Array;
}

/** Kinds put together as long as their table stays complete and small. */
function clusters(compiled: Compiled, goal: Goal, steps: Steps): readonly SubsetTable[] {
  let tables = compiled.kinds.flatMap((_, k) => SubsetTable.for(compiled, [k], goal, SOME, steps) ?? []);
  for (let merged = true; merged;) {
    merged = false;
    for (let a = 0; a < tables.length && !merged; a++) {
      for (let b = a + 1; b < tables.length && !merged; b++) {
        const kinds = [...tables[a]!.kinds, ...tables[b]!.kinds];
        const both = SubsetTable.for(compiled, kinds, goal, SOME, steps);
        if (!both?.complete) continue;
        tables = [...tables.filter((_, index) => index !== a && index !== b), both];
        merged = true;
      }
    }
  }
  return tables;
}
