import { sql } from 'drizzle-orm';
import {
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  real,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { accounts } from '../accounts/accounts.table';
import { createdAt, id, instant, removedAt } from '../database/columns';

export const circles = pgTable('circles', {
  id: id(),
  name: text().notNull(),
  /** IANA name. */
  timeZone: text().notNull(),
  /** Hz, 415 to 466. */
  referenceA: real().notNull().default(440),
  createdAt: createdAt(),
  removedAt: removedAt(),
});

export const members = pgTable(
  'members',
  {
    circleId: uuid()
      .notNull()
      .references(() => circles.id, { onDelete: 'cascade' }),
    accountId: uuid()
      .notNull()
      .references(() => accounts.id, { onDelete: 'cascade' }),
    role: text({ enum: ['host', 'cohost', 'player'] }).notNull(),
    joinedAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [
    primaryKey({ columns: [table.circleId, table.accountId] }),
    // Serves "my circles".
    index('members_account').on(table.accountId),
  ],
);

/** The circle's own words over the built-in usual tunings. Null pitches: `any`. */
export const usualTunings = pgTable(
  'usual_tunings',
  {
    id: id(),
    circleId: uuid()
      .notNull()
      .references(() => circles.id, { onDelete: 'cascade' }),
    kind: text().notNull(),
    /** The tonic as written, null for the default row of the kind. */
    key: text(),
    /** `major` or `minor` (modal, dorian, minor, aeolian), null with a null key. */
    family: text({ enum: ['major', 'minor'] }),
    pitches: text().array(),
    capo: integer().notNull().default(0),
  },
  (table) => [
    uniqueIndex('usual_tunings_one').on(
      table.circleId,
      table.kind,
      sql`coalesce(${table.key}, '')`,
      sql`coalesce(${table.family}, '')`,
    ),
  ],
);

/** Who did what to what, and how it was before: the audit list, and undo of imports. */
export const events = pgTable(
  'events',
  {
    id: id(),
    circleId: uuid()
      .notNull()
      .references(() => circles.id, { onDelete: 'cascade' }),
    /** Null once the account is deleted. */
    accountId: uuid().references(() => accounts.id, { onDelete: 'set null' }),
    at: instant().notNull().defaultNow(),
    what: text().notNull(),
    subjectId: uuid(),
    before: jsonb(),
    after: jsonb(),
  },
  // Serves the audit list, newest first.
  (table) => [index('events_circle_at').on(table.circleId, table.at)],
);
