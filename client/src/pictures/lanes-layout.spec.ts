import { describe, expect, it } from 'vitest';
import { pictured } from './lanes-fixtures';
import { GAP, NAMES, layoutLanes, stopX } from './lanes-layout';
import { lanePath } from './lanes-path';

const many = (count: number) => Array.from({ length: count }, () => 'GDAE');

describe('layoutLanes', () => {
  it('puts the whole evening in one row where it fits, with a gap for the break', () => {
    const { sets, places } = pictured({ fiddle: 5 }, [many(9), many(7)]);
    const { rows, column } = layoutLanes(sets, places, 1304);
    expect(rows).toHaveLength(1);
    expect(rows[0]?.runs.map(({ lead, tunes }) => [lead, tunes.length])).toEqual([
      ['none', 9],
      ['break', 7],
    ]);
    expect(rows[0]?.runs[1]?.x).toBe(NAMES + 9 * column + GAP);
    expect(rows[0]?.end).toBeLessThanOrEqual(1304);
  });

  it('lays out anew on a phone: no row wider than the screen, no tune too narrow to read', () => {
    const { sets, places } = pictured({ fiddle: 5 }, [many(12), many(12)]);
    const { rows, column } = layoutLanes(sets, places, 358);
    expect(rows.map((row) => row.runs.map(({ lead, tunes }) => `${lead} ${tunes.length}`))).toEqual([
      ['none 6'],
      ['tail 6'],
      ['break 6'],
      ['tail 6'],
    ]);
    expect(column).toBeGreaterThanOrEqual(36);
    expect(Math.max(...rows.map((row) => row.end))).toBeLessThanOrEqual(358);
  });

  it('shows pegs turned before the first tune in a gap of their own', () => {
    const turned = pictured({ fiddle: 1 }, [['AEAE', 'AEAE']]);
    const [run] = layoutLanes(turned.sets, turned.places, 900).rows[0]?.runs ?? [];
    expect(run?.lead).toBe('opening');
    expect(run && stopX(run, run.tunes[0]!)).toBe(NAMES + GAP / 2);
  });

  it('keeps that gap where another order needs it, so that columns stand under each other', () => {
    const still = pictured({ fiddle: 1 }, [['GDAE', 'AEAE']]);
    const turned = pictured({ fiddle: 1 }, [['AEAE', 'GDAE']]);
    const xs = (evening: typeof still) =>
      layoutLanes(evening.sets, evening.places, 900, true).rows[0]?.runs[0]?.tunes.map(({ x }) => x);
    expect(xs(still)).toEqual(xs(turned));
    expect(layoutLanes(still.sets, still.places, 900).rows[0]?.runs[0]?.lead).toBe('none');
  });

  it('leaves out empty sets and lays out nothing for an empty evening', () => {
    const one = pictured({ fiddle: 1 }, [['GDAE'], [], ['GDAE']]);
    expect(layoutLanes(one.sets, one.places, 900).rows[0]?.runs).toHaveLength(2);
    expect(layoutLanes([{ entries: [] }], [], 900).rows).toEqual([]);
  });

  it('counts a tune that has not been scored yet, without a lane', () => {
    const { sets, places } = pictured({ fiddle: 1 }, [many(3)]);
    const layout = layoutLanes(sets, places.slice(0, 1).concat(places.slice(2)), 900);
    expect(layout.rows[0]?.runs[0]?.tunes.map(({ number }) => number)).toEqual([1, 3]);
  });
});

describe('lanePath', () => {
  const ground = { y: 100, between: 25 };
  const rowOf = (evening: ReturnType<typeof pictured>) =>
    layoutLanes(evening.sets, evening.places, 200).rows[0]!;

  // 2 semitones at 0.12 of 25 px each: 6 px.
  it('steps up by the semitones turned, where the tune begins', () => {
    const evening = pictured({ fiddle: 1 }, [['GDAE', 'ADAE']]);
    const row = rowOf(evening);
    const x = row.runs[0]!.tunes[1]!.x;
    const path = lanePath(row, 60, evening.chairs[0]!, 0, ground);
    expect(path).toBe(`M40 100H${x - 8}C${x} 100 ${x} 94 ${x + 8} 94H${x + 60}`);
  });

  it('stops at a break and starts again at the level of the next tune', () => {
    const evening = pictured({ fiddle: 1 }, [['GDAE'], ['ADAE']]);
    const row = rowOf(evening);
    const path = lanePath(row, 50, evening.chairs[0]!, 0, ground);
    expect(path).toBe(`M40 100H90M${row.runs[1]!.x} 94H${row.runs[1]!.x + 50}`);
  });

  it('draws nothing while a kind is free', () => {
    const evening = pictured({ fiddle: 1 }, [['any', 'AEAE']], { fiddle: null });
    const row = rowOf(evening);
    expect(lanePath(row, 50, evening.chairs[0]!, 0, ground)).toMatch(
      new RegExp(`^M${row.runs[0]!.tunes[1]!.x} `),
    );
  });

  it('never lifts a lane into the next one', () => {
    const evening = pictured({ fiddle: 1 }, [['GDAE', 'DDAD']]);
    const path = lanePath(rowOf(evening), 60, evening.chairs[0]!, 0, ground);
    expect(path).toContain(' 110.75');
  });
});
