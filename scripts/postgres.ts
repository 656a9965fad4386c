import { accessSync, constants, readdirSync } from 'node:fs';
import path from 'node:path';
import { installFromDebian } from './debian';
import { isRoot } from './rights';
import { run, type Ran, type Run } from './run';
import { Sentence } from './sentence';

/** Debian keeps every version of PostgreSQL apart, under its major number. */
const VERSIONS = '/usr/lib/postgresql';
/** The oldest that is still looked after. */
const OLDEST = 14;

/** The programs of one installed version. */
export type Postgres = { readonly version: number; readonly bin: string };

function isProgram(file: string): boolean {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

function installedVersions(): readonly Postgres[] {
  let names: readonly string[];
  try {
    names = readdirSync(VERSIONS);
  } catch {
    return [];
  }
  return names
    .map((name) => ({ version: Number(name), bin: path.join(VERSIONS, name, 'bin') }))
    .filter(({ version, bin }) => version >= OLDEST && isProgram(path.join(bin, 'postgres')))
    .sort((a, b) => b.version - a.version);
}

/**
 * The newest installed PostgreSQL, or the one a cluster was made with; installed from Debian when there is none.
 * @param madeWith major version of an existing cluster, which no other version can open
 */
export async function findPostgres(otherwise: string, madeWith?: number): Promise<Postgres> {
  if (installedVersions().length === 0) {
    await installFromDebian({ what: 'PostgreSQL', packages: ['postgresql'], otherwise });
  }
  const versions = installedVersions();
  const found = madeWith === undefined ? versions[0] : versions.find((v) => v.version === madeWith);
  if (found) return found;
  throw new Sentence(
    madeWith === undefined
      ? `PostgreSQL ${OLDEST} or later was not found below ${VERSIONS}.\n${otherwise}`
      : `The database was made with PostgreSQL ${madeWith}, which is not installed; here is ` +
          `${versions.map((v) => v.version).join(', ')}. Install postgresql-${madeWith} to open it, ` +
          'or begin anew with ./docker-free-dev.sh reset.',
  );
}

/** PostgreSQL refuses to run as root: root runs it as Debian's `postgres` user, everybody else as themselves. */
export const databaseUser = isRoot ? 'postgres' : null;

/** Without the person's own PG variables, which would lead these programs to another server. */
export const plainEnvironment: NodeJS.ProcessEnv = {
  PATH: `${process.env['PATH'] ?? ''}:/usr/bin:/bin:/usr/sbin:/sbin`,
  LC_ALL: 'C.UTF-8',
};

/** Runs a program as the user who owns the clusters. From `/`, which every user can enter. */
export function asDatabaseUser(program: string, args: readonly string[], options: Run = {}): Promise<Ran> {
  const there = { cwd: '/', env: plainEnvironment, ...options };
  return databaseUser === null
    ? run(program, args, there)
    : run('runuser', ['-u', databaseUser, '--', program, ...args], there);
}

/** Hands a folder or file to the user who runs the database. */
export async function giveToDatabaseUser(file: string): Promise<void> {
  if (databaseUser === null) return;
  const { code, output } = await run('chown', [`${databaseUser}:`, file]);
  if (code !== 0)
    throw new Sentence(`${file} could not be given to the ${databaseUser} user: ${output.trim()}`);
}

/** Whether the user who runs the database can get at a folder: one above it may be closed. */
export async function databaseUserReaches(folder: string): Promise<boolean> {
  return (await asDatabaseUser('test', ['-w', folder])).code === 0;
}
