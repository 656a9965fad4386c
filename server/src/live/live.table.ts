import { integer, index, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import type { LiveState } from '@pegwell/shared/contract/live';
import { circles } from '../circles/circles.table';
import { createdAt, id, instant } from '../database/columns';
import { sessions } from '../sessions/sessions.table';
import { tunes } from '../tunes/tunes.table';

/** The host's console: what step the evening is at. The tunings in force stand in the session's progress. */
export const liveStates = pgTable('live_states', {
  sessionId: uuid()
    .primaryKey()
    .references(() => sessions.id, { onDelete: 'cascade' }),
  liveVersion: integer().notNull().default(1),
  phase: text({ enum: ['tuning', 'playing'] }),
  startedAt: instant(),
  stepAt: instant(),
  finishedAt: instant(),
});

/** A step's first answer, for a step sent again after a lost one. */
export const liveActions = pgTable(
  'live_actions',
  {
    sessionId: uuid()
      .notNull()
      .references(() => sessions.id, { onDelete: 'cascade' }),
    actionId: uuid().notNull(),
    answer: jsonb().$type<LiveState>().notNull(),
    at: createdAt(),
  },
  (table) => [primaryKey({ columns: [table.sessionId, table.actionId] })],
);

/** What was really played, copied: it stays true when tunes change or go. */
export const plays = pgTable(
  'plays',
  {
    id: id(),
    circleId: uuid()
      .notNull()
      .references(() => circles.id, { onDelete: 'cascade' }),
    sessionId: uuid()
      .notNull()
      .references(() => sessions.id, { onDelete: 'cascade' }),
    entryId: uuid().notNull(),
    tuneId: uuid().references(() => tunes.id, { onDelete: 'set null' }),
    /** Null for an open place. */
    title: text(),
    key: text().notNull(),
    mode: text().notNull(),
    /** As shown, by kind in the room. */
    tunings: jsonb().$type<Record<string, string | null>>().notNull(),
    calledAt: instant().notNull(),
    /** When the room was in tune; the same as calledAt where nothing was turned. */
    playingAt: instant(),
    endedAt: instant(),
  },
  (table) => [
    // Serves an evening's record.
    index('plays_session').on(table.sessionId, table.calledAt),
    // Serves "when was it last played".
    index('plays_tune').on(table.tuneId, table.calledAt),
  ],
);
