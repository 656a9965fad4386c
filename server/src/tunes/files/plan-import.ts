import type { ImportAction } from '@pegwell/shared/contract/tunes';
import { parseTonic } from '@pegwell/shared/music/pitch';
import { titleKey } from '@pegwell/shared/tunes/title-key';
import { sameContent, type StoredTune, type TuneContent } from '../tune-content';
import type { FileTune, LineProblem } from './file-tune';

/** What an import will do with one tune of the file. */
export type PlannedTune = { readonly line: number; readonly title: string } & (
  | { readonly action: 'create'; readonly content: TuneContent }
  | { readonly action: 'update'; readonly before: StoredTune; readonly after: StoredTune }
  | { readonly action: 'unchanged'; readonly before: StoredTune }
  | { readonly action: 'skip' }
) & { readonly action: ImportAction };

export interface ImportPlan {
  readonly tunes: readonly PlannedTune[];
  readonly problems: readonly (LineProblem & { readonly tune: string | null })[];
}

const NO_TITLE = 'A title is missing.';
const NO_KEY = 'No key is given, so the tune is left out: a key is a letter A to G, as in K:A or K:Em.';

/**
 * Finds each tune of a file in the library and says what becomes of it. A tune is the one with its id; else the
 * one with its title, tonic and mode, in the order of both where there are several; a mode that is not said fits
 * any, major first. What the file does not say stays as it is. One bad tune keeps nobody else out.
 * @param library in the order of its own file
 */
export function planImport(file: readonly FileTune[], library: readonly StoredTune[]): ImportPlan {
  const problems: (LineProblem & { readonly tune: string | null })[] = [];
  const matches = matchTunes(file, library);
  const tunes = file.map((tune): PlannedTune => {
    const match = matches.get(tune);
    const known = match === undefined || match === 'taken' ? undefined : match;
    const { line } = tune;
    const title = tune.words.title ?? tune.title ?? known?.title ?? '';
    const found: LineProblem[] = [...tune.problems];
    if (match === 'taken') found.push({ line, message: 'Another row of this file has the same id already.' });
    if (!known && found.length === 0) {
      if (tune.words.title === undefined) found.push({ line, message: NO_TITLE });
      if (tune.words.key === undefined) found.push({ line: tune.keyLine, message: NO_KEY });
    }
    if (found.length > 0) {
      problems.push(...found.map((problem) => ({ ...problem, tune: title === '' ? null : title })));
      return { line, title, action: 'skip' };
    }
    if (!known) return { line, title, action: 'create', content: newContent(tune) };
    const after = { ...known, ...tune.words, stated: { ...known.stated, ...tune.stated } };
    if (sameContent(known, after)) return { line, title, action: 'unchanged', before: known };
    return { line, title, action: 'update', before: known, after };
  });
  return { tunes, problems };
}

function newContent({ words, stated }: FileTune): TuneContent {
  const { title = '', key = '', mode = 'major', rhythm = null, parts = null } = words;
  const { composer = null, source = null, notes = null } = words;
  return { title, key, mode, rhythm, parts, composer, source, notes, stated };
}

/**
 * Each tune of the library is taken once: by its id before all others, then by a full key, then without a mode.
 * Rows with problems take theirs too, so that a repeat behind them does not fall on the wrong tune.
 */
function matchTunes(
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
