import { sql } from 'drizzle-orm';
import {
  boolean,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { circles } from '../circles/circles.table';
import { createdAt, id, instant, removedAt } from '../database/columns';

export const tunes = pgTable(
  'tunes',
  {
    id: id(),
    circleId: uuid()
      .notNull()
      .references(() => circles.id, { onDelete: 'cascade' }),
    title: text().notNull(),
    /** Without case, accents, apostrophes and extra white space: what titles are compared and sorted by. */
    titleKey: text().notNull(),
    rhythm: text(),
    parts: text(),
    composer: text(),
    source: text(),
    notes: text(),
    createdAt: createdAt(),
    updatedAt: instant().notNull().defaultNow(),
    removedAt: removedAt(),
  },
  // Serves the library's table by title, and the import's match by title.
  (table) => [
    index('tunes_circle_title')
      .on(table.circleId, table.titleKey)
      .where(sql`${table.removedAt} is null`),
  ],
);

/** One way a circle plays a tune. */
export const settings = pgTable(
  'settings',
  {
    id: id(),
    tuneId: uuid()
      .notNull()
      .references(() => tunes.id, { onDelete: 'cascade' }),
    /** The tonic as spelled, `Bb`. */
    key: text().notNull(),
    mode: text().notNull(),
    usual: boolean().notNull().default(true),
    createdAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [
    index('settings_tune').on(table.tuneId),
    uniqueIndex('settings_one_usual')
      .on(table.tuneId)
      .where(sql`${table.usual} and ${table.removedAt} is null`),
  ],
);

/** Accepted tunings in order of choice; null pitches: `any`. */
export const settingTunings = pgTable(
  'setting_tunings',
  {
    settingId: uuid()
      .notNull()
      .references(() => settings.id, { onDelete: 'cascade' }),
    kind: text().notNull(),
    rank: integer().notNull(),
    pitches: text().array(),
    capo: integer().notNull().default(0),
  },
  (table) => [primaryKey({ columns: [table.settingId, table.kind, table.rank] })],
);

/**
 * An import, under way or done, for a day: what the progress bar reads, and the answer that is given again to who
 * lost it. How far it is gets written outside the import's own transaction.
 */
export const imports = pgTable('imports', {
  id: id(),
  circleId: uuid()
    .notNull()
    .references(() => circles.id, { onDelete: 'cascade' }),
  /** SHA-256 of the file and the choices: the id stands for these alone. */
  digest: text(),
  total: integer().notNull(),
  written: integer().notNull().default(0),
  /** What became of the file, once all of it is written. */
  report: jsonb(),
  finishedAt: instant(),
  createdAt: createdAt(),
});
