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
  /** Since when it is known that mail to this address reaches whoever has the account. */
  confirmedAt: instant(),
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
    /** To about ten minutes: for whoever looks through their sign-ins. */
    usedAt: instant().notNull().defaultNow(),
    endedAt: instant(),
    userAgent: text(),
  },
  // Serves "the sign-ins of an account".
  (table) => [index('sign_ins_account').on(table.accountId)],
);

/** Links that were sent by mail, each good for one thing, once. */
export const accountLinks = pgTable(
  'account_links',
  {
    id: id(),
    accountId: uuid()
      .notNull()
      .references(() => accounts.id, { onDelete: 'cascade' }),
    purpose: text({ enum: ['confirm', 'reset', 'change-email'] }).notNull(),
    /** SHA-256 of the token, in hexadecimal: what is read here opens nothing. */
    tokenHash: text().notNull().unique(),
    /** The address it was sent to; with `change-email` the new one. */
    email: text().notNull(),
    createdAt: createdAt(),
    expiresAt: instant().notNull(),
    usedAt: instant(),
  },
  // Serves "a newer one makes the older ones void".
  (table) => [index('account_links_account').on(table.accountId, table.purpose)],
);
