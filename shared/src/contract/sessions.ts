import { z } from 'zod';
import { timeZoneSchema } from './circles';
import { keySchema, modeSchema } from './keys';
import { idSchema, lineSchema, pageOf, plainSchema, textSchema } from './page';
import { shownTuningSchema, tuningsSchema } from './tunes';

export const goalSchema = z.enum(['pegs', 'stops']);
export const sessionStatusSchema = z.enum(['planned', 'live', 'finished']);
export type SessionStatus = z.infer<typeof sessionStatusSchema>;

const kindIdSchema = z.string({ error: 'An instrument is missing.' }).trim().min(1).max(40);

export const chairSchema = z.strictObject({
  kind: kindIdSchema,
  count: z.number().int().min(0).max(200, 'At most 200 players of a kind.'),
});
export const chairsSchema = z.array(chairSchema).max(40);

/** By kind: a tuning, with `capo N` where there is one, or null for "tune to the first tune". */
export const openingsSchema = z.record(kindIdSchema, z.string().trim().min(1).max(80).nullable());

export const spacedRhythmsSchema = z.array(lineSchema(40, 'A rhythm')).max(40);
export const DEFAULT_SPACED_RHYTHMS: readonly string[] = ['waltz', 'air'];

/** Local time (`2027-01-14T19:30`) in the session's zone, or an instant with an offset. */
export const startsAtSchema = z
  .string({ error: 'A start is missing.' })
  .regex(
    /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2}(\.\d{1,6})?)?(Z|[+-]\d{2}:\d{2})?$/,
    'A start is a date and a time, as 2027-01-14T19:30.',
  );

const sessionFields = {
  title: lineSchema(200, 'A title'),
  startsAt: startsAtSchema,
  timeZone: timeZoneSchema.optional(),
  place: lineSchema(200, 'A place').nullish(),
  notes: textSchema(5000, 'Notes').nullish(),
  chairs: chairsSchema.optional(),
  openings: openingsSchema.optional(),
  goal: goalSchema.optional(),
  spacedRhythms: spacedRhythmsSchema.optional(),
};

export const createSessionSchema = z.strictObject(sessionFields);
export type CreateSession = z.infer<typeof createSessionSchema>;

/** What stands beside the board; the board itself has its own route and version. */
export const updateSessionSchema = z.strictObject(sessionFields).partial();
export type UpdateSession = z.infer<typeof updateSessionSchema>;

export const openPlaceSchema = z.strictObject({
  key: keySchema,
  mode: modeSchema,
  tunings: tuningsSchema.default([]),
  minutes: z.number().min(1, 'At least one minute.').max(600, 'At most ten hours.'),
});
export type OpenPlace = z.infer<typeof openPlaceSchema>;

/** A tune or an open place; omitted fields of a known id keep their value. */
export const boardEntrySchema = z.strictObject({
  id: idSchema.optional(),
  tuneId: idSchema.nullish(),
  settingId: idSchema.nullish(),
  open: openPlaceSchema.nullish(),
  pinned: z.boolean().optional(),
  sitOut: z.array(kindIdSchema).max(40).optional(),
});
export type BoardEntry = z.infer<typeof boardEntrySchema>;

export const MAX_ENTRIES = 300;
export const boardSetSchema = z.strictObject({
  id: idSchema.optional(),
  title: plainSchema(120, 'A title').trim().optional(),
  entries: z.array(boardEntrySchema).max(MAX_ENTRIES),
});
export type BoardSet = z.infer<typeof boardSetSchema>;

export const putBoardSchema = z.strictObject({
  version: z.number().int().min(0),
  sets: z.array(boardSetSchema).max(50, 'At most 50 sets.'),
  medleys: z.array(z.array(idSchema).max(MAX_ENTRIES)).max(100).optional(),
  befores: z
    .array(z.tuple([idSchema, idSchema]))
    .max(500)
    .optional(),
});
export type PutBoard = z.infer<typeof putBoardSchema>;

export const scoreSchema = z.object({
  pegChanges: z.number().int(),
  retuneStops: z.number().int(),
  ruleBreaks: z.number().int(),
  secondChoices: z.number().int(),
  capoMoves: z.number().int(),
  keyChanges: z.number().int(),
  semitones: z.number().int(),
  offClockPegChanges: z.number().int(),
});

/** What an entry plays: the tune's present wording, or the open place's own. */
export const shownEntrySchema = z.object({
  id: idSchema,
  tuneId: idSchema.nullable(),
  settingId: idSchema.nullable(),
  pinned: z.boolean(),
  open: openPlaceSchema.nullable(),
  sitOut: z.array(z.string()),
  title: z.string().nullable(),
  key: z.string(),
  mode: modeSchema,
  rhythm: z.string().nullable(),
  minutes: z.number(),
  /** What each kind accepts here, usual tunings included and sit-outs applied; silent kinds are left out. */
  tunings: z.array(
    z.object({ kind: z.string(), accepted: z.array(shownTuningSchema), assumed: z.boolean() }),
  ),
  /** True when the tune was removed from the library after it was put here. */
  removed: z.boolean(),
});
export type ShownEntry = z.infer<typeof shownEntrySchema>;

export const sessionSchema = z.object({
  id: idSchema,
  circleId: idSchema,
  title: z.string(),
  place: z.string().nullable(),
  notes: z.string().nullable(),
  code: z.string(),
  version: z.number().int(),
  status: sessionStatusSchema,
  /** The instant, and the local time in `timeZone` from which it was computed. */
  startsAt: z.string(),
  localStart: z.string(),
  timeZone: z.string(),
  chairs: z.array(z.object({ kind: z.string(), count: z.number().int() })),
  /** As shown, for every kind with chairs. */
  openings: z.record(z.string(), z.string().nullable()),
  goal: goalSchema,
  spacedRhythms: z.array(z.string()),
  referenceA: z.number(),
  sets: z.array(z.object({ id: idSchema, title: z.string(), entries: z.array(shownEntrySchema) })),
  medleys: z.array(z.array(idSchema)),
  befores: z.array(z.tuple([idSchema, idSchema])),
  score: scoreSchema,
  /** While live: what is now, and what was called and keeps its place. */
  called: z.array(idSchema),
  nowEntryId: idSchema.nullable(),
  /** While live: what each kind has on its instrument with the tune that is now (as shown; null while free). */
  inForce: z.record(z.string(), z.string().nullable()).nullable(),
  updatedBy: z.string().nullable(),
  can: z.array(z.string()),
});
export type Session = z.infer<typeof sessionSchema>;

export const sessionSummarySchema = sessionSchema
  .pick({
    id: true,
    title: true,
    place: true,
    code: true,
    status: true,
    startsAt: true,
    localStart: true,
    timeZone: true,
  })
  .extend({ tunes: z.number().int(), sets: z.number().int() });
export type SessionSummary = z.infer<typeof sessionSummarySchema>;
export const sessionPageSchema = pageOf(sessionSummarySchema);
