import { z } from 'zod';

/** A tonic as written: a letter and at most one accidental. */
export const keySchema = z
  .string({ error: 'A key is missing.' })
  .regex(/^[A-G](#|b)?$/, 'A key is a letter A to G, with # or b where it has one.');

export const modes = [
  'major',
  'minor',
  'mixolydian',
  'dorian',
  'aeolian',
  'phrygian',
  'lydian',
  'locrian',
  'modal',
] as const;
export const modeSchema = z.enum(modes, { error: `A mode is one of ${modes.join(', ')}.` });
export type Mode = z.infer<typeof modeSchema>;
