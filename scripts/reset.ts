import { existsSync, rmSync } from 'node:fs';
import { createInterface } from 'node:readline/promises';
import { openDataFolder } from './data-folder';
import { clusterFolder } from './own-database';
import { DATA } from './places';
import { say, Sentence } from './sentence';
import { setting } from './site';
import { stop } from './stop';

/** Removes the own database and everything else in .data/, after asking. */
export async function reset(): Promise<number> {
  if (setting('DATABASE_URL') !== undefined) {
    throw new Sentence(
      'DATABASE_URL is set, and reset never touches a database it did not make. ' +
        'To remove the one of this checkout: env -u DATABASE_URL ./docker-free-dev.sh reset',
    );
  }
  if (!existsSync(DATA)) {
    say('There is nothing to remove: no .data/ here.');
    return 0;
  }
  await openDataFolder();
  const folder = clusterFolder();
  const elsewhere = folder.startsWith(DATA) ? '' : `\n  ${folder}`;
  say(
    `This removes for good the database, uploaded files, secrets and remembered ports:\n  ${DATA}${elsewhere}`,
  );
  if (!(await agreed())) {
    say('Nothing was removed.');
    return 1;
  }
  await stop();
  rmSync(folder, { recursive: true, force: true });
  rmSync(DATA, { recursive: true, force: true });
  say('Removed. The next start begins anew.');
  return 0;
}

async function agreed(): Promise<boolean> {
  const reader = createInterface({ input: process.stdin, output: process.stdout });
  // Without anybody to answer, the input ends, and the answer is no.
  const silence = new Promise<string>((resolve) => reader.once('close', () => resolve('')));
  const answer = await Promise.race([reader.question('Type "yes" to remove it: '), silence]);
  reader.close();
  return answer.trim().toLowerCase() === 'yes';
}
