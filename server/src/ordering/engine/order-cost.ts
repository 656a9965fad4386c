import type { Stage } from './stage';
import type { Steps } from './steps';
import type { Cost } from './sweep';

/**
 * What an order of units costs at a stage, the best choice included: a walk that keeps, per place, the least
 * cost of each way the kinds can stand.
 */
export function orderCost(stage: Stage, order: readonly number[], steps: Steps): Cost {
  const { plan } = stage;
  let ways = new Map<number, Cost>([[stage.joints.opening, { high: 0, low: 0 }]]);
  let position = 0;
  let tail = 0;
  for (const unit of order) {
    const offClock = plan.setStart[position]!;
    const pair = tail * stage.keys + stage.headKey[unit]!;
    const addHigh = stage.insideHigh[unit]! + (offClock ? 0 : stage.pairHigh[pair]!);
    const addLow = offClock ? 0 : stage.pairLow[pair]!;
    const next = new Map<number, Cost>();
    for (const [joint, cost] of ways) {
      const moves = stage.moves.from(joint, stage.signature[unit]!);
      steps.take(moves.to.length);
      const moveHigh = offClock ? moves.offHigh : moves.onHigh;
      const moveLow = offClock ? moves.offLow : moves.onLow;
      for (let way = 0; way < moves.to.length; way++) {
        const to = moves.to[way]!;
        const high = cost.high + addHigh + moveHigh[way]!;
        const low = cost.low + addLow + moveLow[way]!;
        const rival = next.get(to);
        if (rival === undefined || high < rival.high || (high === rival.high && low < rival.low)) {
          next.set(to, { high, low });
        }
      }
    }
    ways = next;
    position += plan.units[unit]!.entries.length;
    tail = stage.tailKey[unit]!;
  }
  let best: Cost = { high: Infinity, low: Infinity };
  for (const cost of ways.values()) {
    if (cost.high < best.high || (cost.high === best.high && cost.low < best.low)) best = cost;
  }
  return best;
}
