import { timestamp, uuid } from 'drizzle-orm/pg-core';

/** Keys are UUIDs, made by the database where nobody brings one. */
export const id = () => uuid().primaryKey().defaultRandom();

/** An instant; JavaScript dates in, JavaScript dates out. */
export const instant = () => timestamp({ withTimezone: true, mode: 'date' });

export const createdAt = () => instant().notNull().defaultNow();

/** Removal is a mark; what is marked goes for good after thirty days. */
export const removedAt = () => instant();
