import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';
import { LinearProgram } from './linear-program';
import { midi } from './reading';

/*
 * Level 1 (peg changes) as a mixed-integer program, for a general solver.
 *
 * A state of the room is a tuning per kind ("free" being one, where the opening is null). Pegs are a metric on
 * states, so between two pins an order need play each state in one run only, and need pass through none in which
 * nothing is played: what stands between two pins is a path through some distinct states. So pins cut the
 * evening into stretches, each pinned tune being one of length 1. Sets do not matter to level 1.
 *
 *   v[s,j]    1: stretch s plays state j             e[s,j], l[s,j]  1: it enters in j, leaves from j
 *   y[s,i,j]  1: in stretch s, j follows i           b[s,i,j]        1: from i at the end of s-1 into j
 *   n[s,c,j]  tunes of class c played in j there     f[s,i,j], g[s,j]  flow along y, and into e
 *
 *   minimise   sum d(opening,j) e[0,j] + sum d(i,j) (y[s,i,j] + b[s,i,j])
 *   path       e[s,j] + sum_i y[s,i,j] = v[s,j] = l[s,j] + sum_i y[s,j,i];  sum_j e[s,j] = 1
 *   joined     sum_i b[s,i,j] = e[s,j];  sum_j b[s,i,j] = l[s-1,i]
 *   tunes      sum_sj n[s,c,j] = size of c;  sum_cj n[s,c,j] = length of s;
 *              n[s,c,j] <= min(size of c, length of s) v[s,j];  v[s,j] <= sum_c n[s,c,j]
 *   no rings   g[s,j] + sum_i f[s,i,j] - sum_i f[s,j,i] = v[s,j];  g <= J e;  f <= (J - 1) y
 *
 * "No rings" is the single-commodity flow of Gavish & Graves (1978). A tune that accepts several tunings, or
 * says `any`, is of a class that may be played in several states.
 */

/** Per kind a tuning by its pitches, '' for free. */
type State = readonly string[];

interface Room {
  readonly classes: readonly Class[];
  /** In which some class can be played. */
  readonly states: readonly State[];
  readonly opening: State;
  /** Pegs over all chairs; Infinity where a kind would have to be free again. */
  readonly distance: (from: State, to: State) => number;
}

interface Class {
  size: number;
  /** Where its one pinned tune stands; -1 for tunes without pins. */
  readonly position: number;
  /** Per kind; null where it plays in whatever it has. */
  readonly accepts: readonly (ReadonlySet<string> | null)[];
}

/** @throws RangeError for medleys and pairs, of which the program knows nothing */
export function levelOneProgram(problem: OrderingProblem): LinearProgram {
  if (problem.medleys.length + problem.befores.length > 0) throw new RangeError('Pins are all it knows');
  const program = new LinearProgram();
  const { classes, states, opening, distance } = roomOf(problem);
  const plays = classes.map(({ accepts }) =>
    states.map((state) => state.every((tuning, k) => accepts[k]?.has(tuning) ?? true)),
  );
  const used = classes.map((): string[] => []);

  let before: number[] = [];
  stretchesOf(problem).forEach(({ length, pinned }, s) => {
    const here = classes.flatMap(({ position }, c) => (position === pinned ? [c] : []));
    const playable = [...states.keys()].filter((j) => here.some((c) => plays[c]![j]!));
    const steps = playable.flatMap((i) =>
      playable.flatMap((j) =>
        length > 1 && i !== j && distance(states[i]!, states[j]!) < Infinity ? [[i, j] as const] : [],
      ),
    );
    for (const [i, j] of steps) {
      program.binary(`y_${s}_${i}_${j}`, distance(states[i]!, states[j]!));
      program.row(
        [
          [1, `f_${s}_${i}_${j}`],
          [1 - playable.length, `y_${s}_${i}_${j}`],
        ],
        '<=',
        0,
      );
    }
    const all: string[] = [];
    for (const j of playable) {
      const v = program.binary(`v_${s}_${j}`);
      const l = program.binary(`l_${s}_${j}`);
      const reach = s === 0 ? distance(opening, states[j]!) : 0;
      const e = program.binary(`e_${s}_${j}`, reach < Infinity ? reach : 0);
      if (reach === Infinity) program.row([[1, e]], '=', 0);
      const into = steps.flatMap(([from, to]) => (to === j ? [from] : []));
      const out = steps.flatMap(([from, to]) => (from === j ? [to] : []));
      program.row([[1, e], ...into.map((i) => [1, `y_${s}_${i}_${j}`] as const), [-1, v]], '=', 0);
      program.row([[1, l], ...out.map((i) => [1, `y_${s}_${j}_${i}`] as const), [-1, v]], '=', 0);
      const inflow = into.map((i) => [1, `f_${s}_${i}_${j}`] as const);
      const outflow = out.map((i) => [-1, `f_${s}_${j}_${i}`] as const);
      program.row([[1, `g_${s}_${j}`], ...inflow, ...outflow, [-1, v]], '=', 0);
      program.row(
        [
          [1, `g_${s}_${j}`],
          [-playable.length, e],
        ],
        '<=',
        0,
      );
      const played = here
        .filter((c) => plays[c]![j]!)
        .map((c) => {
          const n = program.whole(`n_${s}_${c}_${j}`);
          program.row(
            [
              [1, n],
              [-Math.min(classes[c]!.size, length), v],
            ],
            '<=',
            0,
          );
          used[c]!.push(n);
          return n;
        });
      program.row([[1, v], ...played.map((n) => [-1, n] as const)], '<=', 0);
      all.push(...played);
    }
    program.row(
      playable.map((j) => [1, `e_${s}_${j}`]),
      '=',
      1,
    );
    program.row(
      all.map((n) => [1, n]),
      '=',
      length,
    );
    if (s > 0) join(s, before, playable);
    before = playable;
  });
  used.forEach((names, c) =>
    program.row(
      names.map((n) => [1, n]),
      '=',
      classes[c]!.size,
    ),
  );
  return program;

  function join(s: number, before: readonly number[], after: readonly number[]): void {
    const ways = before.flatMap((i) =>
      after.flatMap((j) => {
        const pegs = distance(states[i]!, states[j]!);
        return pegs < Infinity ? [{ i, j, name: program.binary(`b_${s}_${i}_${j}`, pegs) }] : [];
      }),
    );
    for (const j of after) {
      const into = ways.filter((way) => way.j === j).map(({ name }) => [1, name] as const);
      program.row([...into, [-1, `e_${s}_${j}`]], '=', 0);
    }
    for (const i of before) {
      const out = ways.filter((way) => way.i === i).map(({ name }) => [1, name] as const);
      program.row([...out, [-1, `l_${s - 1}_${i}`]], '=', 0);
    }
  }
}

