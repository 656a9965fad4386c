import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { read, refused, type Parsed } from '@pegwell/shared/music/parsed';
import { midiOf } from '@pegwell/shared/music/pitch';
import { retune, type Retune } from '@pegwell/shared/music/retune';
import type { Tuned } from '@pegwell/shared/music/tuning';
import { MOST_INSTRUMENTS } from '@pegwell/shared/session/rack';
import { cheapestCourse, FREE, type RackAsk, type RackCost, type Serving } from './rack-course';

/** A player with several instruments of one kind, and an evening whose order and tunings are fixed. */
export interface RackProblem {
  readonly kind: InstrumentKind;
  /** By instrument: pitches in which it arrives; null: tuned at home to whatever it is first played in. */
  readonly starts: readonly (readonly string[] | null)[];
  /** In playing order. */
  readonly tunes: readonly RackTune[];
}

export interface RackTune {
  readonly id: string;
  /** The place before it: before the first tune or in a break. */
  readonly offClock: boolean;
  /** As announced; null where the kind plays it as it stands, on any instrument. A capo costs nothing here. */
  readonly announced: Tuned | null;
}

/** One instrument retuned at one place. */
export interface RackTurn extends Retune {
  /** Id of the tune after the place. */
  readonly before: string;
  /** Id of the tune that needs it: the same one, or a later one. */
  readonly needed: string;
  readonly offClock: boolean;
  readonly instrument: number;
  /** With the capo of the last tune on it, and that of the tune that needs it. */
  readonly from: Tuned;
  readonly to: Tuned;
}

export interface RackPlan {
  /** By instrument: how it is tuned when the player comes; null for a free one that no tune needs. */
  readonly bring: readonly (readonly string[] | null)[];
  /** By tune: the instrument, and how it then stands; null where nothing was ever said. */
  readonly tunes: readonly {
    readonly id: string;
    readonly instrument: number;
    readonly tuned: Tuned | null;
  }[];
  /** In the order of places, then of instruments. */
  readonly turns: readonly RackTurn[];
  readonly cost: RackCost;
  /** With one of these instruments, that with which it costs least. */
  readonly alone: RackCost;
}

/** Announced ones; what instruments arrive in may come on top. */
export const MOST_TUNINGS = 14;

/**
 * The cheapest plan by (peg changes, stops on the clock in which this player turns a peg, semitones), exact.
 * @throws RangeError for no instruments or more than MOST_INSTRUMENTS
 * @example planRack({ kind: fiddle, starts: [null, null], tunes }).value.bring // [GDAE, AEAE] in pitches
 */
export function planRack({ kind, starts, tunes }: RackProblem): Parsed<RackPlan> {
  if (starts.length < 1 || starts.length > MOST_INSTRUMENTS) {
    throw new RangeError(`A rack has 1 to ${MOST_INSTRUMENTS} instruments, not ${starts.length}`);
  }
  const tunings = new Tunings();
  const asks = asksOf(tunes, tunings);
  if (tunings.pitches.length > MOST_TUNINGS) {
    return refused(
      `This evening asks a ${kind.name.toLowerCase()} for ${tunings.pitches.length} tunings. A plan is worked out for up to ${MOST_TUNINGS}.`,
    );
  }
  const arrive = starts.map((pitches) => (pitches === null ? FREE : tunings.indexOf(pitches)));
  const moves = tunings.pitches.flatMap((from) => tunings.pitches.map((to) => retune(kind, from, to)));
  const table = {
    tunings: tunings.pitches.length,
    pegs: moves.map(({ pegChanges }) => pegChanges),
    semitones: moves.map(({ semitones }) => semitones),
  };
  const { cost, servings } = cheapestCourse(asks, arrive, table);
  const alone = arrive.map((start) => cheapestCourse(asks, [start], table).cost).sort(compareCosts)[0]!;
  const { bring, players, retunes } = partsOf(asks, arrive, servings, tunes);
  const turns = retunes
    .sort((a, b) => a.place - b.place || a.instrument - b.instrument)
    .map(({ place, needed, instrument, from, to, capo }): RackTurn => {
      const { id: before, offClock } = tunes[place]!;
      return {
        ...{ before, needed: tunes[needed]!.id, offClock, instrument },
        from: { pitches: tunings.pitches[from]!, capo },
        to: { pitches: tunings.pitches[to]!, capo: tunes[needed]!.announced!.capo },
        ...moves[from * table.tunings + to]!,
      };
    });
  const brought = bring.map((tuning) => (tuning === FREE ? null : tunings.pitches[tuning]!));
  return read({ bring: brought, tunes: walk(tunes, players, brought, turns), turns, cost, alone });
}

