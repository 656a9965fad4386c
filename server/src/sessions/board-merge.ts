import { randomUUID } from 'node:crypto';
import type { FieldError } from '@pegwell/shared/contract/errors';
import type { BoardEntry, PutBoard } from '@pegwell/shared/contract/sessions';
import { MAX_ENTRIES } from '@pegwell/shared/contract/sessions';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { readKindTunings } from '@pegwell/shared/tunes/kind-tunings';
import type { StoredBoard, StoredEntry } from './sessions.table';

/** What is known of the ids that a board names. */
export interface KnownIds {
  readonly sessionId: string;
  readonly entries: ReadonlyMap<string, StoredEntry & { readonly sessionId: string }>;
  readonly sets: ReadonlyMap<string, { readonly sessionId: string; readonly title: string }>;
  /** By tune id: its settings' ids, and whether it was removed from the library. Only the circle's own. */
  readonly tunes: ReadonlyMap<
    string,
    { readonly settingIds: ReadonlySet<string>; readonly removed: boolean }
  >;
}

const ORDINALS = ['First', 'Second', 'Third', 'Fourth', 'Fifth', 'Sixth', 'Seventh', 'Eighth'];

export function defaultSetTitle(index: number): string {
  const ordinal = ORDINALS[index];
  return ordinal ? `${ordinal} set` : `Set ${index + 1}`;
}

/**
 * The board as it will be stored: ids that are missing are made, fields that are omitted keep the value
 * that their id had, and everything that cannot be is told with its place.
 */
export function mergeBoard(
  body: PutBoard,
  stored: StoredBoard,
  known: KnownIds,
): { readonly board: StoredBoard; readonly errors: readonly FieldError[] } {
  const errors: FieldError[] = [];
  const seen = new Set<string>();
  const tell = (path: string, message: string) => void errors.push({ path, message });

  const sets = body.sets.map((set, index) => {
    const before = set.id === undefined ? undefined : known.sets.get(set.id);
    if (set.id !== undefined) {
      if (seen.has(set.id)) tell(`sets.${index}.id`, 'This set stands twice on the board.');
      if (before && before.sessionId !== known.sessionId)
        tell(`sets.${index}.id`, 'This set is of another evening.');
      seen.add(set.id);
    }
    return {
      id: set.id ?? randomUUID(),
      title: set.title || before?.title || defaultSetTitle(index),
      entries: set.entries.map((entry, place) => mergeEntry(entry, `sets.${index}.entries.${place}`)),
    };
  });

  function mergeEntry(entry: BoardEntry, path: string): StoredEntry {
    const id = entry.id ?? randomUUID();
    const before = known.entries.get(id);
    if (seen.has(id)) tell(`${path}.id`, 'This entry stands twice on the board.');
    if (before && before.sessionId !== known.sessionId)
      tell(`${path}.id`, 'This entry is of another evening.');
    seen.add(id);
    // A tune given anew replaces an open place, and the other way round.
    const open = entry.open ?? (entry.open === undefined && !entry.tuneId ? (before?.open ?? null) : null);
    const tuneId =
      entry.tuneId ?? (entry.tuneId === undefined && !entry.open ? (before?.tuneId ?? null) : null);
    if (entry.tuneId && entry.open) tell(path, 'An entry is a tune or an open place, not both.');
    else if (!open && !tuneId) tell(`${path}.tuneId`, 'Which tune? An entry is a tune or an open place.');
    const keeps = before !== undefined && before.tuneId === tuneId;
    const settingId = entry.settingId !== undefined ? entry.settingId : keeps ? before.settingId : null;
    if (tuneId) checkTune(tuneId, settingId, keeps, path);
    else if (settingId) tell(`${path}.settingId`, 'An open place has no setting.');
    if (entry.open) errors.push(...readKindTunings(entry.open.tunings, `${path}.open.tunings`).errors);
    for (const [index, kind] of (entry.sitOut ?? []).entries()) {
      if (!builtInKind(kind)) tell(`${path}.sitOut.${index}`, `${kind} is no instrument that Pegwell knows.`);
    }
    return {
      id,
      tuneId,
      settingId: tuneId ? settingId : null,
      open,
      pinned: entry.pinned ?? before?.pinned ?? false,
      sitOut: [...new Set(entry.sitOut ?? before?.sitOut ?? [])],
    };
  }

  function checkTune(tuneId: string, settingId: string | null, keeps: boolean, path: string): void {
    const tune = known.tunes.get(tuneId);
    // A tune that was removed stays on the evenings it is on; it is not put on new ones.
    if (!tune || (tune.removed && !keeps))
      tell(`${path}.tuneId`, 'This tune is not in the circle’s library.');
    else if (settingId && !tune.settingIds.has(settingId)) {
      tell(`${path}.settingId`, 'This is not a setting of the tune.');
    }
  }

  const onBoard = new Set(sets.flatMap((set) => set.entries.map((entry) => entry.id)));
  if (onBoard.size > MAX_ENTRIES) tell('sets', `An evening has at most ${MAX_ENTRIES} entries.`);
  const rules = mergeRules(body, stored, onBoard, tell);
  return { board: { sets, ...rules }, errors };
}

/** Given rules name entries of the board; rules that are kept lose the entries that are gone. */
function mergeRules(
  body: PutBoard,
  stored: StoredBoard,
  onBoard: ReadonlySet<string>,
  tell: (path: string, message: string) => void,
): Pick<StoredBoard, 'medleys' | 'befores'> {
  const check = (list: readonly (readonly string[])[] | undefined, name: string) => {
    list?.forEach((ids, index) => {
      ids.forEach((id, place) => {
        if (!onBoard.has(id)) tell(`${name}.${index}.${place}`, 'This entry is not on the board.');
        else if (ids.indexOf(id) !== place) tell(`${name}.${index}.${place}`, 'This entry is named twice.');
      });
    });
  };
  check(body.medleys, 'medleys');
  check(body.befores, 'befores');
  const medleys = body.medleys ?? stored.medleys.map((ids) => ids.filter((id) => onBoard.has(id)));
  const befores = body.befores ?? stored.befores.filter((pair) => pair.every((id) => onBoard.has(id)));
  return { medleys: medleys.filter((ids) => ids.length > 1), befores };
}

/** Whether two boards are the same to a person: order, rules and every field. */
export function sameBoard(a: StoredBoard, b: StoredBoard): boolean {
  return JSON.stringify(canonical(a)) === JSON.stringify(canonical(b));
}

function canonical({ sets, medleys, befores }: StoredBoard) {
  return [
    sets.map(({ id, title, entries }) => [
      id,
      title,
      entries.map((entry) => [
        entry.id,
        entry.tuneId,
        entry.settingId,
        entry.open && sorted(entry.open),
        entry.pinned,
        [...entry.sitOut].sort(),
      ]),
    ]),
    medleys,
    befores,
  ];
}

/** PostgreSQL's jsonb keeps no order of keys. */
function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted);
  if (value === null || typeof value !== 'object') return value;
  return Object.entries(value)
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([key, inner]) => [key, sorted(inner)]);
}
