import { join } from 'node:path';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import type { Pool } from 'pg';
import { createDatabase } from './database';

/** Stands beside the sources: generated, read, committed, never edited after it landed. */
const MIGRATIONS = join(__dirname, '../../src/database/migrations');
/** Any number, the same in every process: two servers that start together migrate one after the other. */
const LOCK = 7_346_271;

/** Brings the schema up to date. Answers whether the database was empty (no table of anybody's) before. */
export async function migrateDatabase(pool: Pool): Promise<{ wasEmpty: boolean }> {
  const lock = await pool.connect();
  try {
    await lock.query('select pg_advisory_lock($1)', [LOCK]);
    const { rows } = await lock.query<{ count: number }>(
      `select count(*)::int as count from information_schema.tables
       where table_schema not in ('pg_catalog', 'information_schema')`,
    );
    await migrate(createDatabase(pool), { migrationsFolder: MIGRATIONS });
    return { wasEmpty: rows[0]?.count === 0 };
  } finally {
    await lock.query('select pg_advisory_unlock($1)', [LOCK]).catch(() => undefined);
    lock.release();
  }
}
