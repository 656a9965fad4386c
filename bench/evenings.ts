import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning, type Tuned } from '@pegwell/shared/music/tuning';
import type { EveningTune, Goal } from '@pegwell/shared/session/evening';
import type { OrderingProblem } from '../server/src/ordering/engine/ordering-problem';
import { Random } from './random';

/** How a key is usually played: per kind its tunings, the usual first. Common practice; dulcimer from memory. */
const KEYS: readonly { readonly tonic: number; readonly weight: number; readonly usual: Usual }[] = [
  {
    tonic: 9,
    weight: 6,
    usual: {
      fiddle: ['AEAE', 'GDAE', 'AEAC#', 'AEAD'],
      banjo: ['gDGBD capo 2', 'gDGCD capo 2'],
      guitar: ['EADGBE'],
      mandolin: ['GDAE', 'AEAE'],
      dulcimer: ['D3 A3 C4', 'D3 A3 D4'],
      bouzouki: ['GDAD', 'G2 D3 A3 E4'],
    },
  },
  {
    tonic: 2,
    weight: 6,
    usual: {
      fiddle: ['ADAE', 'GDAE', 'DDAD', 'GDAD'],
      banjo: ['gCGCD capo 2', 'aDF#AD'],
      guitar: ['DADGBE', 'EADGBE'],
      mandolin: ['GDAE'],
      dulcimer: ['D3 A3 D4', 'D3 A3 A3'],
      bouzouki: ['GDAD'],
    },
  },
  {
    tonic: 7,
    weight: 5,
    usual: {
      fiddle: ['GDAE', 'GDGD', 'GDGB'],
      banjo: ['gDGBD', 'gDGCD'],
      guitar: ['EADGBE'],
      mandolin: ['GDAE', 'GDGD'],
      dulcimer: ['D3 G3 D4', 'D3 A3 D4'],
      bouzouki: ['GDAD', 'G2 D3 G3 D4'],
    },
  },
  {
    tonic: 0,
    weight: 3,
    usual: {
      fiddle: ['GDAE', 'FCGD'],
      banjo: ['gCGCD', 'gCGBD'],
      guitar: ['EADGBE', 'CGDGBE'],
      mandolin: ['GDAE'],
      dulcimer: ['C3 G3 C4'],
      bouzouki: ['GDAD', 'C3 G3 C4 G4'],
    },
  },
  {
    tonic: 4,
    weight: 1,
    usual: {
      fiddle: ['EDAE', 'EEAE', 'GDAE'],
      banjo: ['gDGBD', 'gCGBD'],
      guitar: ['EADGBE', 'DADGAD'],
      mandolin: ['GDAE'],
      dulcimer: ['D3 A3 D4'],
      bouzouki: ['GDAD'],
    },
  },
];
type Usual = Readonly<Record<string, readonly string[]>>;
export const BENCH_KINDS = ['fiddle', 'banjo', 'guitar', 'dulcimer', 'mandolin', 'bouzouki'] as const;

/** A key with one tuning per kind: what a tune is usually played in. */
interface Group {
  readonly tonic: number;
  readonly tunings: Readonly<Record<string, string>>;
}

export interface EveningShape {
  readonly seed: number;
  readonly tunes: number;
  readonly sets: number;
  /** How many of BENCH_KINDS are in the room. */
  readonly kinds: number;
  /**
   * `groups`: at most so many different keys with tunings. `tunings`: so many different tunings of all kinds
   * together, each of them some tune's.
   */
  readonly groups?: number;
  readonly tunings?: number;
  /** Keys and tunings each drawn alike and on their own, instead of as they go together. */
  readonly uniform?: boolean;
  readonly pins?: number;
  readonly medleys?: number;
  readonly befores?: number;
  /** Share of tunes that accept a second tuning of some kind, and of tunes that do not state some kind. */
  readonly alternatives?: number;
  readonly unstated?: number;
  readonly goal?: Goal;
}

/** An evening as at real sessions: a few keys come often, and tunings go with keys. */
export function benchEvening(shape: EveningShape): OrderingProblem {
  const random = new Random(shape.seed);
  const kinds = BENCH_KINDS.slice(0, shape.kinds);
  const groups = shape.uniform ? [] : drawGroups(random, kinds, shape);
  const ids = Array.from({ length: shape.tunes }, (_, index) => `tune-${index + 1}`);
  const sure = shape.tunings === undefined ? [] : oneOfEach(random, ids, groups);
  const tunes = ids.map((id, index): EveningTune => {
    const group =
      sure[index] ?? (shape.uniform ? uniformGroup(random, kinds) : groups[random.skewed(groups.length)]!);
    const accepted: Record<string, readonly Tuned[] | 'any'> = {};
    for (const kind of kinds) accepted[kind] = [tuned(kind, group.tunings[kind]!)];
    if (random.next() < (shape.alternatives ?? 0)) {
      const kind = random.pick(kinds.slice(0, 3));
      const also = random.pick(everyTuning(kind, groups));
      accepted[kind] = [tuned(kind, group.tunings[kind]!), tuned(kind, also)];
    }
    if (random.next() < (shape.unstated ?? 0)) accepted[random.pick(kinds)] = 'any';
    const rhythm = random.next() < 0.12 ? random.pick(['waltz', 'air']) : 'reel';
    return { id, tonic: group.tonic, rhythm, accepted };
  });
  return {
    chairs: kinds.map((kind) => ({
      kind: builtInKind(kind)!,
      count: 1 + random.below(kind === 'fiddle' ? 6 : 2),
    })),
    openings: Object.fromEntries(kinds.map((kind) => [kind, tuned(kind, everyTuning(kind, [])[0]!)])),
    goal: shape.goal ?? 'pegs',
    spacedRhythms: ['waltz', 'air'],
    tunes,
    sets: inSets(ids, shape.sets),
    ...drawRules(random, ids, shape),
  };
}

