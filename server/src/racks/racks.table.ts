import { index, integer, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import type { Arrival } from '@pegwell/shared/session/rack';
import { createdAt, id } from '../database/columns';
import { sessions } from '../sessions/sessions.table';

/** The instruments that a player brings to an evening, all of one kind. */
export const racks = pgTable(
  'racks',
  {
    id: id(),
    sessionId: uuid()
      .notNull()
      .references(() => sessions.id, { onDelete: 'cascade' }),
    /** A name as the host writes it: whoever it is may have no account. */
    player: text().notNull(),
    kind: text().notNull(),
    arrivals: jsonb().$type<readonly Arrival[]>().notNull(),
    version: integer().notNull().default(1),
    createdAt: createdAt(),
  },
  // Serves the racks of an evening, in the order in which they were added.
  (table) => [index('racks_session').on(table.sessionId, table.createdAt)],
);
