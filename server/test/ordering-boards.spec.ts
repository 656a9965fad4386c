import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning } from '@pegwell/shared/music/tuning';
import { scoreEvening } from '@pegwell/shared/session/score';
import { benchEvening } from '../../bench/evenings';
import type { OrderingProblem, Solution } from '../src/ordering/engine/ordering-problem';
import { solve } from '../src/ordering/engine/solve';

/**
 * An independent dynamic program for the first two levels, written for this test alone: it reads pitches
 * itself, counts classes of entries with the same tunings in one string key per state, walks position by
 * position with no bounds, and keeps a pair (pegs, stops) per state.
 */
const SEMITONE: Record<string, number> = { C: 0, D: 2, E: 4, F: 5, G: 7, A: 9, B: 11 };
function midi(name: string): number {
  const altered = name.includes('#') ? 1 : name.slice(1).includes('b') ? -1 : 0;
  return SEMITONE[name[0]!]! + altered + 12 * (Number(name.at(-1)) + 1);
}

function firstTwoLevels(problem: OrderingProblem): [number, number] {
  const kinds = problem.chairs.map(({ kind }) => kind);
  const sound = (pitches: readonly string[]): string => pitches.map(midi).join(' ');
  const turned = (k: number, from: string, to: string): number => {
    const [a, b] = [from.split(' '), to.split(' ')];
    const { count, kind } = problem.chairs[k]!;
    return kind.courses.reduce(
      (sum, { pegs }, course) => sum + (a[course] === b[course] ? 0 : count * pegs),
      0,
    );
  };
  const order = problem.sets.flat();
  const optionsOf = new Map(
    problem.tunes.map(({ id, accepted }) => [
      id,
      kinds.map((kind) => {
        const list = accepted[kind.id]!;
        return list === 'any' ? null : [...new Set(list.map(({ pitches }) => sound(pitches)))].sort();
      }),
    ]),
  );
  const classes = new Map<string, { options: (string[] | null)[]; count: number }>();

  const pinned = new Map(Object.entries(problem.pins).map(([id, position]) => [position, id]));
  for (const id of order) {
    if (problem.pins[id] !== undefined) continue;
    const key = JSON.stringify(optionsOf.get(id));
    const known = classes.get(key);
    if (known) known.count++;
    else classes.set(key, { options: optionsOf.get(id)!, count: 1 });
  }
  const all = [...classes.values()];
  const starts = new Set<number>();
  let at = 0;
  for (const set of problem.sets) {
    starts.add(at);
    at += set.length;
  }
  const less = (a: readonly number[], b: readonly number[]): boolean =>
    problem.goal === 'pegs'
      ? a[0]! < b[0]! || (a[0] === b[0] && a[1]! < b[1]!)
      : a[1]! < b[1]! || (a[1] === b[1] && a[0]! < b[0]!);

  const opening = kinds.map((kind) => sound(problem.openings[kind.id]!.pitches));
  let layer = new Map<string, { left: number[]; stand: string[]; cost: number[] }>();
  layer.set('', { left: all.map(({ count }) => count), stand: opening, cost: [0, 0] });

  for (let position = 0; position < order.length; position++) {
    const next: typeof layer = new Map();
    for (const state of layer.values()) {
      const pin = pinned.get(position);
      const choices = pin ? [-1] : all.flatMap((_, c) => (state.left[c]! > 0 ? [c] : []));
      for (const c of choices) {
        const options = c === -1 ? optionsOf.get(pin!)! : all[c]!.options;
        let stands: string[][] = [[]];
        options.forEach((list, k) => {
          stands = stands.flatMap((stand) => (list ?? [state.stand[k]!]).map((tuning) => [...stand, tuning]));
        });
        for (const stand of stands) {
          const pegs = stand.reduce((sum, tuning, k) => sum + turned(k, state.stand[k]!, tuning), 0);
          const stop = pegs > 0 && !starts.has(position) ? 1 : 0;
          const left = state.left.map((count, other) => (other === c ? count - 1 : count));
          const key = `${left.join(',')}|${stand.join('|')}`;
          const cost = [state.cost[0]! + pegs, state.cost[1]! + stop];
          const rival = next.get(key);
          if (!rival || less(cost, rival.cost)) next.set(key, { left, stand, cost });
        }
      }
    }
    layer = next;
  }
  let best: number[] | null = null;
  for (const { cost } of layer.values()) if (best === null || less(cost, best)) best = cost;
  return [best![0]!, best![1]!];
}

