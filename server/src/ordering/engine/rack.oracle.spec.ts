import { builtInKind, standardPitches } from '@pegwell/shared/music/instrument';
import { retune } from '@pegwell/shared/music/retune';
import { planRack, type RackPlan, type RackProblem, type RackTune } from './rack';
import { cheapestCourse, FREE, type RackCost } from './rack-course';

const fiddle = builtInKind('fiddle')!;
const GDAE = 'G3 D4 A4 E5';
const ADAE = 'A3 D4 A4 E5';
const AEAE = 'A3 E4 A4 E5';
const GDGD = 'G3 D4 G4 D5';
const DDAD = 'D3 D4 A4 D5';

const pitches = (text: string) => text.split(' ');

const plan = (problem: RackProblem): RackPlan => {
  const planned = planRack(problem);
  if (!planned.ok) throw new Error(planned.reason);
  return planned.value;
};

/** A small seeded generator (mulberry32), so that a failing case can be run again. */
function randomFrom(seed: number): (below: number) => number {
  let state = (seed * 2654435761) >>> 0;
  return (below) => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return Math.floor((((t ^ (t >>> 14)) >>> 0) / 4294967296) * below);
  };
}

const POOLS: Readonly<Record<string, readonly string[]>> = {
  fiddle: [GDAE, ADAE, AEAE, 'A3 E4 A4 C#5', GDGD, DDAD, 'G3 D4 A4 D5'],
  banjo: ['G4 D3 G3 B3 D4', 'G4 D3 G3 C4 D4', 'G4 C3 G3 C4 D4', 'A4 D3 F#3 A3 D4', 'G4 C3 G3 B3 D4'],
  mandolin: [GDAE, ADAE, AEAE, GDGD],
};

interface Size {
  readonly tunes: number;
  readonly instruments: number;
  readonly tunings: number;
}

function randomProblem(seed: number, size: (random: (below: number) => number) => Size): RackProblem {
  const random = randomFrom(seed);
  const pick = <T>(list: readonly T[]): T => list[random(list.length)]!;
  const { tunes, instruments, tunings } = size(random);
  const kind = builtInKind(pick(Object.keys(POOLS)))!;
  const pool = [...POOLS[kind.id]!].sort(() => random(3) - 1).slice(0, tunings);
  const anySet = 2 + random(5);
  const length = 1 + random(5);
  return {
    kind,
    starts: Array.from({ length: instruments }, () =>
      random(4) === 0 ? null : pitches(random(5) === 0 ? pick(POOLS[kind.id]!) : pick(pool)),
    ),
    tunes: Array.from({ length: tunes }, (_, index): RackTune => ({
      id: `t${index}`,
      offClock: index === 0 || random(length + 1) === 0,
      announced: random(anySet) === 0 ? null : { pitches: pitches(pick(pool)), capo: random(3) },
    })),
  };
}

const same = (a: readonly string[] | null, b: readonly string[] | null) => a?.join() === b?.join();

/** A cost as one number, so that it compares level by level. */
const valueOf = ({ pegChanges, stops, semitones }: RackCost) => pegChanges * 1e8 + stops * 1e4 + semitones;
const STOP = valueOf({ pegChanges: 0, stops: 1, semitones: 0 });

/** What instruments are tuned to here: what is announced, what they arrive in, and standard. */
function tuningsOf({ kind, starts, tunes }: RackProblem): readonly (readonly string[])[] {
  const all = [
    standardPitches(kind),
    ...tunes.flatMap(({ announced }) => (announced ? [announced.pitches] : [])),
    ...starts,
  ];
  return all.filter(
    (each, index): each is readonly string[] =>
      each !== null && all.findIndex((other) => same(other, each)) === index,
  );
}

/** Every list of `count` choices. */
function lists<T>(choices: readonly T[], count: number): readonly (readonly T[])[] {
  if (count === 0) return [[]];
  return lists(choices, count - 1).flatMap((list) => choices.map((choice) => [...list, choice]));
}

type Rack = readonly (readonly string[])[];

interface Racks {
  /** Every way the instruments can stand. */
  readonly all: readonly Rack[];
  /** From one to another at one place off the clock, by index. */
  readonly turning: readonly (readonly number[])[];
}

