import { z } from 'zod';
import { modeSchema } from './keys';
import { idSchema } from './page';
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
  /** What the kind has on its instrument for this tune; null while it is free and nothing is stated. */
  tuning: z.string().nullable(),
  capo: z.number().int().nullable(),
  pitches: z.array(z.string()).nullable(),
  /** The move into it from what was in force; null when there is nothing to turn or move. */
  retune: followMoveSchema.nullable(),
  set: z.string(),
  position: z.number().int(),
});
export type FollowTune = z.infer<typeof followTuneSchema>;

export const followSchema = z.object({
  version: z.number().int(),
  status: sessionStatusSchema,
  title: z.string(),
  kind: z.string(),
  /** Hz. */
  referenceA: z.number(),
  startsAt: z.string(),
  timeZone: z.string(),
  total: z.number().int(),
  now: followTuneSchema.extend({ phase: phaseSchema }).nullable(),
  next: followTuneSchema.nullable(),
  later: z.array(followTuneSchema),
  /** Tunes, the current one included, still to be played before this kind's next retune or capo move. */
  retuneIn: z.number().int().nullable(),
});
export type Follow = z.infer<typeof followSchema>;
