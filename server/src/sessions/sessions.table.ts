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
import type { OpenPlace } from '@pegwell/shared/contract/sessions';
import type { Progress, Tunings } from '@pegwell/shared/live/progress';
import { accounts } from '../accounts/accounts.table';
import { circles } from '../circles/circles.table';
import { createdAt, id, instant, removedAt } from '../database/columns';
import { settings, tunes } from '../tunes/tunes.table';

export type { Progress, Tunings };

export const sessions = pgTable(
  'sessions',
  {
    id: id(),
    circleId: uuid()
      .notNull()
      .references(() => circles.id, { onDelete: 'cascade' }),
    title: text().notNull(),
    place: text(),
    notes: text(),
    /** What players type or scan. */
    code: text().notNull(),
    /** Since when: an evening that nobody runs to its end must not be open for good. */
    codeGivenAt: instant().notNull().defaultNow(),
    /** As the host said it, `2027-01-14T19:30`, in `timeZone`; the instant is computed from both. */
    localStart: text().notNull(),
    timeZone: text().notNull(),
    startsAt: instant().notNull(),
    calendarSequence: integer().notNull().default(0),
    /** The board's version. */
    version: integer().notNull().default(1),
    goal: text({ enum: ['pegs', 'stops'] })
      .notNull()
      .default('pegs'),
    spacedRhythms: text().array().notNull(),
    /** By kind, only what the host said: absent is the kind's standard tuning, null is free. */
    openings: jsonb().$type<Tunings>().notNull().default({}),
    medleys: jsonb().$type<string[][]>().notNull().default([]),
    befores: jsonb().$type<[string, string][]>().notNull().default([]),
    status: text({ enum: ['planned', 'live', 'finished'] })
      .notNull()
      .default('planned'),
    progress: jsonb().$type<Progress>(),
    finishedAt: instant(),
    createdAt: createdAt(),
    updatedBy: uuid().references(() => accounts.id, { onDelete: 'set null' }),
    removedAt: removedAt(),
  },
  (table) => [
    uniqueIndex('sessions_code').on(table.code),
    // Serves the list of evenings, newest first.
    index('sessions_circle_start').on(table.circleId, table.startsAt),
  ],
);

/** Who sits in the room with what; the seats that retune are the chairs. */
export const seats = pgTable(
  'seats',
  {
    id: id(),
    sessionId: uuid()
      .notNull()
      .references(() => sessions.id, { onDelete: 'cascade' }),
    /** Null: nobody yet. */
    accountId: uuid().references(() => accounts.id, { onDelete: 'set null' }),
    kind: text().notNull(),
    retunes: boolean().notNull().default(true),
  },
  (table) => [index('seats_session').on(table.sessionId)],
);

export const sessionSets = pgTable(
  'session_sets',
  {
    id: uuid().primaryKey().defaultRandom(),
    sessionId: uuid()
      .notNull()
      .references(() => sessions.id, { onDelete: 'cascade' }),
    position: integer().notNull(),
    title: text().notNull(),
    removedAt: removedAt(),
  },
  (table) => [index('session_sets_session').on(table.sessionId, table.position)],
);

/** A tune in a setting, or an open place. */
export const entries = pgTable(
  'entries',
  {
    id: uuid().primaryKey().defaultRandom(),
    sessionId: uuid()
      .notNull()
      .references(() => sessions.id, { onDelete: 'cascade' }),
    setId: uuid()
      .notNull()
      .references(() => sessionSets.id, { onDelete: 'cascade' }),
    position: integer().notNull(),
    tuneId: uuid().references(() => tunes.id, { onDelete: 'cascade' }),
    /** Null: the tune's usual setting. */
    settingId: uuid().references(() => settings.id, { onDelete: 'set null' }),
    open: jsonb().$type<OpenPlace>(),
    pinned: boolean().notNull().default(false),
    sitOut: text()
      .array()
      .notNull()
      .default(sql`'{}'`),
    removedAt: removedAt(),
  },
  (table) => [
    index('entries_session').on(table.sessionId),
    // Serves "which evenings use this tune".
    index('entries_tune').on(table.tuneId),
  ],
);

/** Every saved version of a board with who and when: undo, and two hosts reconciled. */
export const boardVersions = pgTable(
  'board_versions',
  {
    sessionId: uuid()
      .notNull()
      .references(() => sessions.id, { onDelete: 'cascade' }),
    version: integer().notNull(),
    savedBy: uuid().references(() => accounts.id, { onDelete: 'set null' }),
    savedAt: createdAt(),
    board: jsonb().$type<StoredBoard>().notNull(),
  },
  (table) => [primaryKey({ columns: [table.sessionId, table.version] })],
);

export interface StoredEntry {
  readonly id: string;
  readonly tuneId: string | null;
  readonly settingId: string | null;
  readonly open: OpenPlace | null;
  readonly pinned: boolean;
  readonly sitOut: readonly string[];
}

export interface StoredBoard {
  readonly sets: readonly {
    readonly id: string;
    readonly title: string;
    readonly entries: readonly StoredEntry[];
  }[];
  readonly medleys: readonly (readonly string[])[];
  readonly befores: readonly (readonly [string, string])[];
}
