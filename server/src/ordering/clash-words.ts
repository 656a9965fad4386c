import type { ClashingRule } from './engine/ordering-problem';

/** How the evening that rules clash in speaks of its tunes and places. */
export interface ClashTold {
  /** A tune's title, or its label. */
  readonly nameOf: (id: string) => string;
  /** The position of a pinned tune, counted from 0. */
  readonly placeOf: (id: string) => number | undefined;
  /** How many places there are. */
  readonly places: number;
}

/**
 * Rules that cannot all hold, in a sentence: "Slack Tide is pinned to place 2 but must come after Stone Weir,
 * which is pinned to place 9." Rules that hang together in no simple way are listed.
 * @param clashes none of which can be left out
 */
export function clashSentence(clashes: readonly ClashingRule[], told: ClashTold): string {
  const rules = sorted(clashes);
  return `${simply(rules, told) ?? listed(clashes, told)}.`;
}

interface Sorted {
  readonly pins: readonly string[];
  readonly befores: readonly (readonly [string, string])[];
  readonly medleys: readonly (readonly string[])[];
}

function sorted(clashes: readonly ClashingRule[]): Sorted {
  const ids = (name: ClashingRule['rule']): (readonly string[])[] =>
    clashes.filter(({ rule }) => rule === name).map((rule) => rule.ids);
  return {
    pins: ids('pin').map(([id]) => id!),
    befores: ids('before').map(([first, second]) => [first!, second!] as const),
    medleys: ids('medley'),
  };
}

/** Null where the rules hang together in no way that has words of its own. */
function simply({ pins, befores, medleys }: Sorted, told: ClashTold): string | null {
  const [pin, other] = pins;
  const [medley] = medleys;
  if (medley === undefined) {
    if (befores.length > 0) return inARow(pins, befores, told) ?? aroundOne(pins, befores, told);
    if (pins.length === 1) return `${pinned(pin!, told)}, and there are only ${told.places}`;
    return pins.length === 2
      ? `${and([pin!, other!], told)} are both pinned to place ${place(pin!, told)}`
      : null;
  }
  if (medleys.length > 1) return null;
  const whole = and(medley, told);
  if (pins.length + befores.length === 0) return `${whole} are one medley, and no set is long enough for it`;
  if (pins.length === 1 && befores.length === 0) {
    return `${pinned(pin!, told)}, and there the medley of ${whole} does not fit into one set`;
  }
  const [before] = befores;
  if (befores.length > 1 || pins.length > 0 || !before!.every((id) => medley.includes(id))) return null;
  return `${told.nameOf(before![0])} must come before ${told.nameOf(before![1])}, but they are one medley in another order: ${whole}`;
}

/** Pairs that follow from one to the next, in a circle or with pins at their ends. */
function inARow(
  pins: readonly string[],
  befores: readonly (readonly [string, string])[],
  told: ClashTold,
): string | null {
  const after = new Map(befores);
  const seconds = new Set(befores.map(([, second]) => second));
  const firsts = befores.map(([first]) => first);
  const start = firsts.find((first) => !seconds.has(first)) ?? firsts[0]!;
  const row = [start];
  for (
    let next = after.get(start);
    next !== undefined && row.length <= befores.length;
    next = after.get(next)
  ) {
    row.push(next);
  }
  if (row.length !== befores.length + 1) return null;
  const end = row.at(-1)!;
  if (end === start) {
    if (pins.length > 0) return null;
    const [pair, ...rest] = befores.map((_, index) => row.slice(index, index + 2).map(told.nameOf));
    const more = rest.map(([first, second]) => `${first} before ${second}`);
    return sentenceList([`${pair![0]} must come before ${pair![1]}`, ...more]);
  }
  if (pins.some((id) => id !== start && id !== end)) return null;
  // Told from a pinned end; from the later one, which "must come after", where it is pinned.
  const back = pins.includes(end);
  const [from, ...through] = back ? [...row].reverse() : row;
  const must = `must come ${back ? 'after' : 'before'}`;
  const links = through.map((id) => `${must} ${told.nameOf(id)}`).join(', which ');
  const last = pins.length === 2 ? `, which is pinned to place ${place(through.at(-1)!, told)}` : '';
  return `${pinned(from!, told)} but ${links}${last}`;
}

/** A pinned tune that too many must come before, or after. */
function aroundOne(
  [pin, ...others]: readonly string[],
  befores: readonly (readonly [string, string])[],
  told: ClashTold,
): string | null {
  if (pin === undefined || others.length > 0) return null;
  for (const [side, word] of [
    [1, 'after'],
    [0, 'before'],
  ] as const) {
    if (!befores.every((pair) => pair[side] === pin)) continue;
    const names = befores.map((pair) => pair[1 - side]!);
    return `${pinned(pin, told)} but must come ${word} ${and(names, told)}`;
  }
  return null;
}

function listed(clashes: readonly ClashingRule[], told: ClashTold): string {
  const words = clashes.map(({ rule, ids }) => {
    if (rule === 'pin') return pinned(ids[0]!, told);
    if (rule === 'before') return `${told.nameOf(ids[0]!)} must come before ${told.nameOf(ids[1]!)}`;
    return `${and(ids, told)} are one medley`;
  });
  return `${sentenceList(words)}: these cannot all hold`;
}

const place = (id: string, { placeOf }: ClashTold): number => (placeOf(id) ?? 0) + 1;
const pinned = (id: string, told: ClashTold): string =>
  `${told.nameOf(id)} is pinned to place ${place(id, told)}`;

/** "A", "A and B", "A, B and C" */
function and(ids: readonly string[], { nameOf }: ClashTold): string {
  const names = ids.map(nameOf);
  return names.length > 1 ? `${names.slice(0, -1).join(', ')} and ${names.at(-1)}` : (names[0] ?? '');
}

const sentenceList = (parts: readonly string[]): string =>
  parts.length > 1 ? `${parts.slice(0, -1).join(', ')}, and ${parts.at(-1)}` : (parts[0] ?? '');
