// `./docker-free-dev.sh backup` and `restore`: where things are, and what the person is told.
import path from 'node:path';
import { findPostgres } from '../postgres';
import { say, Sentence } from '../sentence';
import { borrowDatabase, claimSite, dataFolder, openDatabase } from '../site';
import { writeBackup, type Manifest, type Place } from './backup';
import { restoreBackup } from './restore';

export async function backup([file]: readonly string[]): Promise<number> {
  const archive = path.resolve(
    file ?? `pegwell-${new Date().toISOString().slice(0, 16).replace(/\D/g, '')}.tar`,
  );
  const manifest = await writeBackup(await placeAt(await borrowDatabase()), archive);
  say(`${archive}\n${summary(manifest)}`);
  say(
    'Keep PEGWELL_SECRET (or .data/secret) apart from it: without it, everybody signs in anew after a restore.',
  );
  return 0;
}

export async function restore([file]: readonly string[]): Promise<number> {
  if (file === undefined)
    throw new Sentence('Which archive? As in: npm run restore -- pegwell-202701141930.tar');
  await claimSite();
  const manifest = await restoreBackup(path.resolve(file), await placeAt(await openDatabase()));
  say(`Restored and compared: all is as it was on ${manifest.madeAt}.\n${summary(manifest)}`);
  return 0;
}

async function placeAt(databaseUrl: string): Promise<Place> {
  return { databaseUrl, filesFolder: dataFolder(), postgres: await findPostgres('') };
}

function summary({ tables, files }: Manifest): string {
  const rows = Object.values(tables).reduce((sum, table) => sum + table.rows, 0);
  return `${rows} rows in ${Object.keys(tables).length} tables, ${Object.keys(files).length} files`;
}
