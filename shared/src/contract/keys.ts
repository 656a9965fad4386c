import { z } from 'zod';
import { MODES } from '../music/mode';

/** A tonic as written: a letter and at most one accidental. */
export const keySchema = z
  .string({ error: 'A key is missing.' })
  .regex(/^[A-G](#|b)?$/, 'A key is a letter A to G, with # or b where it has one.');

export const modeSchema = z.enum(MODES, { error: `A mode is one of ${MODES.join(', ')}.` });
export type Mode = z.infer<typeof modeSchema>;
