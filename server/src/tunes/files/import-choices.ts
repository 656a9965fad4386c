import { importChoicesSchema, type ImportChoice } from '@pegwell/shared/contract/import-choices';
import { ProblemException } from '../../common/problem';

/**
 * The choices beside a file: a field of the form, in JSON.
 * @throws 400 at `choices`, with all that is wrong
 */
export function readChoices(field: unknown): readonly ImportChoice[] {
  if (field === undefined || field === '') return [];
  const parsed = importChoicesSchema.safeParse(parseJson(field));
  if (parsed.success) return parsed.data;
  const errors = parsed.error.issues.map(({ path, message }) => ({
    path: ['choices', ...path].join('.'),
    message,
  }));
  throw new ProblemException('not-valid', errors[0]?.message, { errors });
}

function parseJson(field: unknown): unknown {
  try {
    return typeof field === 'string' ? JSON.parse(field) : undefined;
  } catch {
    return undefined;
  }
}
