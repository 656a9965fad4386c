import type { ImportChoice } from '@pegwell/shared/contract/import-choices';
import type { Accepted } from '@pegwell/shared/tunes/kind-tunings';
import { sameContent, type StoredTune, type TuneContent } from '../tune-content';
import { AlikeIndex } from './alike-index';
import type { FileTune, LineProblem } from './file-tune';
import type { FoundTunings } from './found-tunings';
import { matchTunes } from './match-tunes';
import { mergeTune } from './merge-tune';

/** A tune that a new one is likely the same as: of the library, or new in an earlier line. */
export interface Alike extends TuneContent {
  readonly id?: string;
  readonly line?: number;
}

interface Planned {
  readonly line: number;
  readonly title: string;
  /** Tunings to propose. */
  readonly found: readonly FoundTunings[];
}

/** What an import will do with one tune of the file. */
export type PlannedTune = Planned &
  (
    | { readonly action: 'create'; readonly content: TuneContent; readonly alike: readonly Alike[] }
    | { readonly action: 'update'; readonly before: StoredTune; readonly after: StoredTune }
    | { readonly action: 'unchanged'; readonly before: StoredTune }
    /** What it says was added to another tune of the file. */
    | { readonly action: 'merge'; readonly into: number }
    | { readonly action: 'skip' }
  );

export interface ImportPlan {
  readonly tunes: readonly PlannedTune[];
  readonly problems: readonly (LineProblem & { readonly tune: string | null })[];
}

const NO_TITLE = 'A title is missing.';
const NO_KEY = 'No key is given, so the tune is left out: a key is a letter A to G, as in K:A or K:Em.';

/**
 * Finds each tune of a file in the library and says what becomes of it. What the file does not say stays as it is;
 * what its words only speak of, and what is likely a duplicate, is for the host to choose. One bad tune keeps
 * nobody else out.
 * @param library in the order of its own file
 */
export function planImport(
  file: readonly FileTune[],
  library: readonly StoredTune[],
  choices: readonly ImportChoice[] = [],
): ImportPlan {
  const problems: (LineProblem & { readonly tune: string | null })[] = [];
  const chosen = new Map(choices.map((choice) => [choice.line, choice]));
  const matches = matchTunes(file, library);
  const alike = new AlikeIndex<Alike>();
  for (const tune of library) alike.add(tune.title, tune);

  const tunes = file.map((raw): PlannedTune => {
    const match = matches.get(raw);
    const known = match === undefined || match === 'taken' ? undefined : match;
    const choice = chosen.get(raw.line);
    const tune = withFound(raw, known?.stated ?? {}, choice?.found ?? []);
    const { line } = tune;
    const title = tune.words.title ?? tune.title ?? known?.title ?? '';
    const problem: LineProblem[] = [...tune.problems];
    if (match === 'taken')
      problem.push({ line, message: 'Another row of this file has the same id already.' });
    if (!known && problem.length === 0) {
      if (tune.words.title === undefined) problem.push({ line, message: NO_TITLE });
      if (tune.words.key === undefined) problem.push({ line: tune.keyLine, message: NO_KEY });
    }
    if (problem.length > 0) {
      problems.push(...problem.map((one) => ({ ...one, tune: title === '' ? null : title })));
      return { line, title, found: [], action: 'skip' };
    }
    const { found } = tune;
    if (known) {
      const after = { ...known, ...tune.words, stated: { ...known.stated, ...tune.stated } };
      const same = sameContent(known, after);
      return same
        ? { line, title, found, action: 'unchanged', before: known }
        : { line, title, found, action: 'update', before: known, after };
    }
    const content = newContent(tune);
    const others = alike.find(content.title);
    if (choice?.alike === 'skip' && others.length > 0) return { line, title, found: [], action: 'skip' };
    alike.add(content.title, { ...content, line });
    return { line, title, found, action: 'create', content, alike: others };
  });
  mergeChosen(file, tunes, library, chosen);
  return { tunes, problems };
}

/** Takes the found tunings that the host takes; the others stay proposals where nothing is stated. */
function withFound(tune: FileTune, known: Accepted, taken: readonly string[]): FileTune {
  const found = tune.found.filter(({ kind }) => !Object.hasOwn(known, kind));
  const chosen = found.filter(({ kind }) => taken.includes(kind));
  const leavesTitle = chosen.length > 0 && tune.plainTitle !== null;
  return {
    ...tune,
    found: found.filter((one) => !chosen.includes(one)),
    words: leavesTitle ? { ...tune.words, title: tune.plainTitle } : tune.words,
    stated: { ...tune.stated, ...Object.fromEntries(chosen.map(({ kind, accepted }) => [kind, accepted])) },
  };
}

function newContent({ words, stated }: FileTune): TuneContent {
  const { title = '', key = '', mode = 'major', rhythm = null, parts = null } = words;
  const { composer = null, source = null, notes = null } = words;
  return { title, key, mode, rhythm, parts, composer, source, notes, stated };
}

/** Puts new tunes into those that they are alike, where the host says so. */
function mergeChosen(
  file: readonly FileTune[],
  tunes: PlannedTune[],
  library: readonly StoredTune[],
  chosen: ReadonlyMap<number, ImportChoice>,
): void {
  const byId = new Map(library.map((tune) => [tune.id, tune]));
  // Where the last word on a tune of the library stands, and where a line does.
  const holders = new Map<string, number>();
  const byLine = new Map<number, number>();
  tunes.forEach((tune, at) => {
    byLine.set(tune.line, at);
    if (tune.action === 'update' || tune.action === 'unchanged') holders.set(tune.before.id, at);
  });
  tunes.forEach((tune, at) => {
    const choice = chosen.get(tune.line);
    const said = file[at];
    if (tune.action !== 'create' || choice?.alike !== 'merge' || !said) return;
    const other = tune.alike.find(
      ({ id, line }) => choice.with === undefined || choice.with === (id ?? line),
    );
    if (!other) return;
    const { line, title } = tune;
    const known = other.id === undefined ? undefined : byId.get(other.id);
    const into = known ? holders.get(known.id) : byLine.get(other.line ?? 0);
    const words = withFound(said, {}, choice.found);
    if (into !== undefined) {
      const holder = lastOf(tunes, into);
      tunes[holder] = mergedInto(tunes[holder], words);
      tunes[at] = { line, title, found: [], action: 'merge', into: holder };
    } else if (known) {
      holders.set(known.id, at);
      tunes[at] = mergedInto({ line, title, found: [], action: 'unchanged', before: known }, words);
    }
  });
}

/** A tune that was merged itself leads on to where it went. */
function lastOf(tunes: readonly PlannedTune[], at: number): number {
  const tune = tunes[at];
  return tune?.action === 'merge' ? lastOf(tunes, tune.into) : at;
}

function mergedInto(holder: PlannedTune | undefined, words: FileTune): PlannedTune {
  if (holder?.action === 'create') return { ...holder, content: mergeTune(holder.content, words) };
  if (holder?.action !== 'update' && holder?.action !== 'unchanged') {
    throw new Error('Tunes are merged into tunes that stay.');
  }
  const { line, title, found, before } = holder;
  const after = mergeTune(holder.action === 'update' ? holder.after : before, words);
  return sameContent(before, after)
    ? { line, title, found, action: 'unchanged', before }
    : { line, title, found, action: 'update', before, after };
}
