import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';
import { GrowingOrder } from './host-rules';
import { Reading, type ReadTune, type Stand } from './reading';

/** What an order of the first tunes leaves open: all that the cost of the rest can depend on. */
interface Open {
  /** By class: tunes still to come. */
  readonly left: readonly number[];
  /** Bits of the tunes placed that a rule names. */
  readonly placed: number;
  readonly last: ReadTune | null;
  readonly stand: Stand;
  cost: number;
}

/**
 * The best score of any order that keeps the rules, by a dynamic program over positions: tunes that are as
 * good as each other are one class, of which only the count left is told. Held & Karp (1962) with counts for
 * subsets. No bounds, nothing left out.
 * @returns seven levels in the goal's order; null where no order keeps the rules
 */
export function bestByClassCounts(problem: OrderingProblem): readonly number[] | null {
  const reading = new Reading(problem);
  const rules = new GrowingOrder(problem);
  const { tunes, setStart } = reading;

  const members = new Map<string, ReadTune[]>();
  for (const tune of tunes) {
    const key = rules.names(tune.index) ? tune.id : `${tune.list} ${tune.tonic} ${tune.spaced}`;
    members.set(key, [...(members.get(key) ?? []), tune]);
  }
  const classes = [...members.values()];

  let layer = new Map<string, Open>();
  layer.set('', {
    left: classes.map(({ length }) => length),
    placed: 0,
    last: null,
    stand: reading.start,
    cost: 0,
  });
  for (let position = 0; position < tunes.length; position++) {
    const offClock = setStart[position]!;
    const next = new Map<string, Open>();
    for (const { left, placed, last, stand, cost } of layer.values()) {
      for (const [c, [tune]] of classes.entries()) {
        const previous = last?.index ?? -1;
        if (left[c] === 0 || !rules.mayCome(tune!.index, position, previous, placed)) continue;
        const inMedley = rules.inMedley(previous, tune!.index);
        const always = offClock ? 0 : reading.between(last!, tune!, inMedley);
        const after = left.map((count, other) => (other === c ? count - 1 : count));
        const named = rules.names(tune!.index);
        // A tune that no rule names is known to the next by its key and rhythm alone.
        const face = named ? 1000 + tune!.index : tune!.tonic * 2 + Number(tune!.spaced);
        const open = String.fromCharCode(...after, face);
        for (const way of reading.waysTo(tune!, stand, offClock, inMedley)) {
          const all = cost + always + way.cost;
          const key = `${open}${way.to}`;
          const rival = next.get(key);
          if (rival !== undefined && rival.cost <= all) continue;
          next.set(key, {
            left: after,
            placed: named ? placed | (1 << tune!.index) : placed,
            last: tune!,
            stand: way.to,
            cost: all,
          });
        }
      }
    }
    layer = next;
  }
  const costs = [...layer.values()].filter(({ last }) => rules.mayEnd(last?.index ?? -1));
  return costs.length === 0 ? null : reading.levels(Math.min(...costs.map(({ cost }) => cost)));
}
