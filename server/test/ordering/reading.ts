import type { Goal, Score } from '@pegwell/shared/session/evening';
import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';

/*
 * score.md read a second time, for tests alone: nothing here is shared with the engine or with the plain score
 * but the shapes of their data. Choices are kept apart only while they can still differ, so that an order can
 * be walked tune by tune.
 */

/** How all kinds stand together, as one number; see {@link Reading.start}. */
export type Stand = number;

/** A way to play a tune: how the kinds stand then, and what getting there costs. */
export interface Way {
  readonly to: Stand;
  readonly cost: number;
}

export interface ReadTune {
  /** Position in the host's order. */
  readonly index: number;
  readonly id: string;
  /** Per kind what may be played; null where the kind keeps what it has. */
  readonly options: readonly (readonly Option[] | null)[];
  readonly tonic: number;
  readonly spaced: boolean;
  /** A number for what may be played: the same for tunes that accept the same. */
  readonly list: number;
}

interface Option {
  readonly held: number;
  /** Chairs for which this is not the first choice. */
  readonly second: number;
}

interface ReadKind {
  readonly count: number;
  readonly pegs: readonly number[];
  /** All that the kind ever holds; null is "free". */
  readonly held: readonly (Held | null)[];
}

interface Held {
  readonly midi: readonly number[];
  readonly capo: number;
}

const SEMITONE: Record<string, number> = { C: 0, D: 2, E: 4, F: 5, G: 7, A: 9, B: 11 };

/** Scientific pitch notation, middle C = C4 = 60. */
export function midi(name: string): number {
  const altered = name.split('#').length - 1 - (name.slice(1).split('b').length - 1);
  return SEMITONE[name[0]!]! + altered + 12 * (Number(name.at(-1)) + 1);
}

const LEVELS = {
  pegs: ['pegs', 'stops', 'breaks', 'seconds', 'capos', 'keys', 'semitones'],
  stops: ['stops', 'pegs', 'breaks', 'seconds', 'capos', 'keys', 'semitones'],
} as const;
type Level = (typeof LEVELS)['pegs'][number];

/** The seven levels of a score in the goal's order. */
export function levelsOf(score: Score, goal: Goal): number[] {
  const two = [score.pegChanges, score.retuneStops];
  const rest = [score.ruleBreaks, score.secondChoices, score.capoMoves, score.keyChanges, score.semitones];
  return [...(goal === 'pegs' ? two : two.reverse()), ...rest];
}

/** Below 0 where the first list is the better. */
export function compareLevels(a: readonly number[], b: readonly number[]): number {
  const at = a.findIndex((value, index) => value !== b[index]);
  return at === -1 ? 0 : a[at]! - b[at]!;
}

export class Reading {
  /** In the host's order. */
  readonly tunes: readonly ReadTune[];
  /** By position: whether a set begins there, which is off the clock. */
  readonly setStart: readonly boolean[];
  private readonly kinds: readonly ReadKind[];
  private readonly goal: Goal;
  /** A cost is one number with a digit per level, each with room for the most this evening can come to. */
  private readonly unit: Record<Level, number>;
  private readonly ways = new Map<number, readonly Way[]>();

  constructor(problem: OrderingProblem) {
    this.goal = problem.goal;
    this.setStart = problem.sets.flatMap((set) => set.map((_, index) => index === 0));
    const chairs = problem.chairs.filter(({ count }) => count > 0);
    const keys = chairs.map(() => new Map<string, number>());
    const held = chairs.map((): (Held | null)[] => []);
    const hold = (k: number, tuned: { pitches: readonly string[]; capo: number } | null): number => {
      const it = tuned && { midi: tuned.pitches.map(midi), capo: tuned.capo };
      const key = JSON.stringify(it);
      const known = keys[k]!.get(key) ?? held[k]!.push(it) - 1;
      keys[k]!.set(key, known);
      return known;
    };
    // The opening comes first, so that it is number 0 of each kind.
    chairs.forEach(({ kind }, k) => {
      const opening = problem.openings[kind.id];
      hold(
        k,
        opening === undefined ? { pitches: kind.courses.map(({ standard }) => standard), capo: 0 } : opening,
      );
    });
    const lists = new Map<string, number>();
    const spaced = problem.spacedRhythms.map((rhythm) => rhythm.toLowerCase());
    this.tunes = problem.sets.flat().map((id, index): ReadTune => {
      const { accepted, tonic, rhythm } = problem.tunes.find((tune) => tune.id === id)!;
      const options = chairs.map(({ kind, count }, k): Option[] | null => {
        const list = accepted[kind.id] ?? 'any';
        if (list === 'any' || list.length === 0) return null;
        return list.map((tuned, place) => ({ held: hold(k, tuned), second: place > 0 ? count : 0 }));
      });
      const isSpaced = rhythm !== null && spaced.includes(rhythm.toLowerCase());
      const list = lists.get(JSON.stringify(options)) ?? lists.size;
      lists.set(JSON.stringify(options), list);
      return { index, id, options, tonic, spaced: isSpaced, list };
    });
    this.kinds = chairs.map(({ kind, count }, k) => ({
      count,
      pegs: kind.courses.map(({ pegs }) => pegs),
      held: held[k]!,
    }));
    this.unit = this.unitsFor(this.tunes.length);
  }

