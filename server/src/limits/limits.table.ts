import { bigint, integer, pgTable, varchar } from 'drizzle-orm/pg-core';

/**
 * Tries that were counted, as rate-limiter-flexible keeps them (its order of columns). Keys are digests: whose
 * address was tried is nobody's to read here.
 */
export const limitCounts = pgTable('limit_counts', {
  key: varchar({ length: 255 }).primaryKey(),
  points: integer().notNull().default(0),
  /** Milliseconds since 1970. */
  expire: bigint({ mode: 'number' }),
});
