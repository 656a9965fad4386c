import type { ImportReport } from '@pegwell/shared/contract/tunes';
import { builtInKind } from '@pegwell/shared/music/instrument';
import type { Accepted } from '@pegwell/shared/tunes/kind-tunings';
import type { TuneContent } from '../tune-content';
import type { ImportPlan, PlannedTune } from './plan-import';
import type { ReadFile } from './read-file';
import { showCell } from './show-cell';

type ReportedTune = ImportReport['tunes'][number];

/**
 * What an import will do, or did, line by line.
 * @param made where it was done: the ids of the new tunes, by their place in the plan
 */
export function reportOf(
  file: ReadFile,
  plan: ImportPlan,
  made: { readonly importId: string; readonly ids: ReadonlyMap<number, string> } | null = null,
): ImportReport {
  const cells: Cells = new Map();
  const tunes = plan.tunes.map((tune, at): ReportedTune => {
    const { line, title, action } = tune;
    const id = idOf(plan, at, made?.ids);
    return {
      ...{ line, title, action: action === 'merge' ? 'update' : action },
      ...(id !== undefined && { id }),
      ...detailsOf(cells, tune),
    };
  });
  const count = (action: string) => tunes.filter((tune) => tune.action === action).length;
  const problems = [...file.problems.map((problem) => ({ ...problem, tune: null })), ...plan.problems];
  return {
    ...{ format: file.format, encoding: file.encoding },
    ...(made && { importId: made.importId }),
    read: tunes.length,
    created: count('create'),
    updated: count('update'),
    unchanged: count('unchanged'),
    skipped: count('skip'),
    problems: problems.sort((one, other) => one.line - other.line),
    tunes,
  };
}

function idOf(plan: ImportPlan, at: number, ids?: ReadonlyMap<number, string>): string | undefined {
  const tune = plan.tunes[at];
  if (!tune || tune.action === 'skip') return undefined;
  if (tune.action === 'merge') return idOf(plan, tune.into, ids);
  return tune.action === 'create' ? ids?.get(at) : tune.before.id;
}

/** What a host needs to see to choose; a tune that leaves no choice says no more than what becomes of it. */
function detailsOf(cells: Cells, tune: PlannedTune): Partial<ReportedTune> {
  const found = tune.found.map(({ kind, accepted, said }) => ({
    kind,
    tuning: cellOf(cells, kind, accepted),
    said,
  }));
  const isChoice = tune.action === 'create' && tune.alike.length > 0;
  return {
    ...(found.length > 0 && { found }),
    ...(isChoice && {
      ...beside(cells, tune.content),
      alike: tune.alike.map(({ id, line, title, ...content }) => ({
        ...(id !== undefined ? { id } : line !== undefined && { line }),
        ...{ title, ...beside(cells, content) },
      })),
    }),
  };
}

function beside(cells: Cells, { key, mode, rhythm, stated }: Omit<TuneContent, 'title'>) {
  const tunings = Object.entries(stated).map(([kind, accepted]) => ({
    kind,
    tuning: cellOf(cells, kind, accepted),
  }));
  return { key, mode, rhythm, tunings };
}

/** Of thousands of tunes few differ in their tunings, and showing one means reading it back. */
type Cells = Map<string, string>;

function cellOf(cells: Cells, kind: string, accepted: Accepted[string]): string {
  const key = JSON.stringify([kind, accepted]);
  const shown = cells.get(key);
  if (shown !== undefined) return shown;
  const known = builtInKind(kind);
  const cell = known ? showCell(known, accepted) : '';
  cells.set(key, cell);
  return cell;
}
