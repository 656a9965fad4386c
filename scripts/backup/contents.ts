import { createHash } from 'node:crypto';
import { createReadStream, existsSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';
import type { Client } from 'pg';

/** What a database holds, table by table: how many rows, and a digest of all of them. */
export type TableContents = Readonly<Record<string, { readonly rows: number; readonly digest: string }>>;
/** What a folder holds: digests by path below it. */
export type FileContents = Readonly<Record<string, string>>;

/** Every table that is not PostgreSQL's own, in the transaction the client is in. */
export async function tablesIn(client: Client): Promise<TableContents> {
  // Rows are compared as text, in which times have their zone.
  await client.query(`set timezone to 'UTC'`);
  const { rows: tables } = await client.query<{ name: string }>(
    `select format('%I.%I', schemaname, tablename) as name from pg_tables
     where schemaname not in ('pg_catalog', 'information_schema') order by 1`,
  );
  const contents: Record<string, { rows: number; digest: string }> = {};
  for (const { name } of tables) {
    // Row by row first, then over the sorted digests: a library of recordings need not fit into one text.
    const { rows } = await client.query<{ rows: number; digest: string }>(
      `select count(*)::int as rows, md5(coalesce(string_agg(line, '' order by line), '')) as digest
       from (select md5(row_to_json(each)::text) as line from ${name} as each) as lines`,
    );
    if (rows[0]) contents[name] = rows[0];
  }
  return contents;
}

export async function filesIn(folder: string): Promise<FileContents> {
  const contents: Record<string, string> = {};
  if (!existsSync(folder)) return contents;
  for (const entry of readdirSync(folder, { recursive: true, withFileTypes: true })) {
    if (!entry.isFile()) continue;
    const file = path.join(entry.parentPath, entry.name);
    const hash = createHash('sha256');
    await pipeline(createReadStream(file), hash);
    contents[path.relative(folder, file)] = hash.digest('hex');
  }
  return contents;
}

/** Names of what is not the same in both. */
export function differences(
  one: TableContents | FileContents,
  other: TableContents | FileContents,
): string[] {
  const names = new Set([...Object.keys(one), ...Object.keys(other)]);
  return [...names].filter((name) => JSON.stringify(one[name]) !== JSON.stringify(other[name])).sort();
}
