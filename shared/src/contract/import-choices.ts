import { z } from 'zod';
import { idSchema } from './page';
import { IMPORT_MAX_TUNES } from './tunes';

/** Characters of the choices of one import, as JSON. */
export const CHOICES_MAX_LENGTH = 4 * 1024 * 1024;

/** What a host says to one tune of a file, by the line on which it begins. Lines that are not named are as planned. */
export const importChoiceSchema = z.strictObject({
  line: z.number().int().min(1),
  /** Kinds of which the tuning that was found in words is taken. */
  found: z.array(z.string().max(40)).max(40).default([]),
  /** A new tune that is likely one there is: keep both, leave it out, or add what it says to the other. */
  alike: z.enum(['keep', 'merge', 'skip']).default('keep'),
  /** With which of those alike it is merged: a tune's id, or the line of another in the file. */
  with: z.union([idSchema, z.number().int().min(1)]).optional(),
});
export type ImportChoice = z.infer<typeof importChoiceSchema>;

export const importChoicesSchema = z.array(importChoiceSchema).max(IMPORT_MAX_TUNES);
