import { describe, expect, it } from 'vitest';
import { layoutLanes } from '../../pictures/lanes-layout';
import { layRack, rackPlaces } from './rack-layout';
import { PLAN, SETS, turn } from './racks-fixtures';

const entries = SETS.map((set) => ({ entries: set.tunes.map(({ id }) => ({ id, title: id })) }));

function laid(plan: typeof PLAN, width = 1180) {
  const { rows, column } = layoutLanes(entries, rackPlaces(SETS, plan), width);
  return rows.map((row) => ({ row, column, ...layRack(row, column, plan) }));
}

describe('the lanes of a rack', () => {
  it('have a lane per instrument with its letters, a mark per turn, and a band per stop', () => {
    const [only, more] = laid(PLAN);
    expect(more).toBeUndefined();
    const lanes = only!.lanes.map(({ labels, marks }) => ({
      letters: labels.map(({ text }) => text),
      marks: marks.map(({ pegs, offClock }) => [pegs, offClock]),
    }));
    expect(lanes).toEqual([
      { letters: ['GDAE', 'ADAE'], marks: [[1, false]] },
      { letters: ['AEAE', 'AEAC#'], marks: [[1, true]] },
    ]);
    const third = only!.row.runs[0]!.tunes[2]!.x;
    expect(only!.stops).toEqual([third]);
  });

  it('lead the hand from lane to lane, and part it at the break', () => {
    const [{ hand, lanes, row }] = laid(PLAN) as [ReturnType<typeof laid>[number]];
    const [one, two] = lanes.map(({ y }) => y);
    const [first, second] = row.runs.map(({ x }) => x);
    expect(hand.match(/M[^HCM]*/g)).toEqual([`M${first} ${one}`, `M${second} ${two}`]);
    // Over to the second and back in the first set; in the second it stays.
    expect(hand.match(/C/g)).toHaveLength(2);
  });

  it('say in every row on a phone how each instrument stands', () => {
    const rows = laid(PLAN, 358 - 180);
    expect(rows.length).toBeGreaterThan(2);
    for (const { lanes } of rows) for (const { labels } of lanes) expect(labels.length).toBeGreaterThan(0);
  });

  it('put letters below the lane where they would run into those before', () => {
    const turns = ['e2', 'e3', 'e4'].map((before, index) =>
      turn({ before, instrument: 0, from: index % 2 ? 'ADAE' : 'GDAE', to: index % 2 ? 'GDAE' : 'ADAE' }),
    );
    const [{ lanes }] = laid({ ...PLAN, turns }, 330) as [ReturnType<typeof laid>[number]];
    const places = lanes[0]!.labels;
    for (const [index, { x, text, below }] of places.entries()) {
      const next = places.slice(index + 1).find((each) => each.below === below);
      // 11.5 px a letter, as the lanes set them.
      if (next) expect(next.x).toBeGreaterThanOrEqual(x + text.length * 11.5);
    }
  });
});
