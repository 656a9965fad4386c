import type { ClashingRule } from './ordering-problem';

/** The host's rules by index of the entry in the host's order. */
export interface Rules {
  readonly count: number;
  /** Sizes of the sets that are not empty, in order. */
  readonly setSizes: readonly number[];
  readonly pins: readonly (readonly [entry: number, position: number])[];
  readonly medleys: readonly (readonly number[])[];
  readonly befores: readonly (readonly [number, number])[];
}

/** What is placed as one: a single entry, or the entries of a medley in their order. */
export interface Unit {
  readonly entries: readonly number[];
  /** Where it must start, because it is or holds a pinned entry; else null. */
  readonly fixedAt: number | null;
  /** Units that must be placed earlier. */
  readonly after: readonly number[];
  /** No rule but, perhaps, its set: it may change places with its like. */
  readonly plain: boolean;
}

export interface Plan {
  readonly units: readonly Unit[];
  /** By entry. */
  readonly unitOf: readonly number[];
  /** By position: the unit that is fixed there, at its first position or further on; -1 for none. */
  readonly fixedUnitAt: Int32Array;
  /** By position: whether a set begins there. */
  readonly setStart: readonly boolean[];
  /** By position: the position after the last of its set. */
  readonly setEnd: Int32Array;
}

/**
 * Puts medleys together and pins in their places.
 * @returns null where the rules contradict each other on the face of it. That they do not is no promise that
 *   an order exists: see feasible.ts.
 */
export function planOf(rules: Rules): Plan | null {
  const { count } = rules;
  const chains = chained(rules);
  if (chains === null) return null;
  const unitOf = new Array<number>(count).fill(-1);
  chains.forEach((entries, unit) => entries.forEach((entry) => (unitOf[entry] = unit)));

  const setStart: boolean[] = [];
  const setEnd = new Int32Array(count);
  for (const size of rules.setSizes) {
    const start = setStart.length;
    for (let index = 0; index < size; index++) {
      setEnd[setStart.length] = start + size;
      setStart.push(index === 0);
    }
  }

  const fixedAt = chains.map((): number | null => null);
  for (const [entry, position] of rules.pins) {
    const unit = unitOf[entry]!;
    const start = position - chains[unit]!.indexOf(entry);
    if (fixedAt[unit] !== null && fixedAt[unit] !== start) return null;
    fixedAt[unit] = start;
  }
  const fixedUnitAt = new Int32Array(count).fill(-1);
  for (const [unit, start] of fixedAt.entries()) {
    if (start === null) continue;
    const length = chains[unit]!.length;
    if (start < 0 || start + length > count || start + length > setEnd[start]!) return null;
    for (let position = start; position < start + length; position++) {
      if (fixedUnitAt[position] !== -1) return null;
      fixedUnitAt[position] = unit;
    }
  }

  const after = chains.map((): number[] => []);
  const ruled = chains.map((entries, unit) => entries.length > 1 || fixedAt[unit] !== null);
  for (const [first, second] of rules.befores) {
    const [a, b] = [unitOf[first]!, unitOf[second]!];
    if (a === b) {
      if (chains[a]!.indexOf(first) >= chains[a]!.indexOf(second)) return null;
      continue;
    }
    if (!after[b]!.includes(a)) after[b]!.push(a);
    ruled[a] = ruled[b] = true;
  }
  const units = chains.map((entries, unit): Unit => ({
    entries,
    fixedAt: fixedAt[unit]!,
    after: after[unit]!,
    plain: !ruled[unit],
  }));
  return { units, unitOf, fixedUnitAt, setStart, setEnd };
}

/** Whether a unit can stand at a position as far as sets and fixed units are concerned. */
export function fitsAt({ fixedUnitAt, setEnd }: Plan, unit: Unit, position: number): boolean {
  if (unit.fixedAt !== null) return unit.fixedAt === position;
  const end = position + unit.entries.length;
  if (position >= setEnd.length || end > setEnd[position]!) return false;
  for (let at = position; at < end; at++) if (fixedUnitAt[at] !== -1) return false;
  return true;
}

/** Entries in runs, in order of their first entry; null where an entry would have two neighbours on a side. */
function chained({ count, medleys }: Rules): number[][] | null {
  const next = new Array<number>(count).fill(-1);
  const previous = new Array<number>(count).fill(-1);
  for (const medley of medleys) {
    for (let index = 0; index + 1 < medley.length; index++) {
      const [a, b] = [medley[index]!, medley[index + 1]!];
      if (a === b || (next[a] !== -1 && next[a] !== b) || (previous[b] !== -1 && previous[b] !== a))
        return null;
      next[a] = b;
      previous[b] = a;
    }
  }
  const chains: number[][] = [];
  let placed = 0;
  for (let start = 0; start < count; start++) {
    if (previous[start] !== -1) continue;
    const chain: number[] = [];
    for (let entry = start; entry !== -1; entry = next[entry]!) chain.push(entry);
    placed += chain.length;
    chains.push(chain);
  }
  return placed === count ? chains : null;
}

/** A rule of the host's, as it is told and as it is used. */
export interface HostRule {
  readonly told: ClashingRule;
  readonly use:
    | { pin: readonly [number, number] }
    | { medley: readonly number[] }
    | { before: readonly [number, number] };
}