  /** All kinds in their openings: a number in mixed radix, each kind's holding a digit. */
  readonly start: Stand = 0;

  /** All ways to play a tune from where the kinds stand, the cheaper of two that end alike. */
  waysTo(tune: ReadTune, from: Stand, offClock: boolean, inMedley: boolean): readonly Way[] {
    const key = ((from * this.tunes.length + tune.list) * 2 + Number(offClock)) * 2 + Number(inMedley);
    let ways = this.ways.get(key);
    if (ways === undefined) this.ways.set(key, (ways = this.waysAnew(tune, from, offClock, inMedley)));
    return ways;
  }

  private waysAnew(tune: ReadTune, from: Stand, offClock: boolean, inMedley: boolean): Way[] {
    const { unit } = this;
    let parts = [{ to: 0, cost: 0, turned: false, changed: false }];
    let radix = 1;
    this.kinds.forEach(({ count, pegs, held }, k) => {
      const has = Math.floor(from / radix) % held.length;
      const options = tune.options[k] ?? [{ held: has, second: 0 }];
      parts = parts.flatMap(({ to, cost, turned, changed }) =>
        options.map((option) => {
          const part = {
            to: to + radix * option.held,
            cost: cost + unit.seconds * option.second,
            turned,
            changed,
          };
          const a = held[has] ?? null;
          const b = held[option.held] ?? null;
          // What is free is tuned before the evening, at no cost.
          if (a === null || b === null) return part;
          pegs.forEach((strings, course) => {
            const delta = Math.abs(b.midi[course]! - a.midi[course]!);
            if (delta === 0) return;
            part.cost += count * strings * (unit.pegs + unit.semitones * delta);
            part.turned = part.changed = true;
          });
          if (a.capo !== b.capo) {
            part.changed = true;
            if (!offClock) part.cost += unit.capos * count;
          }
          return part;
        }),
      );
      radix *= held.length;
    });
    const least = new Map<Stand, number>();
    for (const { to, cost, turned, changed } of parts) {
      const all = cost + (turned && !offClock ? unit.stops : 0) + (changed && inMedley ? unit.breaks : 0);
      if (all < (least.get(to) ?? Infinity)) least.set(to, all);
    }
    return [...least].map(([to, cost]) => ({ to, cost }));
  }

  /** What two neighbours inside a set cost, whatever is tuned. */
  between(previous: ReadTune, tune: ReadTune, inMedley: boolean): number {
    const spaced = previous.spaced && tune.spaced ? this.unit.breaks : 0;
    return spaced + (!inMedley && previous.tonic !== tune.tonic ? this.unit.keys : 0);
  }

  /** A cost as seven levels, in the goal's order. */
  levels(cost: number): number[] {
    let rest = cost;
    return LEVELS[this.goal].map((level) => {
      const value = Math.floor(rest / this.unit[level]);
      rest -= value * this.unit[level];
      return value;
    });
  }

  private unitsFor(tunes: number): Record<Level, number> {
    const most = {
      pegs: 0,
      stops: tunes,
      breaks: 2 * tunes,
      seconds: 0,
      capos: 0,
      keys: tunes,
      semitones: 0,
    };
    for (const { count, pegs, held } of this.kinds) {
      const ends = held.filter((one) => one !== null);
      const span = (course: number): number => {
        const all = ends.map((one) => one.midi[course]!);
        return all.length === 0 ? 0 : Math.max(...all) - Math.min(...all);
      };
      most.pegs += tunes * count * pegs.reduce((sum, strings) => sum + strings, 0);
      most.semitones +=
        tunes * count * pegs.reduce((sum, strings, course) => sum + strings * span(course), 0);
      most.seconds += tunes * count;
      most.capos += tunes * count;
    }
    const unit = { ...most };
    let weight = 1;
    for (const level of [...LEVELS[this.goal]].reverse()) {
      unit[level] = weight;
      weight *= most[level] + 1;
    }
    if (weight > Number.MAX_SAFE_INTEGER) throw new RangeError('Too large for one number');
    return unit;
  }
}
