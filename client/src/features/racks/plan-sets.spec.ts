import { describe, expect, it } from 'vitest';
import { planSets, type PlanStep } from './plan-sets';
import { PLAN, SETS, turn } from './racks-fixtures';

/** `1 GDAE: 1 2`, `turn 2 before 5 for 6` */
const told = ({ stretch, turning }: PlanStep) =>
  stretch
    ? `${stretch.instrument + 1} ${stretch.tuned?.tuning}: ${stretch.tunes.map(({ number }) => number).join(' ')}`
    : turning.turns
        .map(
          ({ turn: each, needed }) =>
            `turn ${each.instrument + 1} before ${turning.before.number} for ${needed.number}`,
        )
        .join(', ');

describe('a plan as it is followed', () => {
  it('joins tunes on one instrument in one tuning, and parts them where pegs turn', () => {
    expect(planSets(SETS, PLAN).map(({ title, steps }) => [title, ...steps.map(told)])).toEqual([
      ['First set', '1 GDAE: 1', '2 AEAE: 2', 'turn 1 before 3 for 3', '1 ADAE: 3 4'],
      ['Second set', 'turn 2 before 5 for 5', '2 AEAC#: 5 6'],
    ]);
  });

  it('names a turn by its place, and the tune that needs it where that is a later one', () => {
    const turns = [turn({ before: 'e4', needed: 'e5', instrument: 1, from: 'AEAE', to: 'AEAC#' })];
    const [first] = planSets(SETS, { ...PLAN, turns });
    expect(first?.steps.map(told)).toEqual([
      '1 GDAE: 1',
      '2 AEAE: 2',
      '1 ADAE: 3',
      'turn 2 before 4 for 5',
      '1 ADAE: 4',
    ]);
  });

  it('leaves out sets without tunes', () => {
    expect(planSets([{ id: 'x', title: 'Nothing yet', tunes: [] }], { ...PLAN, tunes: [] })).toEqual([]);
  });
});
