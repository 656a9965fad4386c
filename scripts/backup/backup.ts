import { chmodSync, existsSync, renameSync, rmSync, symlinkSync, mkdirSync, writeFileSync } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { Client } from 'pg';
import type { Postgres } from '../postgres';
import { run } from '../run';
import { Sentence } from '../sentence';
import { connectionTo } from './connection';
import { filesIn, tablesIn, type FileContents, type TableContents } from './contents';

/** Another one, when an archive is laid out in another way. */
export const FORMAT = 'pegwell-backup-1';

/** What stands in an archive beside the dump and the files: what they held, to compare with after a restore. */
export interface Manifest {
  readonly format: typeof FORMAT;
  readonly madeAt: string;
  readonly tables: TableContents;
  readonly files: FileContents;
}

export interface Place {
  readonly databaseUrl: string;
  /** PEGWELL_DATA_DIR; may be missing. */
  readonly filesFolder: string;
  readonly postgres: Postgres;
}

/**
 * One archive of a database and its files. What is counted and what is dumped are one snapshot, so that evenings
 * may go on meanwhile. Nothing has the archive's name before it is whole; only its owner can read it: digests of
 * passwords are inside.
 */
export async function writeBackup(
  { databaseUrl, filesFolder, postgres }: Place,
  archive: string,
): Promise<Manifest> {
  if (existsSync(archive)) throw new Sentence(`${archive} is there already, and is left alone.`);
  const folder = await mkdtemp(path.join(tmpdir(), 'pegwell-backup-'));
  try {
    const tables = await dump(databaseUrl, postgres, path.join(folder, 'database.dump'));
    const files = await filesIn(filesFolder);
    if (existsSync(filesFolder)) symlinkSync(path.resolve(filesFolder), path.join(folder, 'files'));
    else mkdirSync(path.join(folder, 'files'));
    const manifest: Manifest = {
      format: FORMAT,
      madeAt: new Date().toISOString(),
      tables,
      files,
    };
    writeFileSync(path.join(folder, 'manifest.json'), JSON.stringify(manifest, null, 2));
    await pack(folder, archive);
    return manifest;
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

async function dump(databaseUrl: string, postgres: Postgres, file: string): Promise<TableContents> {
  const client = new Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    await client.query('begin isolation level repeatable read read only');
    const { rows } = await client.query<{ id: string }>('select pg_export_snapshot() as id');
    const made = await run(
      path.join(postgres.bin, 'pg_dump'),
      [
        '--format=custom',
        '--no-owner',
        '--no-privileges',
        `--snapshot=${rows[0]?.id ?? ''}`,
        `--file=${file}`,
      ],
      { env: connectionTo(databaseUrl) },
    );
    if (made.code !== 0) throw new Sentence(`The database could not be dumped:\n${made.output.trim()}`);
    return await tablesIn(client);
  } finally {
    await client.end();
  }
}

async function pack(folder: string, archive: string): Promise<void> {
  const draft = `${archive}.${process.pid}.new`;
  writeFileSync(draft, '', { mode: 0o600 });
  chmodSync(draft, 0o600);
  // The files stand elsewhere: their folder is followed, links inside it are not for a backup to judge.
  const names = ['manifest.json', 'database.dump', 'files'];
  const { code, output } = await run('tar', [
    '--create',
    '--dereference',
    `--file=${draft}`,
    `--directory=${folder}`,
    ...names,
  ]);
  if (code !== 0) {
    rmSync(draft, { force: true });
    throw new Sentence(`The archive could not be written:\n${output.trim()}`);
  }
  renameSync(draft, archive);
}
