import type { FieldError } from '../contract/errors';
import type { KindTunings } from '../contract/tunes';
import { builtInKind } from '../music/instrument';
import { parseTuning, sameTuned, type Tuned } from '../music/tuning';

/** By kind id: accepted tunings, first choice first, or `any`. Kinds on which nothing is said are absent. */
export type Accepted = Readonly<Record<string, readonly Tuned[] | 'any'>>;

/**
 * Accepted tunings as they cross the wire, read. A tuning that is named twice counts once, where it
 * stands first.
 * @param path where the list stands in the body, for the errors: `tunings`
 * @returns every error with its place: an unknown or repeated kind, a tuning that cannot be read,
 *   `any` beside something else
 */
export function readKindTunings(
  tunings: readonly KindTunings[],
  path: string,
): { readonly accepted: Accepted; readonly errors: readonly FieldError[] } {
  const accepted: Record<string, readonly Tuned[] | 'any'> = {};
  const errors: FieldError[] = [];
  tunings.forEach((row, index) => {
    const at = `${path}.${index}`;
    const kind = builtInKind(row.kind);
    if (!kind) {
      errors.push({ path: `${at}.kind`, message: `${row.kind} is no instrument that Pegwell knows.` });
      return;
    }
    if (Object.hasOwn(accepted, kind.id)) {
      errors.push({ path: `${at}.kind`, message: `${kind.name} is named twice.` });
      return;
    }
    const list: Tuned[] = [];
    row.accepted.forEach(({ tuning, capo }, rank) => {
      const here = `${at}.accepted.${rank}.tuning`;
      if (/^any$/i.test(tuning.trim())) {
        if (row.accepted.length > 1) errors.push({ path: here, message: '`any` stands alone.' });
        return;
      }
      const tuned = parseTuning(kind, tuning, capo);
      if (!tuned.ok) errors.push({ path: here, message: tuned.reason });
      else if (!list.some((other) => sameTuned(other, tuned.value))) list.push(tuned.value);
    });
    const isAny = row.accepted.length === 1 && list.length === 0;
    if (isAny) accepted[kind.id] = 'any';
    else if (list.length > 0) accepted[kind.id] = list;
  });
  return { accepted, errors };
}
