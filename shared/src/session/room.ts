import type { FieldError } from '../contract/errors';
import { builtInKind } from '../music/instrument';
import { parseTuning, type Tuned } from '../music/tuning';
import type { Chair } from './evening';

/** Who retunes, read: kinds that are not known or named twice are told; kinds with nobody are left out. */
export function readChairs(chairs: readonly { readonly kind: string; readonly count: number }[]): {
  readonly chairs: readonly Chair[];
  readonly errors: readonly FieldError[];
} {
  const errors: FieldError[] = [];
  const seen = new Set<string>();
  const read = chairs.flatMap(({ kind: id, count }, index): Chair[] => {
    const kind = builtInKind(id);
    if (!kind)
      errors.push({ path: `chairs.${index}.kind`, message: `${id} is no instrument that Pegwell knows.` });
    else if (seen.has(id))
      errors.push({ path: `chairs.${index}.kind`, message: `${kind.name} is named twice.` });
    seen.add(id);
    return kind && count > 0 ? [{ kind, count }] : [];
  });
  return { chairs: read, errors };
}

/** What people arrive tuned to, read: by kind id, null for "tune to the first tune". */
export function readOpenings(openings: Readonly<Record<string, string | null>>): {
  readonly openings: Readonly<Record<string, Tuned | null>>;
  readonly errors: readonly FieldError[];
} {
  const errors: FieldError[] = [];
  const read = Object.entries(openings).flatMap(([id, text]): [string, Tuned | null][] => {
    const kind = builtInKind(id);
    if (!kind) {
      errors.push({ path: `openings.${id}`, message: `${id} is no instrument that Pegwell knows.` });
      return [];
    }
    if (text === null) return [[id, null]];
    const tuned = parseTuning(kind, text);
    if (!tuned.ok) {
      errors.push({ path: `openings.${id}`, message: tuned.reason });
      return [];
    }
    return [[id, tuned.value]];
  });
  return { openings: Object.fromEntries(read), errors };
}
