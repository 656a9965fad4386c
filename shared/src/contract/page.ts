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

/**
 * What cannot be stored or shown: control characters, halves of surrogate pairs, and whatever turns the direction
 * of the text that stands beside it (Unicode Technical Report 36, section 2.10).
 */
const UNSHOWABLE = String.raw`\p{Cc}\p{Cs}\u2028\u2029\u202a-\u202e\u2066-\u2069\ufff9-\ufffb`;
const PLAIN = new RegExp(`^[^${UNSHOWABLE}]*$`, 'u');
const PLAIN_LINES = new RegExp(String.raw`^(?:[^${UNSHOWABLE}]|[\t\n\r])*$`, 'u');
/** More marks on one letter than any language puts there: they would be drawn over the lines above and below. */
const PILED_UP = /\p{M}{7}/u;

/**
 * What nobody sees and nobody types on purpose: zero-width spaces, byte order marks, soft hyphens, marks of
 * direction, joiners after what does not join (they stay in emoji and in scripts that need them), and tags
 * outside a flag. Two names that look the same would differ by them.
 */
const UNSEEN = /[\u00ad\u061c\u200b\u200e\u200f\u2060-\u2064\ufeff]/g;
const JOINING_NOTHING = /(^|[\p{Script=Latin}\p{N}\p{P}\p{Z}])[\u200c\u200d]+/gu;
const FLAG_OR_TAGS = /(\u{1f3f4}[\u{e0020}-\u{e007f}]+)|[\u{e0000}-\u{e007f}]/gu;

function withoutUnseen(text: string): string {
  return text
    .replace(UNSEEN, '')
    .replace(JOINING_NOTHING, '$1')
    .replace(FLAG_OR_TAGS, (_, flag: string | undefined) => flag ?? '')
    .normalize('NFC');
}

/** One line of text, possibly empty. */
export function plainSchema(max: number, what: string) {
  return z
    .string({ error: `${what} is missing.` })
    .max(max, `${what} is longer than ${max} characters.`)
    .overwrite(withoutUnseen)
    .regex(PLAIN, `${what} has characters that cannot be shown.`)
    .refine(unpiled, `${what} has too many marks on one letter.`);
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
    .overwrite(withoutUnseen)
    .regex(PLAIN_LINES, `${what} has characters that cannot be shown.`)
    .refine(unpiled, `${what} has too many marks on one letter.`);
}

function unpiled(text: string): boolean {
  return !PILED_UP.test(text);
}
