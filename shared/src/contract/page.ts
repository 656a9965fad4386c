import { z } from 'zod';

/** `?page=1&pageSize=50`, counted from 1, at most 200 a page. */
export const pageQuerySchema = z.strictObject({
  page: z.coerce.number().int().min(1).max(1_000_000).default(1),
  pageSize: z.coerce.number().int().min(1).max(200).default(50),
});

export type PageQuery = z.infer<typeof pageQuerySchema>;

export function pageOf<T extends z.ZodType>(item: T) {
  return z.object({
    items: z.array(item),
    total: z.number().int(),
    page: z.number().int(),
    pageSize: z.number().int(),
  });
}

export interface Page<T> {
  readonly items: readonly T[];
  readonly total: number;
  readonly page: number;
  readonly pageSize: number;
}

/** A UUID in any version, compared in lower case. */
export const idSchema = z.guid({ error: 'This is not an id.' }).toLowerCase();

/** What can be stored and shown: no control characters, no half of a surrogate pair. */
const PLAIN = /^[^\p{Cc}\p{Cs}]*$/u;
const PLAIN_LINES = /^(?:[^\p{Cc}\p{Cs}]|[\t\n\r])*$/u;

/** One line of text, possibly empty. */
export function plainSchema(max: number, what: string) {
  return z
    .string({ error: `${what} is missing.` })
    .max(max, `${what} is longer than ${max} characters.`)
    .regex(PLAIN, `${what} has characters that cannot be shown.`);
}

/** One line of text as people type it: trimmed, and something in it. */
export function lineSchema(max: number, what: string) {
  return plainSchema(max, what).trim().min(1, `${what} is missing.`);
}

/** Several lines of text, possibly empty. */
export function textSchema(max: number, what: string) {
  return z
    .string()
    .max(max, `${what} is longer than ${max} characters.`)
    .regex(PLAIN_LINES, `${what} has characters that cannot be shown.`);
}
