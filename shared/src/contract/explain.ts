import { z } from 'zod';
import { idSchema } from './page';
import { goalSchema, MAX_ENTRIES, scoreSchema } from './sessions';

/** An order of the board's own entries, one list per set of the board. */
const orderSchema = z.array(z.array(idSchema).max(MAX_ENTRIES)).max(MAX_ENTRIES);

/** Without `sets`: the board as it stands. While the evening runs, called entries keep their places. */
export const explanationRequestSchema = z.strictObject({
  goal: goalSchema.optional(),
  sets: orderSchema.optional(),
});
export type ExplanationRequest = z.infer<typeof explanationRequestSchema>;

export const reasonSchema = z.object({
  level: z.enum([
    'pegChanges',
    'retuneStops',
    'ruleBreaks',
    'secondChoices',
    'capoMoves',
    'keyChanges',
    'semitones',
  ]),
  /** What it adds to the level; 0 for pegs off the clock, which cost no stop. */
  count: z.number().int(),
  words: z.string(),
});

/** Why an order scores what it does: a sentence per place and level. */
export const explanationSchema = z.object({
  version: z.number().int(),
  goal: goalSchema,
  score: scoreSchema,
  places: z.array(
    z.object({
      before: idSchema,
      /** In the evening, from 1. */
      number: z.number().int(),
      title: z.string(),
      offClock: z.boolean(),
      pegChanges: z.number().int(),
      reasons: z.array(reasonSchema),
    }),
  ),
});
export type Explanation = z.infer<typeof explanationSchema>;

/** `sets`: the suggested order; `setId` where only that set was to be put in order. */
export const heldBackRequestSchema = z.strictObject({
  goal: goalSchema.optional(),
  setId: idSchema.optional(),
  sets: orderSchema,
});
export type HeldBackRequest = z.infer<typeof heldBackRequestSchema>;

/** What an order would gain without one of the host's rules, or without one tune. */
export const heldBackSchema = z.object({
  version: z.number().int(),
  goal: goalSchema,
  /** Of the order that was sent. */
  score: scoreSchema,
  /** What gains something, the most first; then the rules that cost nothing. */
  items: z.array(
    z.object({
      rule: z.enum(['pin', 'medley', 'before', 'tune']),
      ids: z.array(idSchema),
      /** Other tunes of which the same can be said. */
      alike: z.array(idSchema),
      gains: z.boolean(),
      /** The best order that was found without it. */
      score: scoreSchema,
      /** Whether no better one exists, as far as `words` go. */
      proved: z.boolean(),
      words: z.string(),
    }),
  ),
  /** Tunes that were not tried, in a long evening. */
  untried: z.number().int(),
  millis: z.number(),
});
export type HeldBack = z.infer<typeof heldBackSchema>;
