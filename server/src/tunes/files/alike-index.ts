import { distance } from 'fastest-levenshtein';
import { looseTitle } from './loose-title';

/** Typing errors that two titles may differ by, by the letters of the shorter. */
export function mostErrors(letters: number): number {
  if (letters < 5) return 0;
  if (letters < 9) return 1;
  return letters < 15 ? 2 : 3;
}

/** Tunes that are shown for one title; more would not be read. */
const MOST_SHOWN = 3;
/** Titles that are compared for one: bounds the time that a made-up file can take. */
const MOST_COMPARED = 1_000;

interface Entry<Tune> {
  readonly letters: string;
  readonly tunes: Tune[];
}

/**
 * Titles that differ by no more than a few letters, among thousands, without comparing all with all: a title with
 * at most k errors, cut into k + 1 pieces, has one piece unharmed, at most k places from where it was. (G. Li,
 * D. Deng, J. Wang, J. Feng, "Pass-Join: A Partition-based Method for Similarity Joins", VLDB 2011.)
 */
export class AlikeIndex<Tune> {
  private readonly entries = new Map<string, Entry<Tune>>();
  /** By what tells titles apart, their length and which piece of them it is; then by its letters. */
  private readonly pieces = new Map<string, Map<string, Entry<Tune>[]>>();

  add(title: string, tune: Tune): void {
    const { letters, telling } = looseTitle(title);
    const name = `${telling}\n${letters}`;
    const known = this.entries.get(name);
    if (known) {
      if (known.tunes.length < MOST_SHOWN) known.tunes.push(tune);
      return;
    }
    const entry: Entry<Tune> = { letters, tunes: [tune] };
    this.entries.set(name, entry);
    cut(letters.length).forEach(([from, to], piece) => {
      const group = `${telling}\n${letters.length} ${piece}`;
      const list = this.pieces.get(group) ?? new Map<string, Entry<Tune>[]>();
      this.pieces.set(group, list);
      const unharmed = letters.slice(from, to);
      const entries = list.get(unharmed);
      if (entries) entries.push(entry);
      else list.set(unharmed, [entry]);
    });
  }

  /** Tunes with a title alike, the likest first. */
  find(title: string): Tune[] {
    const { letters, telling } = looseTitle(title);
    if (letters === '') return [];
    const compared = new Map<Entry<Tune>, number>();
    const most = mostErrors(letters.length);
    for (let length = letters.length - most; length <= letters.length + most; length++) {
      const errors = Math.min(most, mostErrors(length));
      if (Math.abs(length - letters.length) > errors) continue;
      cut(length).forEach(([from, to], piece) => {
        const group = this.pieces.get(`${telling}\n${length} ${piece}`);
        if (!group) return;
        const first = Math.max(0, from - errors);
        const last = Math.min(letters.length - (to - from), from + errors);
        for (let start = first; start <= last; start++) {
          for (const entry of group.get(letters.slice(start, start + to - from)) ?? []) {
            if (compared.has(entry) || compared.size >= MOST_COMPARED) continue;
            compared.set(entry, distance(letters, entry.letters));
          }
        }
      });
    }
    return [...compared]
      .filter(([entry, errors]) => errors <= Math.min(most, mostErrors(entry.letters.length)))
      .sort(([, one], [, other]) => one - other)
      .flatMap(([entry]) => entry.tunes)
      .slice(0, MOST_SHOWN);
  }
}

type Cut = readonly (readonly [from: number, to: number])[];
const CUTS: Cut[] = [];

/** Where a title of so many letters is cut: one piece more than it may have errors, as even as can be. */
function cut(length: number): Cut {
  const count = mostErrors(length) + 1;
  return (CUTS[length] ??= Array.from({ length: count }, (_, piece) => [
    Math.floor((length * piece) / count),
    Math.floor((length * (piece + 1)) / count),
  ]));
}