function solved(problem: OrderingProblem): Solution {
  const answer = solve(problem);
  if (answer.outcome !== 'solution') throw new Error(answer.outcome);
  return answer;
}

describe('boards of 24 tunes', () => {
  it('reach the first two levels of an independent dynamic program, on 30 of them, both goals', () => {
    for (let seed = 1; seed <= 30; seed++) {
      const problem = benchEvening({
        seed: seed + 500,
        tunes: 24,
        sets: 2,
        kinds: 2,
        groups: 6,
        pins: seed % 3,
        alternatives: seed % 2 === 0 ? 0.05 : 0,
        unstated: seed % 5 === 0 ? 0.05 : 0,
        goal: seed % 4 === 0 ? 'stops' : 'pegs',
      });
      const answer = solved(problem);
      const [pegChanges, retuneStops] = firstTwoLevels(problem);
      expect({ seed, ...answer.score }).toMatchObject({ seed, pegChanges, retuneStops });
      expect(answer.provenLevels).toBeGreaterThanOrEqual(2);
      expect(answer.score).toEqual(scoreEvening({ ...problem, sets: answer.sets }).score);
    }
  }, 300_000);
});

const fiddle = builtInKind('fiddle')!;
function fiddleEvening(
  cells: readonly string[],
  opening: string | null,
  sizes: readonly number[],
  count = 1,
): OrderingProblem {
  const tuned = (text: string) => {
    const parsed = parseTuning(fiddle, text);
    if (!parsed.ok) throw new Error(parsed.reason);
    return parsed.value;
  };
  const ids = cells.map((_, index) => `${index + 1}`);
  let from = 0;
  return {
    chairs: [{ kind: fiddle, count }],
    openings: { fiddle: opening === null ? null : tuned(opening) },
    goal: 'pegs',
    spacedRhythms: [],
    tunes: ids.map((id, index) => ({
      id,
      tonic: 9,
      rhythm: null,
      accepted: { fiddle: [tuned(cells[index]!)] },
    })),
    sets: sizes.map((size) => ids.slice(from, (from += size))),
    medleys: [],
    pins: {},
    befores: [],
  };
}

describe('what is known from elsewhere', () => {
  // Best order of one tune each over all 8! orders (facts.md): 8 strings with a free start and from GDAE.
  const EIGHT = ['GDAE', 'ADAE', 'AEAE', 'GDGD', 'DDAD', 'AEAC#', 'GDAD', 'AEAD'];
  it.each([null, 'GDAE'])('orders the eight tunings of facts.md in 8 strings, from %s', (opening) => {
    const answer = solved(fiddleEvening(EIGHT, opening, [8]));
    expect(answer.score.pegChanges).toBe(8);
    expect(answer).toMatchObject({ optimal: true, provenLevels: 7, lowerBound: 8 });
  });

  it('finds the best orders of the worked examples of score.md', () => {
    const cells = ['GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE'];
    const one = solved(fiddleEvening(cells, 'GDAE', [5]));
    expect(one.score).toMatchObject({ pegChanges: 2, retuneStops: 2, semitones: 4 });
    const two = solved(fiddleEvening(cells, 'GDAE', [3, 2], 5));
    expect(two.score).toMatchObject({ pegChanges: 10, offClockPegChanges: 5, retuneStops: 1, semitones: 20 });
    expect(two.optimal).toBe(true);
  });
});
