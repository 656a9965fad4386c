import { sql } from 'drizzle-orm';
import { index, integer, jsonb, pgTable, text } from 'drizzle-orm/pg-core';
import { createdAt, id, instant } from '../database/columns';

/** Mail that is to go out, written in the transaction of the change that it tells about. */
export const mails = pgTable(
  'mails',
  {
    /** Also in the Message-ID, so that a mail that had to be sent again is known as the same one. */
    id: id(),
    /** Who writes it: the name under which a feature taught the mail how. */
    letter: text().notNull(),
    /** What the writer needs; empty once it is done. Never a token or a password. */
    details: jsonb().notNull(),
    createdAt: createdAt(),
    /** Not before. */
    dueAt: instant().notNull().defaultNow(),
    tries: integer().notNull().default(0),
    /** When it went out, or it was known that it never will. */
    doneAt: instant(),
  },
  // Serves "what is due", which is next to nothing of the table.
  (table) => [
    index('mails_due')
      .on(table.dueAt)
      .where(sql`${table.doneAt} is null`),
  ],
);
