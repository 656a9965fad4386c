import { cpSync, existsSync, readdirSync, readFileSync } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { Client } from 'pg';
import { run } from '../run';
import { Sentence } from '../sentence';
import { FORMAT, type Manifest, type Place } from './backup';
import { connectionTo } from './connection';
import { differences, filesIn, tablesIn } from './contents';

/**
 * Brings an archive back into an empty place, and compares what is there then with what was there when it was made.
 * @throws Sentence where the place is not empty (nothing is touched), or where anything differs
 */
export async function restoreBackup(archive: string, place: Place): Promise<Manifest> {
  if (!existsSync(archive)) throw new Sentence(`There is no ${archive}.`);
  await refuseFullPlace(place);
  const folder = await mkdtemp(path.join(tmpdir(), 'pegwell-restore-'));
  try {
    const manifest = await unpack(archive, folder);
    await load(path.join(folder, 'database.dump'), place);
    cpSync(path.join(folder, 'files'), place.filesFolder, { recursive: true });
    await compare(manifest, place);
    return manifest;
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

async function refuseFullPlace({ databaseUrl, filesFolder }: Place): Promise<void> {
  const tables = Object.keys(await contentsOf(databaseUrl));
  if (tables.length > 0) {
    throw new Sentence(
      `The database is not empty: it has ${tables.length} tables. A backup is restored into an empty one only.`,
    );
  }
  if (existsSync(filesFolder) && readdirSync(filesFolder).length > 0) {
    throw new Sentence(`${filesFolder} is not empty. A backup is restored into an empty folder only.`);
  }
}

async function unpack(archive: string, folder: string): Promise<Manifest> {
  const notOurs = new Sentence(`${archive} is no whole backup of Pegwell.`);
  const listed = await run('tar', ['--list', `--file=${archive}`]);
  const names = listed.output.split('\n').filter(Boolean);
  // Whatever an archive says, it writes below the folder it is unpacked in, and only what we put there.
  const ours = names.every(
    (name) => /^(manifest\.json|database\.dump|files\/.*)$/.test(name) && !name.includes('..'),
  );
  if (listed.code !== 0 || !ours) throw notOurs;
  const unpacked = await run('tar', [
    '--extract',
    '--no-same-owner',
    `--file=${archive}`,
    `--directory=${folder}`,
  ]);
  if (unpacked.code !== 0) throw notOurs;
  try {
    const manifest: unknown = JSON.parse(readFileSync(path.join(folder, 'manifest.json'), 'utf8'));
    if ((manifest as { format?: unknown }).format === FORMAT) return manifest as Manifest;
  } catch {
    // Neither there nor JSON: not ours.
  }
  throw notOurs;
}

/** All of it or nothing. */
async function load(dumpFile: string, { databaseUrl, postgres }: Place): Promise<void> {
  const connection = connectionTo(databaseUrl);
  const words = ['--single-transaction', '--exit-on-error', '--no-owner', '--no-privileges'];
  const { code, output } = await run(
    path.join(postgres.bin, 'pg_restore'),
    [...words, `--dbname=${connection['PGDATABASE'] ?? ''}`, dumpFile],
    { env: connection },
  );
  if (code !== 0)
    throw new Sentence(`The database could not be restored; it is as empty as before:\n${output.trim()}`);
}

async function compare(manifest: Manifest, { databaseUrl, filesFolder }: Place): Promise<void> {
  const differ = [
    ...differences(manifest.tables, await contentsOf(databaseUrl)),
    ...differences(manifest.files, await filesIn(filesFolder)),
  ];
  if (differ.length === 0) return;
  throw new Sentence(`What was restored is not what was backed up: ${differ.join(', ')}.`);
}

async function contentsOf(databaseUrl: string) {
  const client = new Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    return await tablesIn(client);
  } finally {
    await client.end();
  }
}
