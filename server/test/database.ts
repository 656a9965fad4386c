import { randomBytes } from 'node:crypto';
import { Client } from 'pg';
import { createPool } from '../src/database/database';
import { migrateDatabase } from '../src/database/migrate';

/** A superuser's address on a throwaway cluster; the test run gives it. */
function clusterUrl(): string {
  const url = process.env['PEGWELL_TEST_DATABASE_URL'];
  if (!url) throw new Error('PEGWELL_TEST_DATABASE_URL is missing: run the tests through npm test.');
  return url;
}

export interface TestDatabase {
  readonly url: string;
  drop(): Promise<void>;
}

/** A database of its own, empty. */
export async function emptyDatabase(): Promise<TestDatabase> {
  const name = `pegwell_test_${randomBytes(6).toString('hex')}`;
  await onCluster(`create database ${name}`);
  const url = new URL(clusterUrl());
  url.pathname = `/${name}`;
  return { url: url.toString(), drop: () => onCluster(`drop database if exists ${name} with (force)`) };
}

/** The same, with the schema. */
export async function migratedDatabase(): Promise<TestDatabase> {
  const database = await emptyDatabase();
  const pool = createPool(database.url);
  await migrateDatabase(pool);
  await pool.end();
  return database;
}

async function onCluster(statement: string): Promise<void> {
  const client = new Client({ connectionString: clusterUrl() });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}