/** Runs of positions without pins, and pinned positions each alone (`pinned`: which; else -1). */
function stretchesOf({
  sets,
  pins,
}: OrderingProblem): { readonly length: number; readonly pinned: number }[] {
  const stretches: { length: number; pinned: number }[] = [];
  const taken = new Set(Object.values(pins));
  sets.flat().forEach((_, position) => {
    const last = stretches.at(-1);
    if (taken.has(position)) stretches.push({ length: 1, pinned: position });
    else if (last?.pinned === -1) last.length++;
    else stretches.push({ length: 1, pinned: -1 });
  });
  return stretches;
}

function roomOf(problem: OrderingProblem): Room {
  const chairs = problem.chairs.filter(({ count }) => count > 0);
  const soundOf = (pitches: readonly string[]): string => pitches.map(midi).join(' ');
  const opening = chairs.map(({ kind }) => {
    const tuned = problem.openings[kind.id];
    return tuned === null ? '' : soundOf(tuned?.pitches ?? kind.courses.map(({ standard }) => standard));
  });
  const held = opening.map((tuning) => new Set([tuning]));
  const classes = new Map<string, Class>();
  for (const id of problem.sets.flat()) {
    const { accepted } = problem.tunes.find((tune) => tune.id === id)!;
    const accepts = chairs.map(({ kind }, k) => {
      const list = accepted[kind.id] ?? 'any';
      if (list === 'any' || list.length === 0) return null;
      const sounds = list.map(({ pitches }) => soundOf(pitches)).sort();
      for (const sound of sounds) held[k]!.add(sound);
      return new Set(sounds);
    });
    const position = problem.pins[id] ?? -1;
    const key = `${position} ${accepts.map((set) => set && [...set].join()).join(';')}`;
    const known = classes.get(key);
    if (known) known.size++;
    else classes.set(key, { size: 1, position, accepts });
  }
  const states = new Map<string, State>();
  for (const { accepts } of classes.values()) {
    let some: State[] = [[]];
    accepts.forEach((set, k) => {
      some = some.flatMap((state) => [...(set ?? held[k]!)].map((tuning) => [...state, tuning]));
    });
    for (const state of some) states.set(state.join(';'), state);
  }
  const turned = (k: number, from: string, to: string): number => {
    if (from === '' || from === to) return 0;
    if (to === '') return Infinity;
    const [a, b] = [from.split(' '), to.split(' ')];
    const { kind, count } = chairs[k]!;
    return kind.courses.reduce(
      (sum, { pegs }, course) => sum + (a[course] === b[course] ? 0 : count * pegs),
      0,
    );
  };
  return {
    classes: [...classes.values()],
    states: [...states.values()],
    opening,
    distance: (from, to) => from.reduce((sum, tuning, k) => sum + turned(k, tuning, to[k]!), 0),
  };
}
