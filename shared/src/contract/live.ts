import { z } from 'zod';
import { modeSchema } from './keys';
import { idSchema, pageOf } from './page';
import { sessionStatusSchema } from './sessions';

export const liveActionSchema = z.enum(['start', 'next', 'back', 'goto', 'retuned', 'finish']);
export type LiveAction = z.infer<typeof liveActionSchema>;

export const liveStepSchema = z
  .strictObject({
    action: liveActionSchema,
    /** With `goto`: where to. */
    entryId: idSchema.optional(),
    /** Made up by the client: a repeated one gets its first answer again. */
    actionId: idSchema.optional(),
    /** The state the client saw: an old one gets 409 with the state. */
    liveVersion: z.number().int().min(0).optional(),
  })
  .refine((step) => step.action !== 'goto' || step.entryId !== undefined, {
    path: ['entryId'],
    error: 'Go to which tune? `entryId` is missing.',
  });
export type LiveStep = z.infer<typeof liveStepSchema>;

/** `tuning` from a step until everyone has retuned; `playing` otherwise. */
export const phaseSchema = z.enum(['tuning', 'playing']);
export type Phase = z.infer<typeof phaseSchema>;

export const liveStateSchema = z.object({
  sessionId: idSchema,
  liveVersion: z.number().int(),
  status: sessionStatusSchema,
  nowEntryId: idSchema.nullable(),
  phase: phaseSchema.nullable(),
  /** Instants, null where it has not happened. */
  startedAt: z.string().nullable(),
  stepAt: z.string().nullable(),
  finishedAt: z.string().nullable(),
  called: z.array(idSchema),
  /** Where players follow: an address, also what the code to scan says. */
  followUrl: z.string(),
});
export type LiveState = z.infer<typeof liveStateSchema>;

export const followQuerySchema = z.strictObject({ kind: z.string().max(40).default('fiddle') });

export const followMoveSchema = z.object({
  deltas: z.array(z.number().int()),
  pegChanges: z.number().int(),
  from: z.string().nullable(),
  to: z.string().nullable(),
  capoFrom: z.number().int().nullable(),
  capoTo: z.number().int().nullable(),
  /** Spelled, low to high in string order, for words and pictures; null while free. */
  fromPitches: z.array(z.string()).nullable(),
  toPitches: z.array(z.string()).nullable(),
  /** Where the tune also accepts a tuning that raises less: that one, as shown with its capo. */
  gentler: z.string().nullable(),
});
export type FollowMove = z.infer<typeof followMoveSchema>;

export const followTuneSchema = z.object({
  entryId: idSchema,
  /** Null for an open place. */
  title: z.string().nullable(),
  open: z.boolean(),
  key: z.string(),
  mode: modeSchema,
  rhythm: z.string().nullable(),
  /** How long an open place is planned for; null for a tune. */
  minutes: z.number().nullable(),
  /** What the kind has on its instrument for this tune; null while it is free and nothing is stated. */
  tuning: z.string().nullable(),
  capo: z.number().int().nullable(),
  pitches: z.array(z.string()).nullable(),
  /** The move into it from what was in force; null when there is nothing to turn or move. */
  retune: followMoveSchema.nullable(),
  /** The title of its set. */
  set: z.string(),
  /** Its number in the evening, from 1. */
  position: z.number().int(),
});
export type FollowTune = z.infer<typeof followTuneSchema>;

export const followSchema = z.object({
  version: z.number().int(),
  status: sessionStatusSchema,
  title: z.string(),
  kind: z.string(),
  /** The kinds that retune in this room: what a screen on the wall shows. */
  kinds: z.array(z.string()),
  /** Hz. */
  referenceA: z.number(),
  startsAt: z.string(),
  timeZone: z.string(),
  total: z.number().int(),
  /** Where others follow: the address that a screen on the wall shows. */
  followUrl: z.string(),
  now: followTuneSchema.extend({ phase: phaseSchema }).nullable(),
  next: followTuneSchema.nullable(),
  later: z.array(followTuneSchema),
  /** Tunes, the current one included, still to be played before this kind's next retune or capo move. */
  retuneIn: z.number().int().nullable(),
});
export type Follow = z.infer<typeof followSchema>;

/** One tune that was really played, copied: it stays true when tunes change. Instants are ISO 8601. */
export const playSchema = z.object({
  id: idSchema,
  sessionId: idSchema,
  entryId: idSchema,
  /** Null where the tune is gone, and for an open place. */
  tuneId: idSchema.nullable(),
  /** Null for an open place. */
  title: z.string().nullable(),
  key: z.string(),
  mode: modeSchema,
  /** As shown, by kind that retuned in the room; null where nothing was stated for it. */
  tunings: z.record(z.string(), z.string().nullable()),
  calledAt: z.string(),
  /** When the room was in tune; the same as `calledAt` where nothing was turned, null where nobody said. */
  playingAt: z.string().nullable(),
  /** Null for the tune that is played now. */
  endedAt: z.string().nullable(),
});
export type Play = z.infer<typeof playSchema>;
export const playsSchema = z.object({ items: z.array(playSchema) });

/** Whose evening a play was of. */
export const circlePlaySchema = playSchema.extend({
  session: z.object({ title: z.string(), startsAt: z.string(), timeZone: z.string() }),
});
export type CirclePlay = z.infer<typeof circlePlaySchema>;
export const circlePlayPageSchema = pageOf(circlePlaySchema);