function drawGroups(random: Random, kinds: readonly string[], shape: EveningShape): Group[] {
  const drawn = new Map<string, Group>();
  const tunings = new Set<string>();
  const most = shape.groups ?? 3 * (shape.tunings ?? 4);
  for (let tries = 0; tries < 400 && drawn.size < most; tries++) {
    const { tonic, usual } = KEYS[weighted(random)]!;
    const chosen = Object.fromEntries(
      kinds.map((kind) => [kind, usual[kind]![random.skewed(usual[kind]!.length)]!]),
    );
    const together = withoutCapos(chosen);
    if (shape.tunings !== undefined && tunings.size === shape.tunings && !tunings.has(together)) continue;
    tunings.add(together);
    const group = { tonic, tunings: chosen };
    drawn.set(JSON.stringify(group), group);
  }
  return random.shuffled([...drawn.values()]);
}

/** The same tuning with another capo is no other tuning. */
const withoutCapos = (tunings: Group['tunings']): string =>
  Object.values(tunings)
    .map((tuning) => tuning.replace(/ capo \d+/, ''))
    .join('; ');

/** By position, somewhere: a group for each tuning of all kinds together. */
function oneOfEach(random: Random, ids: readonly string[], groups: readonly Group[]): Group[] {
  const each = new Map(groups.map((group) => [withoutCapos(group.tunings), group]));
  const places = random.shuffled([...ids.keys()]);
  const sure: Group[] = [];
  for (const group of each.values()) sure[places.pop()!] = group;
  return sure;
}

function uniformGroup(random: Random, kinds: readonly string[]): Group {
  return {
    tonic: random.pick([0, 2, 4, 5, 7, 9, 10]),
    tunings: Object.fromEntries(kinds.map((kind) => [kind, random.pick(everyTuning(kind, []))])),
  };
}

function weighted(random: Random): number {
  let left = random.below(KEYS.reduce((sum, { weight }) => sum + weight, 0));
  return KEYS.findIndex(({ weight }) => (left -= weight) < 0);
}

/** All tunings of a kind: those of the groups, or, without groups, those of all keys; standard first. */
function everyTuning(kind: string, groups: readonly Group[]): string[] {
  const all =
    groups.length > 0
      ? groups.map(({ tunings }) => tunings[kind]!)
      : KEYS.flatMap(({ usual }) => usual[kind]!);
  const standard = KEYS[2]!.usual[kind]![0]!;
  return [...new Set(groups.length > 0 ? all : [standard, ...all])];
}

function inSets(ids: readonly string[], sets: number): string[][] {
  const size = Math.ceil(ids.length / sets);
  return Array.from({ length: sets }, (_, set) => ids.slice(set * size, (set + 1) * size));
}

function drawRules(
  random: Random,
  ids: readonly string[],
  shape: EveningShape,
): Pick<OrderingProblem, 'pins' | 'medleys' | 'befores'> {
  const shuffled = random.shuffled(ids);
  const take = (): string => shuffled.pop()!;
  // Pins stay where the tune stands; medleys are of two or three; pairs follow the list: all can hold.
  const pins = Object.fromEntries(
    Array.from({ length: shape.pins ?? 0 }, take).map((id) => [id, ids.indexOf(id)]),
  );
  const medleys = Array.from({ length: shape.medleys ?? 0 }, () =>
    Array.from({ length: 2 + random.below(2) }, take),
  );
  const befores = Array.from({ length: shape.befores ?? 0 }, () => {
    const pair = [take(), take()].sort((a, b) => ids.indexOf(a) - ids.indexOf(b));
    return [pair[0]!, pair[1]!] as [string, string];
  });
  return { pins, medleys, befores };
}

const read = new Map<string, Tuned>();

function tuned(kind: string, text: string): Tuned {
  const key = `${kind} ${text}`;
  let known = read.get(key);
  if (known === undefined) {
    const parsed = parseTuning(builtInKind(kind)!, text);
    if (!parsed.ok) throw new Error(parsed.reason);
    known = parsed.value;
    read.set(key, known);
  }
  return known;
}
