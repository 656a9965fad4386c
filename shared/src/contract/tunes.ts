import { z } from 'zod';
import { keySchema, modeSchema } from './keys';
import { idSchema, lineSchema, pageOf, pageQuerySchema, plainSchema, textSchema } from './page';

/** Bytes of an import file. */
export const IMPORT_MAX_BYTES = 10 * 1024 * 1024;
/** Tunes of an import file. */
export const IMPORT_MAX_TUNES = 20_000;
export const MAX_ACCEPTED = 20;
export const MAX_CAPO = 12;

/** `GDAE`, `gDGBD`, `A3 E4 A4 E5`, or `any` alone. Whether it can be read is the kind's to say (422). */
export const acceptedTuningSchema = z.strictObject({
  tuning: z.string({ error: 'A tuning is missing.' }).trim().min(1, 'A tuning is missing.').max(80),
  capo: z.number().int().min(0).max(MAX_CAPO, `A capo stands at fret 0 to ${MAX_CAPO}.`).default(0),
});

export const kindTuningsSchema = z.strictObject({
  kind: z.string({ error: 'An instrument is missing.' }).trim().min(1, 'An instrument is missing.').max(40),
  accepted: z.array(acceptedTuningSchema).max(MAX_ACCEPTED, `At most ${MAX_ACCEPTED} tunings an instrument.`),
});
export type KindTunings = z.infer<typeof kindTuningsSchema>;

export const tuningsSchema = z.array(kindTuningsSchema).max(40);

const rhythmSchema = plainSchema(40, 'A rhythm')
  .trim()
  .nullish()
  .transform((word) => word || null);

const optionalText = (max: number, what: string) =>
  textSchema(max, what)
    .trim()
    .nullish()
    .transform((text) => text || null);

const tuneFields = {
  title: lineSchema(200, 'A title'),
  key: keySchema,
  mode: modeSchema,
  rhythm: rhythmSchema,
  parts: optionalText(40, 'Parts'),
  composer: optionalText(200, 'A composer'),
  source: optionalText(500, 'A source'),
  notes: optionalText(5000, 'Notes'),
};

export const createTuneSchema = z.strictObject({ ...tuneFields, tunings: tuningsSchema.default([]) });
export type CreateTune = z.infer<typeof createTuneSchema>;

/** Every field is optional; what is absent stays. `tunings` replaces the usual setting's. */
export const updateTuneSchema = z.strictObject({ ...tuneFields, tunings: tuningsSchema }).partial();
export type UpdateTune = z.infer<typeof updateTuneSchema>;

export const shownTuningSchema = z.object({
  /** As shown: short name, full form, or `any`. */
  tuning: z.string(),
  pitches: z.array(z.string()).nullable(),
  capo: z.number().int(),
});
export type ShownTuning = z.infer<typeof shownTuningSchema>;

export const tuneSchema = z.object({
  id: idSchema,
  /** The usual setting's. */
  settingId: idSchema,
  title: z.string(),
  key: z.string(),
  mode: modeSchema,
  rhythm: z.string().nullable(),
  parts: z.string().nullable(),
  composer: z.string().nullable(),
  source: z.string().nullable(),
  notes: z.string().nullable(),
  /** What the usual setting says. */
  tunings: z.array(z.object({ kind: z.string(), accepted: z.array(shownTuningSchema) })),
  /** What the circle's usual tunings say for kinds on which the setting is silent; `any` is left out. */
  assumed: z.array(z.object({ kind: z.string(), accepted: z.array(shownTuningSchema) })),
  createdAt: z.string(),
  updatedAt: z.string(),
  can: z.array(z.string()),
});
export type Tune = z.infer<typeof tuneSchema>;
export const tunePageSchema = pageOf(tuneSchema);

const filterText = (max: number) =>
  plainSchema(max, 'This')
    .trim()
    .optional()
    // A form sends its empty fields too: they filter nothing.
    .transform((text) => text || undefined);

const orEmpty = <T extends z.ZodType>(schema: T, error: string) =>
  z.union([z.literal('').transform(() => undefined), schema], { error }).optional();

/**
 * `key` is compared by sound (A# is Bb), `rhythm` without case, `search` by what `titleKey` leaves of a title.
 * `kind` alone: tunes that state something for it. With `tuning`: tunes that accept that tuning, stated, or
 * assumed where the tune is silent; a capo counts where the text names one.
 */
export const tuneSearchSchema = pageQuerySchema.extend({
  search: filterText(200),
  kind: filterText(40),
  tuning: filterText(80),
  key: orEmpty(keySchema, 'A key is a letter A to G, with # or b where it has one.'),
  mode: orEmpty(modeSchema, `A mode is one of ${modeSchema.options.join(', ')}.`),
  rhythm: filterText(40),
});
export type TuneSearch = z.infer<typeof tuneSearchSchema>;

