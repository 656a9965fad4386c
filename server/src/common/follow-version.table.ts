import { integer, pgTable, uuid } from 'drizzle-orm/pg-core';
import { sessions } from '../sessions/sessions.table';

/** What a phone has seen: rises with every change that a phone could show. */
export const followVersions = pgTable('follow_versions', {
  sessionId: uuid()
    .primaryKey()
    .references(() => sessions.id, { onDelete: 'cascade' }),
  version: integer().notNull().default(1),
});
