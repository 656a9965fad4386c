import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startMailCatcher, type MailCatcher } from '../scripts/mail/catcher';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';

const ACCOUNTS = 30;
const KILLS = 5;
/** Milliseconds that the mail server takes over a mail: a kill meets one on its way. */
const SLOW = 120;

describe('a server that is killed while it sends mail', () => {
  let database: SiteDatabase;
  let catcher: MailCatcher;
  let site: Site;
  beforeAll(async () => {
    database = await freshDatabase();
    catcher = await startMailCatcher({ slow: SLOW });
    site = await startSite(database.url, { mailUrl: catcher.url });
  });
  afterAll(async () => {
    await site.stop();
    await catcher.close();
    await database.drop();
  });

  const post = (path: string, body: object) =>
    fetch(`${site.url}/api/auth/${path}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    });
  const account = (nth: number) => ({ email: `killed${nth}@example.org`, password: 'crooked tunes at dusk' });

  it('has every account that it confirmed, and sends each of them its mail, known by one Message-ID', async () => {
    const port = Number(new URL(site.url).port);
    const confirmed: number[] = [];
    const registering = (async () => {
      for (let nth = 0; confirmed.length < ACCOUNTS; nth++) {
        const answer = await post('register', { ...account(nth), displayName: 'Somebody' }).catch(() => null);
        if (answer?.status === 201) confirmed.push(nth);
        // Killed: the next one waits for the server that follows.
        else await new Promise((resolve) => setTimeout(resolve, 300));
      }
    })();
    for (let kill = 0; kill < KILLS; kill++) {
      const before = catcher.mails.length;
      await catcher.next(() => catcher.mails.length >= before + 3, 60_000);
      // At another moment each time: right after a mail was taken, while the next one is under way.
      await new Promise((resolve) => setTimeout(resolve, (2 * kill * SLOW) / KILLS));
      await site.kill();
      site = await startSite(database.url, { port, mailUrl: catcher.url });
    }
    await registering;
    for (const nth of confirmed) {
      const { email } = account(nth);
      await catcher.next(({ to }) => to.includes(email), 60_000);
      expect([email, (await post('login', account(nth))).status]).toEqual([email, 200]);
      const ids = catcher.mails.filter(({ to }) => to.includes(email)).map(({ messageId }) => messageId);
      expect([email, new Set(ids).size]).toEqual([email, 1]);
    }
    // Taken by the mail server, and the server killed before it noted that: at most one a kill (RFC 1047).
    const twice = catcher.mails.length - new Set(catcher.mails.map(({ messageId }) => messageId)).size;
    expect(twice).toBeLessThanOrEqual(KILLS);
    process.stdout.write(
      `${KILLS} kills: ${confirmed.length} accounts, each with its mail; ${twice} came twice under one Message-ID\n`,
    );
  }, 300_000);
});