/** For whatever is a search of tunes and more. */
export const tuningHasKind = [
  ({ tuning, kind }: Pick<TuneSearch, 'tuning' | 'kind'>) => tuning === undefined || kind !== undefined,
  { path: ['tuning'], error: 'A tuning is one of an instrument: say which kind.' },
] as const satisfies Parameters<typeof tuneSearchSchema.refine>;

/** `sort` is `title`, `key`, `rhythm` or `updated`, with `-` before it to turn it round. */
export const tuneQuerySchema = tuneSearchSchema
  .extend({
    sort: z
      .enum(['title', '-title', 'key', '-key', 'rhythm', '-rhythm', 'updated', '-updated'])
      .default('title'),
  })
  .refine(...tuningHasKind);
export type TuneQuery = z.infer<typeof tuneQuerySchema>;

export const importQuerySchema = z.strictObject({
  dryRun: z
    .enum(['true', 'false'])
    .default('false')
    .transform((word) => word === 'true'),
  /**
   * A new id, under which the import can be watched; nothing is written for it in a dry run. Sent again with the
   * same file and choices it gets the first answer again, or goes on where nothing was written yet.
   */
  progress: idSchema.optional(),
  /** Words pasted into a page, as a file of any name: what they are is told by what stands in them. */
  pasted: z
    .enum(['true', 'false'])
    .default('false')
    .transform((word) => word === 'true'),
});
export type ImportQuery = z.infer<typeof importQuerySchema>;

/** Imports of the last day that can be undone, newest first. */
export const recentImportsSchema = z.object({
  items: z.array(
    z.object({
      id: idSchema,
      at: z.string(),
      format: z.enum(['abc', 'csv', 'list']),
      created: z.number().int(),
      updated: z.number().int(),
    }),
  ),
});
export type RecentImports = z.infer<typeof recentImportsSchema>;

/** What undoing an import did. */
export const importUndoneSchema = z.object({
  /** New tunes that went. */
  removed: z.number().int(),
  /** Changed tunes that are as they were. */
  restored: z.number().int(),
  /** Tunes that were changed since, and stay as they are. */
  kept: z.array(z.object({ id: idSchema, title: z.string() })),
});
export type ImportUndone = z.infer<typeof importUndoneSchema>;

/** How far an import is: `written` of the `total` tunes that it has to write. */
export const importProgressSchema = z.object({
  total: z.number().int(),
  written: z.number().int(),
  finished: z.boolean(),
});
export type ImportProgress = z.infer<typeof importProgressSchema>;

export const importActionSchema = z.enum(['create', 'update', 'unchanged', 'skip']);

const cellsSchema = z.array(z.object({ kind: z.string(), tuning: z.string() }));

export const importReportSchema = z.object({
  /** `list`: pasted, a tune a line. */
  format: z.enum(['abc', 'csv', 'list']),
  /** The character encoding that the file was read in, as IANA names it. */
  encoding: z.string(),
  /** Under which the import can be undone; none in a dry run. */
  importId: idSchema.optional(),
  read: z.number().int(),
  created: z.number().int(),
  updated: z.number().int(),
  unchanged: z.number().int(),
  skipped: z.number().int(),
  problems: z.array(z.object({ line: z.number().int(), tune: z.string().nullable(), message: z.string() })),
  tunes: z.array(
    z.object({
      line: z.number().int(),
      title: z.string(),
      action: importActionSchema,
      id: idSchema.optional(),
      key: z.string().optional(),
      mode: modeSchema.optional(),
      rhythm: z.string().nullable().optional(),
      /** Tunings that its words speak of, and in which words; taken only where the choices say so. */
      found: z.array(z.object({ kind: z.string(), tuning: z.string(), said: z.string() })).optional(),
      /** Tunes of the library, or of earlier lines, that are likely the same as this new one. */
      alike: z
        .array(
          z.object({
            id: idSchema.optional(),
            line: z.number().int().optional(),
            title: z.string(),
            key: z.string(),
            mode: modeSchema,
            rhythm: z.string().nullable(),
            tunings: cellsSchema,
          }),
        )
        .optional(),
      /** What a new tune that is likely another states, to be held beside it. */
      tunings: cellsSchema.optional(),
    }),
  ),
});
export type ImportReport = z.infer<typeof importReportSchema>;
export type ImportAction = z.infer<typeof importActionSchema>;

export const exportQuerySchema = z.strictObject({ format: z.enum(['csv', 'abc']).default('csv') });
export type TuneFileFormat = z.infer<typeof exportQuerySchema>['format'];
