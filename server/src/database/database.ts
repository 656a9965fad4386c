import { drizzle, type NodePgDatabase, type NodePgQueryResultHKT } from 'drizzle-orm/node-postgres';
import type { PgDatabase } from 'drizzle-orm/pg-core';
import { Pool } from 'pg';

/** The pool or a transaction: what every repository method takes first and none stores. */
export type Database = PgDatabase<NodePgQueryResultHKT, Record<string, never>>;
export type RootDatabase = NodePgDatabase<Record<string, never>>;

/** Injection tokens. */
export const DATABASE = Symbol('database');
export const POOL = Symbol('pool');

export function createPool(url: string): Pool {
  const pool = new Pool({ connectionString: url, max: 10, connectionTimeoutMillis: 5_000 });
  // An idle connection that dies (the database restarts) must not take the process with it.
  pool.on('error', () => undefined);
  return pool;
}

export function createDatabase(pool: Pool): RootDatabase {
  return drizzle(pool, { casing: 'snake_case' });
}
