import { z } from 'zod';
import { MOST_INSTRUMENTS } from '../session/rack';
import { modeSchema } from './keys';
import { idSchema, lineSchema } from './page';
import { sessionStatusSchema } from './sessions';
import { shownTuningSchema } from './tunes';

/** Players with instruments of their own listed, in one evening. */
export const MAX_RACKS = 60;

/** `opening`: as its kind arrives; `free`: tuned at home to what the plan says; `tuned`: to `tuning`. */
const arrivesSchema = z.enum(['opening', 'free', 'tuned']);

const rackInstrumentSchema = z
  .strictObject({
    arrives: arrivesSchema.default('opening'),
    tuning: z.string().trim().min(1, 'A tuning is missing.').max(80).optional(),
  })
  .refine(({ arrives, tuning }) => arrives !== 'tuned' || tuning !== undefined, {
    path: ['tuning'],
    error: 'Tuned to what? A tuning is missing.',
  })
  .refine(({ arrives, tuning }) => arrives === 'tuned' || tuning === undefined, {
    path: ['tuning'],
    error: 'A tuning goes with "arrives": "tuned".',
  });

const rackFields = {
  player: lineSchema(80, 'A name'),
  kind: z.string({ error: 'An instrument is missing.' }).trim().min(1, 'An instrument is missing.').max(40),
  instruments: z
    .array(rackInstrumentSchema, { error: 'The instruments are missing.' })
    .min(1, 'At least one instrument.')
    .max(MOST_INSTRUMENTS, `At most ${MOST_INSTRUMENTS} instruments a player.`),
};

/** The instruments that a player brings, all of one kind. */
export const createRackSchema = z.strictObject(rackFields);
export type CreateRack = z.infer<typeof createRackSchema>;

export const putRackSchema = z.strictObject({ version: z.number().int().min(0), ...rackFields });
export type PutRack = z.infer<typeof putRackSchema>;

const rackCostSchema = z.object({
  pegChanges: z.number().int(),
  /** Places on the clock where this player turns a peg. */
  stops: z.number().int(),
  semitones: z.number().int(),
});
export type RackCost = z.infer<typeof rackCostSchema>;

const rackTurnSchema = z.object({
  /** Entry before which it is done, and the one that needs it: the same, or a later one. */
  before: idSchema,
  needed: idSchema,
  offClock: z.boolean(),
  /** Instruments count from 0. */
  instrument: z.number().int(),
  from: shownTuningSchema,
  to: shownTuningSchema,
  deltas: z.array(z.number().int()),
  pegChanges: z.number().int(),
  /** Where the tune also accepts a tuning that raises less: that one, as shown with its capo. */
  gentler: z.string().nullable(),
});
export type RackTurn = z.infer<typeof rackTurnSchema>;

/** The cheapest plan for the order on the board and the tunings announced for it. */
const rackPlanSchema = z.object({
  /** By instrument: tuned so when the player comes; null for one that no tune needs and that may stay as it is. */
  bring: z.array(shownTuningSchema.nullable()),
  /** In playing order, all entries of the board. */
  tunes: z.array(
    z.object({
      entryId: idSchema,
      instrument: z.number().int(),
      /** How it then stands; null where nothing was ever said. */
      tuned: shownTuningSchema.nullable(),
      /** Played as it stands, on any of them. */
      asItStands: z.boolean(),
    }),
  ),
  turns: z.array(rackTurnSchema),
  cost: rackCostSchema,
  /** With one of these instruments alone, that with which it costs least. */
  alone: rackCostSchema,
});
export type RackPlan = z.infer<typeof rackPlanSchema>;

export const rackSchema = z.object({
  id: idSchema,
  version: z.number().int(),
  player: z.string(),
  kind: z.string(),
  /** `tuning` as shown, also of the opening; null for what the plan says. */
  instruments: z.array(z.object({ arrives: arrivesSchema, tuning: z.string().nullable() })),
  plan: rackPlanSchema.nullable(),
  /** Why there is no plan, in a sentence. */
  refusal: z.string().nullable(),
});
export type Rack = z.infer<typeof rackSchema>;

export const racksSchema = z.object({
  /** What the plans speak of, as it was when they were made. */
  evening: z.object({
    title: z.string(),
    status: sessionStatusSchema,
    /** Kinds that retune. */
    kinds: z.array(z.string()),
    /** By kind, as shown: what people arrive tuned to; null for "tune to the first tune". */
    openings: z.record(z.string(), z.string().nullable()),
    sets: z.array(
      z.object({
        id: idSchema,
        title: z.string(),
        tunes: z.array(
          z.object({ id: idSchema, title: z.string().nullable(), key: z.string(), mode: modeSchema }),
        ),
      }),
    ),
  }),
  items: z.array(rackSchema),
});
export type Racks = z.infer<typeof racksSchema>;