/** Spelled pitches by index; tunings that sound alike are one. */
class Tunings {
  readonly pitches: (readonly string[])[] = [];
  private readonly known = new Map<string, number>();

  indexOf(pitches: readonly string[]): number {
    const sound = pitches.map(midiOf).join(' ');
    const index = this.known.get(sound) ?? this.pitches.push(pitches) - 1;
    this.known.set(sound, index);
    return index;
  }
}

interface PlacedAsk extends RackAsk {
  /** Index of the tune. */
  readonly place: number;
}

function asksOf(tunes: readonly RackTune[], tunings: Tunings): readonly PlacedAsk[] {
  let quiet = false;
  return tunes.flatMap(({ announced, offClock }, place) => {
    quiet ||= offClock;
    if (announced === null) return [];
    const ask = { place, tuning: tunings.indexOf(announced.pitches), offClock: quiet };
    quiet = false;
    return [ask];
  });
}

interface PlacedRetune {
  /** Indexes of the tune after the place, and of the one that needs it. */
  readonly place: number;
  readonly needed: number;
  readonly instrument: number;
  readonly from: number;
  readonly to: number;
  /** On it before. */
  readonly capo: number;
}

/** Gives the servings to instruments with a name, and each retune a place. */
function partsOf(
  asks: readonly PlacedAsk[],
  arrive: readonly number[],
  servings: readonly Serving[],
  tunes: readonly RackTune[],
): {
  /** By instrument: index of the tuning it comes in, FREE where none was needed. */
  readonly bring: readonly number[];
  /** By index of the tune that asks. */
  readonly players: ReadonlyMap<number, number>;
  readonly retunes: PlacedRetune[];
} {
  const instruments = arrive.map((tuning) => ({ tuning, ready: true, last: -1, capo: 0 }));
  const bring = [...arrive];
  const players = new Map<number, number>();
  const retunes: PlacedRetune[] = [];
  const stops = new Set<number>();
  let held = -1;
  asks.forEach(({ place, tuning, offClock }, index) => {
    const { from, ready } = servings[index]!;
    if (offClock) for (const each of instruments) each.ready = true;
    const fits = (each: { tuning: number; ready: boolean } | undefined) =>
      each?.tuning === from && each.ready === ready;
    // Of instruments that stand alike, the one in the hand stays there.
    if (!fits(instruments[held])) held = instruments.findIndex(fits);
    const one = instruments[held]!;
    if (from === FREE) bring[held] = tuning;
    else if (from !== tuning) {
      const at = quietPlace(tunes, stops, one.last + 1, place);
      if (!tunes[at]!.offClock && !stops.has(at)) {
        stops.add(at);
        for (const each of instruments) each.ready = true;
      }
      retunes.push({ place: at, needed: place, instrument: held, from, to: tuning, capo: one.capo });
    }
    one.tuning = tuning;
    one.ready = false;
    one.last = place;
    one.capo = tunes[place]!.announced!.capo;
    players.set(place, held);
  });
  return { bring, players, retunes };
}

/** Of the places from first to last: the last one off the clock, else the last where there is a stop, else the last. */
function quietPlace(
  tunes: readonly RackTune[],
  stops: ReadonlySet<number>,
  first: number,
  last: number,
): number {
  for (let place = last; place >= first; place--) if (tunes[place]!.offClock) return place;
  for (let place = last; place >= first; place--) if (stops.has(place)) return place;
  return last;
}

/** Every tune with the instrument it is played on; a tune as it stands is played on the one in the hand. */
function walk(
  tunes: readonly RackTune[],
  players: ReadonlyMap<number, number>,
  bring: RackPlan['bring'],
  turns: readonly RackTurn[],
): RackPlan['tunes'] {
  const stands = bring.map((pitches): Tuned | null => pitches && { pitches, capo: 0 });
  let held = [...players.values()][0] ?? 0;
  return tunes.map(({ id, announced }, place) => {
    for (const { instrument, to } of turns.filter(({ before }) => before === id)) stands[instrument] = to;
    held = players.get(place) ?? held;
    const tuned = announced ?? stands[held] ?? null;
    stands[held] = tuned;
    return { id, instrument: held, tuned };
  });
}

function compareCosts(a: RackCost, b: RackCost): number {
  return a.pegChanges - b.pegChanges || a.stops - b.stops || a.semitones - b.semitones;
}
