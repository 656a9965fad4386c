import { z } from 'zod';

export const paperSchema = z.enum(['a4', 'letter'], { error: 'Paper is "a4" or "letter".' });
export type Paper = z.infer<typeof paperSchema>;

export const sheetQuerySchema = z.strictObject({ paper: paperSchema.default('a4') });
export type SheetQuery = z.infer<typeof sheetQuerySchema>;
