import { z } from 'zod';
import { keySchema, modeSchema } from './keys';
import { idSchema } from './page';
import {
  MAX_ENTRIES,
  chairsSchema,
  goalSchema,
  openingsSchema,
  scoreSchema,
  spacedRhythmsSchema,
} from './sessions';
import { tuningsSchema } from './tunes';

/** Labels of the caller's own choosing; a tune played twice has two. */
const labelSchema = z.string().min(1).max(100);

const stateless = {
  chairs: chairsSchema,
  openings: openingsSchema.default({}),
  goal: goalSchema.default('pegs'),
  spacedRhythms: spacedRhythmsSchema.optional(),
  tunes: z
    .array(
      z.strictObject({
        id: labelSchema,
        title: z.string().max(200).optional(),
        key: keySchema,
        mode: modeSchema.default('major'),
        rhythm: z.string().max(40).nullish(),
        tunings: tuningsSchema.default([]),
      }),
    )
    .max(MAX_ENTRIES, `At most ${MAX_ENTRIES} tunes.`),
  sets: z.array(z.array(labelSchema).max(MAX_ENTRIES)).max(MAX_ENTRIES),
  medleys: z.array(z.array(labelSchema).max(MAX_ENTRIES)).max(100).optional(),
  befores: z
    .array(z.tuple([labelSchema, labelSchema]))
    .max(500)
    .optional(),
};

/** An evening in one body: nothing is assumed (a kind on which a tune is silent is `any`), nothing is stored. */
export const scoreRequestSchema = z.strictObject(stateless);
export type ScoreRequest = z.infer<typeof scoreRequestSchema>;

export const suggestRequestSchema = z.strictObject({
  ...stateless,
  /** By label: the position, counted from 0 through the whole evening. */
  pins: z.record(labelSchema, z.number().int().min(0)).optional(),
  /** Milliseconds; a safety stop, not the budget. */
  limitMs: z.number().int().min(0).max(60_000).optional(),
});
export type SuggestRequest = z.infer<typeof suggestRequestSchema>;

export const placeSchema = z.object({
  before: z.string(),
  offClock: z.boolean(),
  /** Over all chairs. */
  pegChanges: z.number().int(),
  /** Per chair, every kind with chairs, by name. */
  kinds: z.array(
    z.object({
      kind: z.string(),
      from: z.string().nullable(),
      to: z.string().nullable(),
      capoFrom: z.number().int().nullable(),
      capoTo: z.number().int().nullable(),
      deltas: z.array(z.number().int()),
      pegChanges: z.number().int(),
    }),
  ),
});

export const scoreAnswerSchema = z.object({ score: scoreSchema, places: z.array(placeSchema) });
export type ScoreAnswer = z.infer<typeof scoreAnswerSchema>;

const proof = {
  optimal: z.boolean(),
  /** How many levels, in the goal's order, no order that keeps the rules can better. */
  provenLevels: z.number().int(),
  /** No order that keeps the rules has less on the first level. */
  lowerBound: z.number().int(),
  millis: z.number(),
};

export const suggestAnswerSchema = z.object({
  score: scoreSchema,
  sets: z.array(z.array(z.string())),
  ...proof,
  stopped: z.literal('time').optional(),
});
export type SuggestAnswer = z.infer<typeof suggestAnswerSchema>;

/** `setId`: an order of that set alone is sought, and everything else stays where it is. */
export const sessionSuggestionRequestSchema = z.strictObject({
  goal: goalSchema.optional(),
  setId: idSchema.optional(),
});
export type SessionSuggestionRequest = z.infer<typeof sessionSuggestionRequestSchema>;

export const sessionSuggestionSchema = z.object({
  version: z.number().int(),
  before: scoreSchema,
  after: scoreSchema,
  sets: z.array(z.array(idSchema)),
  moved: z.array(idSchema),
  goal: goalSchema,
  ...proof,
  stopped: z.literal('time').optional(),
});
export type SessionSuggestion = z.infer<typeof sessionSuggestionSchema>;

export const acceptSuggestionSchema = z.strictObject({
  version: z.number().int().min(0),
  sets: z.array(z.array(idSchema).max(MAX_ENTRIES)).max(MAX_ENTRIES),
});
export type AcceptSuggestion = z.infer<typeof acceptSuggestionSchema>;
