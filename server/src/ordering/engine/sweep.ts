import type { Bound } from './bound';
import { KeyBound } from './key-bound';
import { Layer } from './layer';
import { stageSeesKeys, type Stage } from './stage';
import type { Steps } from './steps';
import { Successors } from './successors';

/** A cost in the two numbers of weights.ts. */
export interface Cost {
  readonly high: number;
  readonly low: number;
}

export const NEVER: Cost = { high: Infinity, low: Infinity };

export const isLess = (a: Cost, b: Cost): boolean => a.high < b.high || (a.high === b.high && a.low < b.low);

/** The most integers that the states of all layers may take: some 150 MB with their columns and tables. */
const MOST_INTEGERS = 12_000_000;

/** All layers of a stage, kept so that a finer stage can read its cost to go. */
export interface Swept {
  readonly stage: Stage;
  readonly layers: readonly Layer[];
  /** The least cost of a full order at this stage below `under`; null where there is none. */
  readonly best: Cost | null;
  /** Units in playing order that cost that. */
  readonly order: readonly number[] | null;
  /** Whether no state was left out but for its bound. */
  readonly exact: boolean;
  /** The least bound of what was left out for it: nothing below `under` costs less than this or `best`. */
  readonly nextLeast: Cost;
}

export interface SweepOptions {
  readonly stage: Stage;
  /** Only what can cost less than this is followed. */
  readonly under: Cost;
  /** States kept per position; Infinity for all. */
  readonly width: number;
  /** The coarser stage whose cost to go bounds this one; else `bound` alone does. */
  readonly coarse: Swept | null;
  readonly bound: Bound;
  readonly steps: Steps;
  /** Of a change of key, in the low number. */
  readonly keyWeight: number;
  /** Whether orders that are alike to this stage may be left out: only where no table is read from it. */
  readonly together?: boolean;
  /** What one entry at another position than the host's costs, in the low number; 0: nothing. */
  readonly moved?: { readonly weight: number; readonly hostUnitAt: readonly number[] };
}

/**
 * A dynamic program over positions: a state is how many of each class are left, how all kinds stand and
 * what the next entry will see of the last. Of two ways to a state only the cheaper is followed, so with all
 * states kept the answer is exact; states whose cost so far and bound to go reach `under` are left out.
 *
 * @throws OutOfSteps
 */
export function sweep(options: SweepOptions): Swept {
  const { stage, under, width, coarse, bound, steps, moved } = options;
  const { plan } = stage;
  const count = plan.setStart.length;
  const layers = Array.from({ length: count + 1 }, () => new Layer(stage.stride));
  const successors = new Successors(stage, options.together ?? false);
  const boundsKeys = stageSeesKeys(stage.closeness) && !(coarse && stageSeesKeys(coarse.stage.closeness));
  const keyBound = boundsKeys ? new KeyBound(stage, options.keyWeight) : null;
  const project = coarse === null ? null : new Projection(stage, coarse);
  const state = new Int32Array(stage.stride);
  let exact = true;
  let states = 1;
  let nextHigh = Infinity;
  let nextLow = Infinity;

  stage.start(state);
  layers[0]!.add(state);
  layers[0]!.coarse[0] = 0;

  for (let position = 0; position < count; position++) {
    const layer = layers[position]!;
    if (layer.size > width) {
      exact = false;
      states -= layer.size - width;
      narrow(layer, width);
    }
    for (let row = 0; row < layer.size; row++) {
      successors.after(layer, row, position);
      steps.take((successors.count + 1) * stage.effort);
      for (let index = 0; index < successors.count; index++) {
        const unit = successors.unit[index]!;
        const next = position + plan.units[unit]!.entries.length;
        follow(layer, row, position, next, unit, index);
      }
    }
    if (states * (stage.stride + 6) > MOST_INTEGERS) steps.end();
  }

  const last = layers[count]!;
  let best: number | null = null;
  for (let row = 0; row < last.size; row++) {
    if (best === null || isLess(costOf(last, row), costOf(last, best))) best = row;
  }
  return {
    stage,
    layers,
    best: best === null ? null : costOf(last, best),
    order: best === null ? null : orderTo(stage, layers, best),
    exact,
    nextLeast: { high: nextHigh, low: nextLow },
  };

  function leaveOut(high: number, low: number): void {
    if (high < nextHigh || (high === nextHigh && low < nextLow)) [nextHigh, nextLow] = [high, low];
  }

  function follow(
    layer: Layer,
    row: number,
    position: number,
    next: number,
    unit: number,
    index: number,
  ): void {
    const high = layer.high[row]! + successors.high[index]!;
    let low = layer.low[row]! + successors.low[index]!;
    if (moved !== undefined) low += moved.weight * movedBy(moved.hostUnitAt, stage, unit, position, next);
    if (high > under.high || (high === under.high && low >= under.low)) {
      leaveOut(high, low);
      return;
    }

    const at = row * layer.stride;
    for (let word = 0; word < stage.words; word++) state[word] = layer.rows[at + word]!;
    const c = stage.classOf[unit]!;
    if (c !== -1) state[stage.word[c]!]! -= 1 << stage.shift[c]!;
    state[stage.words] = successors.joint[index]!;
    state[stage.words + 1] = next < count && !plan.setStart[next] ? stage.tailKey[unit]! : 0;

    let leastHigh = high;
    let leastLow = low;
    let coarseRow = -1;
    if (project !== null) {
      coarseRow = project.next(position, next, layer.coarse[row]!, unit, state[stage.words]!);
      if (coarseRow === -1) return;
      const { toGoHigh, toGoLow } = coarse!.layers[next]!;
      leastHigh += toGoHigh![coarseRow]!;
      leastLow += toGoLow![coarseRow]!;
    } else {
      leastHigh += bound.toGo(stage, state, 0, next);
    }
    if (keyBound !== null) leastLow += keyBound.toGo(state, 0, next);
    if (leastHigh > under.high || (leastHigh === under.high && leastLow >= under.low)) {
      leaveOut(leastHigh, leastLow);
      return;
    }

    const into = layers[next]!;
    let found = into.find(state);
    if (found === -1) {
      found = into.add(state);
      states++;
    } else if (into.high[found]! < high || (into.high[found] === high && into.low[found]! <= low)) {
      return;
    }
    into.high[found] = high;
    into.low[found] = low;
    into.leastHigh[found] = leastHigh;
    into.leastLow[found] = leastLow;
    into.parent[found] = row;
    into.unit[found] = unit;
    into.coarse[found] = coarseRow;
  }
}

