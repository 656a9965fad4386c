import { centsBetween } from '@pegwell/shared/music/pitch';

/** One string of the instrument as it stands while one of them is tuned. */
export interface TunerString {
  /** As players call its peg: `D peg (3rd)`. */
  readonly peg: string;
  /** What it sounds at now, as far as it is known, in hertz. */
  readonly hertz: number;
}

/** What is to be reached. */
export interface TunerGoal {
  readonly strings: readonly TunerString[];
  /** Which of them is tuned. */
  readonly index: number;
  readonly target: number;
  /** A capo that should have come off, in frets; 0 where there was none. */
  readonly capo: number;
  /** Cents above where the string stood and is to go, whichever is higher, from which it is in danger. */
  readonly danger: number;
}

export interface TunerSettings {
  /** Cents either side of the target that count as in tune. */
  readonly tolerance: number;
  /** How long it must stay there, in milliseconds. */
  readonly hold: number;
}

export const USUAL_SETTINGS: TunerSettings = { tolerance: 5, hold: 500 };

/** What the ear made of a frame. */
export interface Reading {
  /** Milliseconds, ever rising. */
  readonly at: number;
  /** Null where no string is heard. */
  readonly hertz: number | null;
  /** Decibels below full scale. */
  readonly level: number;
}

/**
 * What to tell the player. `quiet`: play the string; `tuning`: on the way; `there`: in tune, being held; `done`: held
 * long enough; `wrong`: another string sounds; `still`: plucked three times and it has not moved; `past`: over the
 * mark; `danger`: far over it; `slipped`: it was there and has gone back; `capo`: the capo seems to be on.
 */
export type Telling =
  'quiet' | 'tuning' | 'there' | 'done' | 'wrong' | 'still' | 'past' | 'danger' | 'slipped' | 'capo';

export interface TunerState {
  readonly telling: Telling;
  /** Cents that the string still has to go, up positive; null until it was heard. */
  readonly toGo: number | null;
  /** The peg whose string sounds instead. */
  readonly wrongPeg: string | null;
  /** For {@link hear} alone. */
  readonly memory: Memory;
}

interface Memory {
  /** The last few pitches of the string that sounds, newest last. */
  readonly recent: readonly number[];
  readonly heardAt: number | null;
  /** Where this string stood at each of its last plucks, in cents from the target. */
  readonly plucks: readonly number[];
  /** Whether the string that sounds was plucked after a pause or a new attack. */
  readonly inPluck: boolean;
  readonly lowest: number;
  /** Since when the string is in tune. */
  readonly thereSince: number | null;
  readonly wasThere: boolean;
  /** Since when another string sounds, and which. */
  readonly other: { readonly index: number; readonly since: number } | null;
  /** Whether the string was ever heard where it stood at first. */
  readonly seenAtStart: boolean;
}

/** Readings that one pitch is made of: a fifth of a second, about one swing of a player's vibrato. */
const READINGS = 9;
/** The fewest to say anything from. */
const LEAST_READINGS = 5;
/** The highest and the lowest so many count for nothing: single wrong readings change nothing. */
const LEFT_OUT = 2;
/** No string for so long, and the next sound is a new pluck. Milliseconds. */
const PAUSE = 180;
/** A rise of the level that is a new pluck, in decibels. */
const ATTACK = 6;
/** Another string must sound for so long before it is named. */
const SURE = 160;
/** A string that stands within so many cents of where it was has not moved. */
const STAYED = 8;
/** Plucks without movement after which the peg is doubted. */
const DOUBT_AFTER = 3;
const PAST = 15;
const SLIPPED = 15;
/** How near a string must be to be taken for it, in cents. */
const NEAR = 60;

const NOTHING: Memory = {
  recent: [],
  heardAt: null,
  plucks: [],
  inPluck: false,
  lowest: 0,
  thereSince: null,
  wasThere: false,
  other: null,
  seenAtStart: false,
};

export const START: TunerState = { telling: 'quiet', toGo: null, wrongPeg: null, memory: NOTHING };

/** Follows one string to its target, a reading at a time. Knows no clock and no sound. */
export function hear(
  state: TunerState,
  reading: Reading,
  goal: TunerGoal,
  settings: TunerSettings = USUAL_SETTINGS,
): TunerState {
  const { memory } = state;
  if (state.telling === 'done') return state;
  if (reading.hertz === null) return afterSilence(state, reading);

  const whose = stringOf(reading.hertz, goal);
  if (whose === null) return state;
  if (whose !== goal.index) return another(state, whose, reading, goal);

  const attack = !memory.inPluck || reading.level > memory.lowest + ATTACK;
  const recent = [...(attack ? [] : memory.recent), reading.hertz].slice(-READINGS);
  const plucks = attack ? withPluck(memory, goal) : memory.plucks;
  const kept: Memory = {
    ...memory,
    recent,
    plucks,
    heardAt: reading.at,
    inPluck: true,
    lowest: attack ? reading.level : Math.min(memory.lowest, reading.level),
    other: null,
  };
  // Too little heard yet to say anything: a string begins sharp and unclear.
  if (recent.length < LEAST_READINGS) return { ...state, memory: kept };
  return told(kept, reading.at, goal, settings);
}

