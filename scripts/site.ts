// What develop and start have in common: one checkout, one database, one address.
import path from 'node:path';
import { openDataFolder, secret } from './data-folder';
import { atEnd } from './ending';
import { ownDatabase, runningDatabase } from './own-database';
import { DATA } from './places';
import { parsePort } from './ports';
import { commands, forgetCommand, lives, noteCommand } from './running';
import { say, Sentence } from './sentence';

/** A variable that was really set: an empty one is as good as none. */
export function setting(name: string): string | undefined {
  return process.env[name]?.trim() || undefined;
}

/** Opens .data/ and makes sure that nobody else runs from it. Before anything is started. */
export async function claimSite(): Promise<void> {
  await openDataFolder();
  const ownDatabase = setting('DATABASE_URL') === undefined;
  if (ownDatabase) refuseSecondRun();
  noteCommand(ownDatabase);
  atEnd(() => forgetCommand());
}

/** The URL of the database: DATABASE_URL, where nothing is made or stopped, or the project's own, started. */
export async function openDatabase(): Promise<string> {
  const given = setting('DATABASE_URL');
  if (given === undefined) return ownDatabase();
  say('Using the database of DATABASE_URL.');
  return given;
}

/** The same for a command that may run beside another one, whose database it then uses and leaves running. */
export async function borrowDatabase(): Promise<string> {
  await openDataFolder();
  const running = setting('DATABASE_URL') === undefined ? await runningDatabase() : null;
  if (running !== null) return running;
  await claimSite();
  return openDatabase();
}

/** Where uploaded files are. */
export function dataFolder(): string {
  return setting('PEGWELL_DATA_DIR') ?? path.join(DATA, 'files');
}

function refuseSecondRun(): void {
  const other = commands().find((command) => command.ownDatabase && lives(command));
  if (!other) return;
  throw new Sentence(
    `Pegwell already runs from this folder (process ${other.pid}). ` +
      'Stop it with Ctrl-C where it runs, or with ./docker-free-dev.sh stop.',
  );
}

export function askedPort(): { readonly port: number; readonly by: string } | undefined {
  const text = setting('PORT');
  return text === undefined ? undefined : { port: parsePort(text, 'PORT'), by: 'PORT' };
}

type Serving = {
  readonly mode: 'development' | 'production';
  readonly databaseUrl: string;
  readonly port: number;
  readonly host: string;
  /** The address people open, used in links and for the Origin check. */
  readonly url: string;
  readonly demo: 'yes' | 'no';
  /** Where mail goes that the person's own settings send nowhere. */
  readonly mailUrl?: string | undefined;
};

/** The server's environment: the person's own settings first, then ours. */
export function serverEnvironment({
  mode,
  databaseUrl,
  port,
  host,
  url,
  demo,
  mailUrl,
}: Serving): NodeJS.ProcessEnv {
  return {
    ...process.env,
    NODE_ENV: mode,
    DATABASE_URL: databaseUrl,
    PORT: String(port),
    PEGWELL_HOST: host,
    PEGWELL_URL: url,
    PEGWELL_SECRET: setting('PEGWELL_SECRET') ?? secret('secret'),
    PEGWELL_DATA_DIR: dataFolder(),
    PEGWELL_DEMO: setting('PEGWELL_DEMO') ?? demo,
    PEGWELL_MAIL_URL: setting('PEGWELL_MAIL_URL') ?? mailUrl,
    // Among three programs that speak at once, only what is wrong.
    PEGWELL_LOG: setting('PEGWELL_LOG') ?? (mode === 'development' ? 'warn' : 'info'),
  };
}