/**
 * Sweeps back over what a sweep kept and writes down the cost to go from every state through which an order can
 * cost less than `under`; from the others it is infinite.
 * @throws OutOfSteps
 */
export function sweepBack({ stage, layers }: Swept, under: Cost, steps: Steps): void {
  const { plan } = stage;
  const count = plan.setStart.length;
  const successors = new Successors(stage, false);
  const state = new Int32Array(stage.stride);
  for (let position = count; position >= 0; position--) {
    const layer = layers[position]!;
    const toGoHigh = new Float64Array(layer.size).fill(position === count ? 0 : Infinity);
    const toGoLow = new Float64Array(layer.size).fill(position === count ? 0 : Infinity);
    layer.toGoHigh = toGoHigh;
    layer.toGoLow = toGoLow;
    if (position === count) continue;
    for (let row = 0; row < layer.size; row++) {
      const least = { high: layer.leastHigh[row]!, low: layer.leastLow[row]! };
      if (!isLess(least, under)) continue;
      successors.after(layer, row, position);
      steps.take((successors.count + 1) * stage.effort);
      for (let index = 0; index < successors.count; index++) {
        const unit = successors.unit[index]!;
        const next = position + plan.units[unit]!.entries.length;
        const at = row * layer.stride;
        for (let word = 0; word < stage.words; word++) state[word] = layer.rows[at + word]!;
        const c = stage.classOf[unit]!;
        if (c !== -1) state[stage.word[c]!]! -= 1 << stage.shift[c]!;
        state[stage.words] = successors.joint[index]!;
        state[stage.words + 1] = next < count && !plan.setStart[next] ? stage.tailKey[unit]! : 0;
        const after = layers[next]!;
        const found = after.find(state);
        if (found === -1) continue;
        const high = successors.high[index]! + after.toGoHigh![found]!;
        const low = successors.low[index]! + after.toGoLow![found]!;
        if (high < toGoHigh[row]! || (high === toGoHigh[row] && low < toGoLow[row]!)) {
          toGoHigh[row] = high;
          toGoLow[row] = low;
        }
      }
    }
  }
}

const costOf = (layer: Layer, row: number): Cost => ({ high: layer.high[row]!, low: layer.low[row]! });

/** The rows of least bound; of equals those met first. */
function narrow(layer: Layer, width: number): void {
  const rows = Array.from({ length: layer.size }, (_, row) => row);
  const { leastHigh, leastLow } = layer;
  rows.sort((a, b) => leastHigh[a]! - leastHigh[b]! || leastLow[a]! - leastLow[b]! || a - b);
  layer.keep(rows.slice(0, width));
}

function movedBy(
  hostUnitAt: readonly number[],
  stage: Stage,
  unit: number,
  position: number,
  next: number,
): number {
  if (stage.classOf[unit] === -1) return 0;
  const host = hostUnitAt[position]!;
  const same = host >= 0 && (host === unit || stage.classOf[host] === stage.classOf[unit]);
  return same ? 0 : next - position;
}

/** Units in playing order. A class names its first member each time; the members are dealt out afterwards. */
function orderTo(stage: Stage, layers: readonly Layer[], row: number): number[] {
  const order: number[] = [];
  let position = layers.length - 1;
  for (let at = row; position > 0;) {
    const layer = layers[position]!;
    const unit = layer.unit[at]!;
    order.push(unit);
    at = layer.parent[at]!;
    position -= stage.plan.units[unit]!.entries.length;
  }
  return order.reverse();
}

/** From states of a stage to the states of a coarser one. */
class Projection {
  private readonly state: Int32Array;
  private readonly joints: (number | undefined)[] = [];

  constructor(
    private readonly stage: Stage,
    private readonly coarse: Swept,
  ) {
    this.state = new Int32Array(coarse.stage.stride);
  }

  /** The coarse row after placing a unit from a coarse row, the kinds then standing as `joint`; -1: none. */
  next(position: number, next: number, row: number, unit: number, joint: number): number {
    const { stage, layers } = this.coarse;
    const { state } = this;
    const from = layers[position]!;
    const at = row * from.stride;
    for (let word = 0; word < stage.words; word++) state[word] = from.rows[at + word]!;
    const c = stage.classOf[unit]!;
    if (c !== -1) state[stage.word[c]!]! -= 1 << stage.shift[c]!;
    state[stage.words] = this.joints[joint] ??= this.projected(joint);
    const count = stage.plan.setStart.length;
    state[stage.words + 1] = next < count && !stage.plan.setStart[next] ? stage.tailKey[unit]! : 0;
    return layers[next]!.find(state);
  }

  private projected(joint: number): number {
    const { joints } = this.stage;
    const coarse = this.coarse.stage.joints;
    if (coarse.grain === joints.grain) return coarse.of([...joints.stands[joint]!]);
    return coarse.of(joints.stands[joint]!.map((stand, k) => joints.tuning(k, stand)));
  }
}
