// The words of ./docker-free-dev.sh.
import { createRequire } from 'node:module';
import { end, endOnSignals, isEnding } from './ending';
import { say, Sentence } from './sentence';
import { admin } from './admin';
import { backup, restore } from './backup/words';
import { develop } from './develop';
import type * as Pictures from './pictures';
import { reset } from './reset';
import { start } from './start';
import { stop } from './stop';
import { test } from './test';

const HELP = `./docker-free-dev.sh          develop: database, server and pages, with the demo circle; Ctrl-C stops all
./docker-free-dev.sh start    built, as in production: one process for API and pages, no demo unless PEGWELL_DEMO=yes
./docker-free-dev.sh test     every check; "test --only lint,shared,client,build,server,e2e" for some
./docker-free-dev.sh pictures every page's picture in both lights, at 390 and 1360 px, into pictures/
./docker-free-dev.sh backup   the database and the files into one archive, also while the site runs
./docker-free-dev.sh restore  such an archive back into an empty place, compared row by row
./docker-free-dev.sh admin    make the first account, or let a lost host in again
./docker-free-dev.sh stop     stop what runs, the database included
./docker-free-dev.sh reset    remove the database and everything else in .data/ (asks first)`;

async function main([word, ...words]: readonly string[]): Promise<number> {
  switch (word) {
    case undefined:
      endOnSignals({ interrupted: 0, terminated: 0 });
      return develop();
    case 'start':
      endOnSignals({ interrupted: 0, terminated: 0 });
      return start();
    case 'stop':
      return stop();
    case 'reset':
      return reset();
    case 'backup':
      endOnSignals({ interrupted: 130, terminated: 143 });
      return backup(words);
    case 'restore':
      endOnSignals({ interrupted: 130, terminated: 143 });
      return restore(words);
    case 'admin':
      endOnSignals({ interrupted: 130, terminated: 143 });
      return admin(words);
    case 'test':
      endOnSignals({ interrupted: 130, terminated: 143 });
      return test(words);
    case 'pictures':
      endOnSignals({ interrupted: 130, terminated: 143 });
      return picturesOf(words);
    case 'help':
    case '--help':
    case '-h':
      say(HELP);
      return 0;
    default:
      throw new Sentence(`There is no word "${word}" here. These are:\n${HELP}`);
  }
}

/** Loaded here alone: a browser's driver has no part in a start. (`import()` does not see TypeScript here.) */
function picturesOf(words: readonly string[]): Promise<number> {
  const { pictures } = createRequire(__filename)('./pictures') as typeof Pictures;
  return pictures(words);
}

main(process.argv.slice(2)).then(end, (error: unknown) => {
  // After Ctrl-C whatever was under way fails; that is no news.
  if (!isEnding()) {
    process.stderr.write(`${error instanceof Sentence ? error.message : describe(error)}\n`);
    if (process.argv[2] === 'test') say('0 passed, 1 failed');
  }
  return end(1);
});

function describe(error: unknown): string {
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}
