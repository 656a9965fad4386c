import { createRequire } from 'node:module';
import { remember, remembered } from '../data-folder';
import { atEnd } from '../ending';
import { choosePort } from '../ports';
import { setting } from '../site';
import { serveCaughtMail } from './caught-page';
import type * as Catcher from './catcher';

const USUAL_PAGE = 5174;
/** As many as somebody looks through. */
const KEPT = 200;

/** Where mail goes in development, and where it can be read. */
export interface CaughtHere {
  readonly mailUrl: string;
  readonly pageUrl: string;
}

/**
 * Catches development's mail, so that none leaves the machine; null where PEGWELL_MAIL_URL says otherwise.
 * @param not ports that other parts of this command are about to take
 */
export async function catchMail(not: readonly number[]): Promise<CaughtHere | null> {
  if (setting('PEGWELL_MAIL_URL') !== undefined) return null;
  const port = await choosePort({
    whose: 'the mail that was caught',
    usual: remembered().mailPort ?? USUAL_PAGE,
    not,
  });
  remember({ mailPort: port });
  // Loaded here alone: reading mail takes half a second to load, which `stop` and `test` do without.
  const { startMailCatcher } = createRequire(__filename)('./catcher') as typeof Catcher;
  const catcher = await startMailCatcher({ keep: KEPT });
  const page = await serveCaughtMail(catcher, port);
  atEnd(async () => {
    page.close();
    page.closeAllConnections();
    await catcher.close();
  });
  return { mailUrl: catcher.url, pageUrl: `http://127.0.0.1:${port}` };
}
