import type { FieldError } from '@pegwell/shared/contract/errors';

/** The deepest body that is read here, a board's open place, has nine levels. */
const DEEPEST = 32;

/**
 * What is wrong with a parsed body before any schema sees it: nests without end, or names `__proto__`, which in a
 * copied object would not be a field but what all its fields are looked up in. Walked without recursion: depth is
 * what is in question.
 */
export function bodyShapeError(body: unknown): FieldError | null {
  const waiting: { readonly value: object; readonly path: string; readonly depth: number }[] = [];
  const put = (value: unknown, path: string, depth: number) => {
    if (typeof value === 'object' && value !== null) waiting.push({ value, path, depth });
  };
  put(body, '', 1);
  for (let each = waiting.pop(); each; each = waiting.pop()) {
    const { value, path, depth } = each;
    if (depth > DEEPEST) return { path, message: `Nothing here nests deeper than ${DEEPEST} levels.` };
    for (const key of Object.keys(value)) {
      const place = path === '' ? key : `${path}.${key}`;
      if (key === '__proto__') return { path: place, message: 'There is no field "__proto__" here.' };
      put((value as Readonly<Record<string, unknown>>)[key], place, depth + 1);
    }
  }
  return null;
}
