import { index, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id, instant } from '../database/columns';

export const accounts = pgTable('accounts', {
  id: id(),
  /** As typed, for showing and for mail. */
  email: text().notNull(),
  /** Lower case, NFKC: what addresses are compared by. */
  emailKey: text().notNull().unique(),
  displayName: text().notNull(),
  passwordHash: text().notNull(),
  createdAt: createdAt(),
});

/**
 * One row per sign-in. The cookie carries only the row's id and its generation, so that any sign-in
 * can be ended at once, and a copied cookie shows itself when both copies renew.
 */
export const signIns = pgTable(
  'sign_ins',
  {
    id: id(),
    accountId: uuid()
      .notNull()
      .references(() => accounts.id, { onDelete: 'cascade' }),
    generation: integer().notNull().default(1),
    renewedAt: instant().notNull().defaultNow(),
    createdAt: createdAt(),
    endedAt: instant(),
    userAgent: text(),
  },
  // Serves "the sign-ins of an account".
  (table) => [index('sign_ins_account').on(table.accountId)],
);
