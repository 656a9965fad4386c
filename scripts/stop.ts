import { setTimeout as wait } from 'node:timers/promises';
import { endGroup } from './children';
import { openDataFolder } from './data-folder';
import { stopOwnDatabase } from './own-database';
import { commands, forgetCommand, lives, type Command } from './running';
import { say } from './sentence';
import { setting } from './site';

/** A command stops its programs and then its database; together they get this long, in milliseconds. */
const PATIENCE = 30_000;

/** Stops what was started from this checkout: commands, what they left behind, and the own database. */
export async function stop(): Promise<number> {
  await openDataFolder();
  let stopped = false;
  for (const command of commands()) {
    stopped = (await stopCommand(command)) || stopped;
  }
  // Somebody else's database is never stopped, and with DATABASE_URL set ours is not spoken of.
  if (setting('DATABASE_URL') === undefined) stopped = (await stopOwnDatabase()) || stopped;
  say(stopped ? 'Pegwell is stopped.' : 'Nothing of Pegwell runs from this folder.');
  return 0;
}

async function stopCommand(command: Command): Promise<boolean> {
  const lived = lives(command);
  if (lived) process.kill(command.pid, 'SIGTERM');
  for (const until = Date.now() + PATIENCE; lives(command) && Date.now() < until;) await wait(50);
  if (lives(command)) process.kill(command.pid, 'SIGKILL');
  const orphans = command.children.filter(lives);
  for (const orphan of orphans) await endGroup(orphan.pid);
  forgetCommand(command.pid);
  return lived || orphans.length > 0;
}