function told(memory: Memory, at: number, goal: TunerGoal, { tolerance, hold }: TunerSettings): TunerState {
  const start = goal.strings[goal.index]?.hertz ?? goal.target;
  const pitch = middle(memory.recent);
  const over = centsBetween(goal.target, pitch);
  const up = goal.target >= start;
  const beyond = up ? over : -over;
  const seenAtStart = memory.seenAtStart || Math.abs(centsBetween(start, pitch)) < NEAR;
  const isThere = Math.abs(over) <= tolerance;
  const thereSince = isThere ? (memory.thereSince ?? at) : null;
  const held = thereSince !== null && at - thereSince >= hold;
  const next: Memory = { ...memory, seenAtStart, thereSince, wasThere: memory.wasThere || isThere };
  const say = (telling: Telling): TunerState => ({ telling, toGo: -over, wrongPeg: null, memory: next });

  const withCapo = goal.capo > 0 && Math.abs(centsBetween(start, pitch) - goal.capo * 100) < NEAR;
  if (withCapo && !seenAtStart) return say('capo');
  if (held) return say('done');
  if (isThere) return say('there');
  if (centsBetween(Math.max(start, goal.target), pitch) >= goal.danger) return say('danger');
  if (beyond > PAST) return say('past');
  if (memory.wasThere && beyond < -SLIPPED) return say('slipped');
  if (hasStayed(memory, over)) return say('still');
  return say('tuning');
}

function afterSilence(state: TunerState, { at }: Reading): TunerState {
  const { memory } = state;
  if (memory.heardAt === null || at - memory.heardAt < PAUSE) return state;
  // The words stay until something is heard that says otherwise.
  return { ...state, memory: { ...memory, inPluck: false, thereSince: null } };
}

function another(state: TunerState, index: number, { at }: Reading, goal: TunerGoal): TunerState {
  const known = state.memory.other;
  const other = known?.index === index ? known : { index, since: at };
  const memory: Memory = { ...state.memory, other, heardAt: at, inPluck: false, thereSince: null };
  if (at - other.since < SURE) return { ...state, memory };
  return { ...state, telling: 'wrong', wrongPeg: goal.strings[index]?.peg ?? null, memory };
}

/** Where the pluck that ends now had come to. */
function withPluck(memory: Memory, goal: TunerGoal): readonly number[] {
  if (memory.recent.length < LEAST_READINGS) return memory.plucks;
  return [...memory.plucks, centsBetween(goal.target, middle(memory.recent))].slice(-DOUBT_AFTER);
}

function hasStayed(memory: Memory, over: number): boolean {
  const all = [...memory.plucks, over];
  return all.length > DOUBT_AFTER && Math.max(...all) - Math.min(...all) <= STAYED;
}

/**
 * Whose pitch it is: that of the string being tuned anywhere on its way, and a little past both ends; that of another
 * where it stands. Null for what is near none of them.
 */
function stringOf(hertz: number, { strings, index, target, capo }: TunerGoal): number | null {
  const start = strings[index]?.hertz ?? target;
  const [low, high] = [Math.min(start, target), Math.max(start, target)];
  const outside = Math.max(0, centsBetween(high, hertz), centsBetween(hertz, low));
  const own = capo > 0 && Math.abs(centsBetween(start, hertz) - capo * 100) < NEAR ? 0 : outside;
  const others = strings.flatMap((string, other) => {
    const away = Math.abs(centsBetween(string.hertz, hertz));
    return other !== index && away < NEAR && away < own ? [{ other, away }] : [];
  });
  others.sort((a, b) => a.away - b.away);
  if (others[0]) return others[0].other;
  return own <= FARTHEST_PAST ? index : null;
}

/** Cents past either end at which it is still taken for the string that is tuned. */
const FARTHEST_PAST = 350;

/** The mean of what is neither among the highest nor among the lowest. */
function middle(values: readonly number[]): number {
  const kept = [...values].sort((a, b) => a - b).slice(LEFT_OUT, values.length - LEFT_OUT);
  return kept.reduce((sum, value) => sum + value, 0) / kept.length;
}

/** Where to listen: along the way of the string that is tuned, and near each other string. Hertz. */
export function rangesOf({ strings, index, target, capo }: TunerGoal): { low: number; high: number }[] {
  const cents = (hertz: number, by: number): number => hertz * 2 ** (by / 1200);
  return strings.map(({ hertz }, each) => {
    if (each !== index) return { low: cents(hertz, -NEAR), high: cents(hertz, NEAR) };
    const high = Math.max(hertz, target, cents(hertz, capo * 100));
    return { low: cents(Math.min(hertz, target), -FARTHEST_PAST), high: cents(high, FARTHEST_PAST) };
  });
}
