import { parseTonic } from '@pegwell/shared/music/pitch';
import { titleKey } from '@pegwell/shared/tunes/title-key';
import type { StoredTune } from '../tune-content';
import type { FileTune } from './file-tune';

/**
 * Which tune of the library each tune of a file is: the one with its id; else the one with its title, tonic and
 * mode, in the order of both where there are several; a mode that is not said fits any, major first. Each tune of
 * the library is taken once: by its id before all others, then by a full key, then without a mode. Rows with
 * problems take theirs too, so that a repeat behind them does not fall on the wrong tune.
 * @param library in the order of its own file
 */
export function matchTunes(
  file: readonly FileTune[],
  library: readonly StoredTune[],
): ReadonlyMap<FileTune, StoredTune | 'taken'> {
  const matches = new Map<FileTune, StoredTune | 'taken'>();
  const taken = new Set<StoredTune>();
  const take = (tune: FileTune, match: StoredTune | undefined) => {
    if (!match) return;
    taken.add(match);
    matches.set(tune, match);
  };

  const byId = new Map(library.map((tune) => [tune.id, tune]));
  for (const tune of file) {
    const known = tune.id === null ? undefined : byId.get(tune.id.toLowerCase());
    if (known && taken.has(known)) matches.set(tune, 'taken');
    else take(tune, known);
  }

  const byKey = new Queues(taken);
  const byTonic = new Queues(taken);
  for (const tune of library) {
    byKey.add(nameOf(tune.title, tune.key, tune.mode), tune);
    byTonic.add(nameOf(tune.title, tune.key), tune);
  }
  const named = file.filter((tune) => !matches.has(tune));
  for (const tune of named) {
    const { title, key, mode } = tune.words;
    if (title !== undefined && key !== undefined && mode !== undefined) {
      take(tune, byKey.next(nameOf(title, key, mode)));
    }
  }
  for (const tune of named) {
    const { title, key, mode } = tune.words;
    if (title === undefined || key === undefined || mode !== undefined) continue;
    take(tune, byKey.next(nameOf(title, key, 'major')) ?? byTonic.next(nameOf(title, key)));
  }
  return matches;
}

/** Tunes of one name in their order; what was taken is passed over, and looked at once. */
class Queues {
  private readonly queues = new Map<string, { readonly tunes: StoredTune[]; from: number }>();

  constructor(private readonly taken: ReadonlySet<StoredTune>) {}

  add(name: string, tune: StoredTune): void {
    const queue = this.queues.get(name);
    if (queue) queue.tunes.push(tune);
    else this.queues.set(name, { tunes: [tune], from: 0 });
  }

  next(name: string): StoredTune | undefined {
    const queue = this.queues.get(name);
    if (!queue) return undefined;
    for (; queue.from < queue.tunes.length; queue.from++) {
      const tune = queue.tunes[queue.from];
      if (tune && !this.taken.has(tune)) return tune;
    }
    return undefined;
  }
}

/** Tonics are equal when they sound alike. */
function nameOf(title: string, key: string, mode = ''): string {
  return `${titleKey(title)}\n${parseTonic(key)?.pitchClass ?? key}\n${mode}`;
}