function racksOf(problem: RackProblem): Racks {
  const tunings = tuningsOf(problem);
  const price = tunings.map((from) =>
    tunings.map((to) => valueOf({ ...retune(problem.kind, from, to), stops: 0 })),
  );
  const all = lists([...tunings.keys()], problem.starts.length);
  return {
    all: all.map((rack) => rack.map((tuning) => tunings[tuning]!)),
    turning: all.map((from) =>
      all.map((to) => to.reduce((sum, tuning, index) => sum + price[from[index]!]![tuning]!, 0)),
    ),
  };
}

/** How a rack may come: as it arrives, a free instrument in anything. */
const comesAs = ({ starts }: RackProblem, rack: Rack) =>
  starts.every((start, index) => start === null || same(start, rack[index]!));
const serves = ({ announced }: RackTune, rack: Rack) =>
  announced === null || rack.some((tuning) => same(tuning, announced.pitches));

/**
 * Plain enumeration: before every tune every instrument is retuned to every tuning, or left; each tune is
 * played where an instrument stands in its tuning. Only what is dearer already is not followed further.
 */
function byEnumeration(problem: RackProblem, { all, turning }: Racks): number {
  let best = Infinity;
  const follow = (place: number, from: number, cost: number): void => {
    if (cost >= best) return;
    const tune = problem.tunes[place];
    if (!tune) {
      best = cost;
      return;
    }
    for (const [to, rack] of all.entries()) {
      if (!serves(tune, rack)) continue;
      const stop = to !== from && !tune.offClock ? STOP : 0;
      follow(place + 1, to, cost + turning[from]![to]! + stop);
    }
  };
  for (const [index, rack] of all.entries()) if (comesAs(problem, rack)) follow(0, index, 0);
  return best;
}

/** The same for longer evenings: of all ways to one standing of the rack only the cheapest goes on. */
function byTable(problem: RackProblem, { all, turning }: Racks): number {
  let costs = all.map((rack) => (comesAs(problem, rack) ? 0 : Infinity));
  for (const tune of problem.tunes) {
    costs = all.map((rack, to) => {
      let best = Infinity;
      if (!serves(tune, rack)) return best;
      for (let from = 0; from < all.length; from++) {
        const stop = to !== from && !tune.offClock ? STOP : 0;
        best = Math.min(best, costs[from]! + turning[from]![to]! + stop);
      }
      return best;
    });
  }
  return Math.min(...costs);
}

/** Plays a plan through and counts it again. @returns null where it cannot be done as it says */
function replay(
  { starts, kind, tunes }: RackProblem,
  { bring, turns, tunes: played }: RackPlan,
): number | null {
  const rack = [...bring];
  if (!starts.every((start, index) => start === null || same(start, bring[index]!))) return null;
  let cost = 0;
  for (const [place, { id, offClock, announced }] of tunes.entries()) {
    const here = turns.filter(({ before }) => before === id);
    for (const { instrument, from, to, deltas, pegChanges, semitones } of here) {
      const again = retune(kind, from.pitches, to.pitches);
      if (!same(rack[instrument]!, from.pitches) || again.deltas.join() !== deltas.join()) return null;
      if (again.pegChanges !== pegChanges || again.semitones !== semitones) return null;
      cost += valueOf({ pegChanges, stops: 0, semitones });
      rack[instrument] = to.pitches;
    }
    if (here.length > 0 && !offClock) cost += STOP;
    const { instrument, tuned } = played[place]!;
    if (announced && !same(rack[instrument]!, announced.pitches)) return null;
    if (!same(rack[instrument] ?? null, tuned?.pitches ?? null)) return null;
  }
  return cost;
}

