import type { SetUsualTunings, UsualTuning } from '@pegwell/shared/contract/circles';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTonic } from '@pegwell/shared/music/pitch';
import { parseTuning, sameTuned } from '@pegwell/shared/music/tuning';
import { isAny } from '../../music/read-tuning';
import { builtInText } from './usual-lookup';

export type UsualFamily = 'major' | 'minor';

/** A row of one kind's table as it is edited; the default row has neither key nor family. */
export interface UsualRow {
  readonly key: string | null;
  readonly family: UsualFamily | null;
  readonly tuning: string;
}

/** A key that no built-in row names: there the built-in default shows. */
const UNNAMED_KEY = 'F#';

/** What is built in for a row, as shown. */
export const builtInOf = (kindId: string, { key, family }: Omit<UsualRow, 'tuning'>): string =>
  builtInText(kindId, key ?? UNNAMED_KEY, family ?? 'major');

/** One kind's rows of the table: every other key first, then by key; and what the circle's own default hides is left out. */
export function rowsOf(items: readonly UsualTuning[], kindId: string): readonly UsualTuning[] {
  const rows = items.filter(({ kind }) => kind === kindId);
  const ownDefault = rows.some(({ key, own }) => key === null && own);
  return rows.filter(({ key, own }) => own || key === null || !ownDefault).sort((a, b) => rank(a) - rank(b));
}

function rank({ key, family }: Omit<UsualRow, 'tuning'>): number {
  if (key === null) return -1;
  // Along the scale from A, major before minor.
  return (((parseTonic(key)?.pitchClass ?? 0) + 3) % 12) * 2 + (family === 'minor' ? 1 : 0);
}

/**
 * The rows to store after one kind's table was edited: the other kinds' own rows as they are, and of this kind
 * those that say something else than would hold without them. A default of the circle's own hides the
 * built-in keys, so beside one every row that differs from it is stored.
 * @returns the rows, and where each of `edited` stands among them (-1: not stored), to place refusals
 */
export function rowsToStore(
  items: readonly UsualTuning[],
  kindId: string,
  edited: readonly UsualRow[],
): { readonly rows: SetUsualTunings['items']; readonly places: readonly number[] } {
  const others = items.filter(({ own, kind }) => own && kind !== kindId);
  const fallback = edited.find(({ key }) => key === null);
  const ownDefault =
    fallback !== undefined && !sameText(kindId, fallback.tuning, builtInOf(kindId, fallback));
  const rows = others.map(({ kind, key, family, tuning }) => ({ kind, key, family, tuning }));
  const places = edited.map((row) => {
    const without = ownDefault && row.key !== null ? fallback.tuning : builtInOf(kindId, row);
    if (sameText(kindId, row.tuning, without)) return -1;
    return rows.push({ kind: kindId, ...row, tuning: row.tuning.trim() }) - 1;
  });
  return { rows, places };
}

/** Whether two texts say the same tuning; texts that cannot be read are the same only letter by letter. */
function sameText(kindId: string, one: string, other: string): boolean {
  const kind = builtInKind(kindId);
  if (!kind || isAny(one) || isAny(other)) return isAny(one) && isAny(other);
  const [a, b] = [parseTuning(kind, one), parseTuning(kind, other)];
  return a.ok && b.ok ? sameTuned(a.value, b.value) : one.trim() === other.trim();
}
