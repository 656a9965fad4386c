import { appendFile, readFile, rm, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { asDatabaseUser, giveToDatabaseUser, type Postgres } from './postgres';
import { Sentence } from './sentence';

/** A database cluster of the project's own: its folder (absolute), and the programs that made it. */
export type Cluster = {
  readonly folder: string;
  readonly postgres: Postgres;
  /** Settings beyond the usual ones, in the words of postgresql.conf. */
  readonly settings?: readonly string[];
};

/** The role that owns the cluster. Loopback is open to every program of the machine, so it has a password too. */
export const OWNER = 'pegwell_owner';

const NEVER_OUTSIDE = [
  "listen_addresses = '127.0.0.1'",
  "unix_socket_directories = ''",
  "password_encryption = 'scram-sha-256'",
  "timezone = 'UTC'",
  "log_timezone = 'UTC'",
];

/**
 * Makes a cluster in an empty folder that the database's user owns.
 * @param initdb more words for initdb, such as checksums for data that matters
 */
export async function makeCluster(
  cluster: Cluster,
  password: string,
  initdb: readonly string[],
): Promise<void> {
  const { folder, postgres, settings = [] } = cluster;
  const passwordFile = `${folder}.password`;
  await writeFile(passwordFile, password, { mode: 0o600 });
  try {
    await giveToDatabaseUser(passwordFile);
    const made = await asDatabaseUser(path.join(postgres.bin, 'initdb'), [
      `--pgdata=${folder}`,
      `--username=${OWNER}`,
      `--pwfile=${passwordFile}`,
      '--auth=scram-sha-256',
      '--encoding=UTF8',
      '--locale=C.UTF-8',
      ...initdb,
    ]);
    if (made.code !== 0) throw new Sentence(`The database could not be made:\n${made.output.trimEnd()}`);
  } finally {
    await rm(passwordFile, { force: true });
  }
  await appendFile(path.join(folder, 'postgresql.conf'), `\n${[...NEVER_OUTSIDE, ...settings].join('\n')}\n`);
}

/** The major version a folder was made with; null when it holds no cluster. */
export async function versionOf(folder: string): Promise<number | null> {
  const text = await readFile(path.join(folder, 'PG_VERSION'), 'utf8').catch(() => null);
  return text === null ? null : Number.parseInt(text, 10);
}

/** The server process of a cluster and its port, when it really runs. */
export async function runningServer(folder: string): Promise<{ pid: number; port: number } | null> {
  const lines = (await readFile(path.join(folder, 'postmaster.pid'), 'utf8').catch(() => '')).split('\n');
  const pid = Number(lines[0]);
  if (!pid) return null;
  // After a crash of the machine the number may belong to another program by now.
  const command = await readFile(`/proc/${pid}/cmdline`, 'utf8').catch(() => '');
  const words = command.split('\0');
  return path.basename(words[0] ?? '') === 'postgres' && words.includes(folder)
    ? { pid, port: Number(lines[3]) }
    : null;
}

/** Starts a cluster on loopback and waits until it answers. */
export async function startCluster({ folder, postgres }: Cluster, port: number): Promise<void> {
  if ((await runningServer(folder)) === null) await rm(path.join(folder, 'postmaster.pid'), { force: true });
  const log = path.join(folder, 'server.log');
  const started = await asDatabaseUser(
    path.join(postgres.bin, 'pg_ctl'),
    ['start', '--wait', '--timeout=60', `--pgdata=${folder}`, `--log=${log}`, `--options=-p ${port}`],
    { whole: true },
  );
  if (started.code === 0) return;
  const words = (await readFile(log, 'utf8').catch(() => '')).trimEnd().split('\n').slice(-15).join('\n');
  throw new Sentence(
    `The database in ${folder} did not start on port ${port}:\n${started.output.trim()}\n${words}`,
  );
}

/** Stops a cluster, ending what is still connected, and waits. Nothing to do when it does not run. */
export async function stopCluster({ folder, postgres }: Cluster): Promise<void> {
  const server = await runningServer(folder);
  if (!server) return;
  await asDatabaseUser(
    path.join(postgres.bin, 'pg_ctl'),
    ['stop', '--wait', '--mode=fast', '--timeout=60', `--pgdata=${folder}`],
    { whole: true },
  );
}