describe('against plain enumeration', () => {
  it('costs the least of all assignments and all places of retuning, on 400 problems', () => {
    for (let seed = 1; seed <= 400; seed++) {
      const problem = randomProblem(seed, (random) => {
        const instruments = 1 + random(3);
        const [tunings, most] = instruments === 3 ? [3, 5] : [2 + random(3), 6];
        return { instruments, tunings, tunes: 2 + random(most - 1) };
      });
      const planned = plan(problem);
      expect([seed, valueOf(planned.cost)]).toEqual([seed, byEnumeration(problem, racksOf(problem))]);
      expect([seed, replay(problem, planned)]).toEqual([seed, valueOf(planned.cost)]);
    }
  });

  it('and on 200 longer ones, of up to 24 tunes and four instruments', () => {
    for (let seed = 1001; seed <= 1200; seed++) {
      const problem = randomProblem(seed, (random) => {
        const instruments = 1 + random(4);
        return { instruments, tunings: [7, 6, 4, 3][instruments - 1]!, tunes: 6 + random(19) };
      });
      const planned = plan(problem);
      expect([seed, valueOf(planned.cost)]).toEqual([seed, byTable(problem, racksOf(problem))]);
      expect([seed, replay(problem, planned)]).toEqual([seed, valueOf(planned.cost)]);
      const ones = problem.starts.map((start) => ({ ...problem, starts: [start] }));
      const alone = Math.min(...ones.map((one) => byTable(one, racksOf(one))));
      expect([seed, valueOf(planned.alone)]).toEqual([seed, alone]);
    }
  });
});

describe('eight fiddle tunings, one tune each, over all orders', () => {
  // GDAE, ADAE, AEAE, GDGD, DDAD, AEAC#, GDAD, AEAD (Wikipedia, "Cross tuning"; waxandwane.org/oldtime.html).
  // The figures were found by trying all 8! orders in another program; every retune counts, on the clock or off.
  const EIGHT = [GDAE, ADAE, AEAE, GDGD, DDAD, 'A3 E4 A4 C#5', 'G3 D4 A4 D5', 'A3 E4 A4 D5'].map(pitches);
  const retunes = EIGHT.flatMap((from) => EIGHT.map((to) => retune(fiddle, from, to)));
  const pegs = retunes.map(({ pegChanges }) => pegChanges);
  const semitones = retunes.map((each) => each.semitones);
  const none = retunes.map(() => 0);

  /** The least of the first figure over all orders. */
  function least(starts: readonly number[], first: readonly number[]): number {
    let best = Infinity;
    const order: number[] = [];
    const permute = (): void => {
      if (order.length < EIGHT.length) {
        for (const tuning of EIGHT.keys()) {
          if (order.includes(tuning)) continue;
          order.push(tuning);
          permute();
          order.pop();
        }
        return;
      }
      const asks = order.map((tuning, index) => ({ tuning, offClock: index === 0 }));
      const { cost } = cheapestCourse(asks, starts, { tunings: EIGHT.length, pegs: first, semitones: none });
      best = Math.min(best, cost.pegChanges);
    };
    permute();
    return best;
  }

  it.each([
    ['one fiddle, free at the start', [FREE], 8, 18],
    ['one fiddle in GDAE', [0], 8, 21],
    ['two fiddles in GDAE', [0, 0], 8, 18],
    ['two fiddles, both free at the start', [FREE, FREE], 6, 11],
  ])('%s', (_, starts, strings, halfSteps) => {
    expect([least(starts, pegs), least(starts, semitones)]).toEqual([strings, halfSteps]);
  });
});

describe('a long evening', () => {
  it('of 200 tunes in 14 tunings on four fiddles is planned in a moment', () => {
    const random = randomFrom(7);
    const pool = ['C3', 'D3', 'E3', 'F3', 'G3', 'A3', 'B3'].flatMap((g) => [
      `${g} D4 A4 E5`,
      `${g} E4 A4 D5`,
    ]);
    const tunes = Array.from({ length: 200 }, (_, index): RackTune => ({
      ...{ id: `t${index}`, offClock: index % 50 === 0 },
      announced: { pitches: pitches(pool[random(pool.length)]!), capo: 0 },
    }));
    const starts = [GDAE, GDAE, GDAE, GDAE].map(pitches);
    const millis = Array.from({ length: 5 }, () => {
      const begun = process.cpuUsage();
      plan({ kind: fiddle, starts, tunes });
      const { user, system } = process.cpuUsage(begun);
      return (user + system) / 1000;
    });
    // Processor time, so that a busy machine changes nothing; the limit leaves room for a slow one.
    expect(Math.min(...millis)).toBeLessThan(100);
  });
});
