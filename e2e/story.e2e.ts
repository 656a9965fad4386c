import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { Follow } from '@pegwell/shared/contract/live';
import type { Browser, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { PHONE, person, startBrowser } from './browser';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';

/** 44 tunes: titles and tunings of common practice or from memory, a few invented (the file says which). */
const LIST = path.join(__dirname, 'files', 'old-time-list.csv');
const EMAIL = 'host@example.org';
const PASSWORD = 'crooked tunes at dusk';

/** A screen that holds the whole board, so that nothing scrolls away while a card is held. */
const TALL = { width: 1360, height: 1700 };

/** Two polls of a phone that is looked at. */
const TWO_POLLS = 5_000;

describe('an evening, from a list of tunes to a room that follows it', () => {
  let database: SiteDatabase;
  let site: Site;
  let browser: Browser;
  let host: Page;
  let phone: Page;
  let foreign: string[];
  let foreignPhone: string[];
  beforeAll(async () => {
    database = await freshDatabase();
    site = await startSite(database.url);
    browser = await startBrowser();
    ({ page: host, foreign } = await person(browser, site.url, TALL));
    ({ page: phone, foreign: foreignPhone } = await person(browser, site.url, PHONE, 'lamp'));
  });
  afterAll(async () => {
    await browser.close();
    await site.stop();
    await database.drop();
  });

  /** The evening whose board or console the host has open. */
  const session = async () => {
    const id = /evenings\/([0-9a-f-]{36})/.exec(host.url())?.[1];
    return (await (await host.request.get(`/api/sessions/${id}`)).json()) as Session;
  };

  const setOf = (title: string) => host.getByRole('region', { name: title });

  it('registers and makes a circle', async () => {
    await host.goto('/');
    await host.getByRole('link', { name: 'Make an account' }).click();
    await host.getByLabel('Your name').fill('Hollis');
    await host.getByLabel('E-mail').fill(EMAIL);
    await host.getByLabel('Password').fill(PASSWORD);
    await host.getByRole('button', { name: 'Make an account' }).click();
    await host.getByLabel('Name of the circle').fill('Ash Ford Circle');
    await host.getByRole('button', { name: 'Make the circle' }).click();
    await host.getByRole('heading', { name: 'Tunes' }).waitFor();
  });

  it('signs out and in again', async () => {
    await host.getByRole('button', { name: 'Account of Hollis' }).click();
    await host.getByRole('menuitem', { name: 'Sign out' }).click();
    await host.getByLabel('E-mail').fill(EMAIL);
    await host.getByLabel('Password').fill('not this one at all');
    await host.getByRole('button', { name: 'Sign in' }).click();
    await host.getByText('No account has this e-mail and password.').waitFor();
    await host.getByLabel('Password').fill(PASSWORD);
    await host.getByRole('button', { name: 'Sign in' }).click();
    await host.getByRole('link', { name: /Ash Ford Circle/ }).click();
  });

  it('imports a list of tunes, seen line by line before it is written', async () => {
    await host.getByRole('link', { name: 'Tunes', exact: true }).click();
    await host
      .getByRole('link', { name: /Import/ })
      .first()
      .click();
    await host.locator('input[type=file]').setInputFiles(LIST);
    const tunes = readFileSync(LIST, 'utf8').trim().split('\n').length - 1;
    expect(tunes).toBeGreaterThanOrEqual(40);
    await host.getByRole('button', { name: `${tunes} new` }).waitFor();
    await host.getByRole('button', { name: `Import ${tunes} tunes` }).click();
    await host.getByText(`${tunes} added, 0 changed, 0 as they were, 0 left out.`).waitFor();
  });

  it('plans an evening for fiddles and banjos', async () => {
    await host.getByRole('link', { name: 'Evenings' }).click();
    await host.getByRole('link', { name: 'Plan the first evening' }).click();
    await host.getByLabel('Title').fill('Second Thursday');
    await host.getByLabel('Date').fill('2027-01-14');
    await host.getByLabel('Begins at').fill('19:30');
    await host.getByRole('group', { name: 'Fiddles' }).getByLabel('Fiddles').fill('5');
    await host.getByLabel('Another instrument that retunes').selectOption('banjo');
    await host.getByRole('group', { name: 'Banjos' }).getByLabel('Banjos').fill('2');
    await host.getByRole('button', { name: 'Plan the evening' }).click();
    await host.getByRole('button', { name: 'Begin with an empty set' }).waitFor();
    expect((await session()).chairs).toEqual([
      { kind: 'banjo', count: 2 },
      { kind: 'fiddle', count: 5 },
    ]);
  });

  it('builds two sets by dragging, with what every change costs', async () => {
    await host.getByRole('button', { name: 'Begin with an empty set' }).click();
    await host.getByRole('button', { name: 'Add a set' }).click();
    const [first, second] = [setOf('First set'), setOf('Second set')];
    // By mouse, from the finder: an order that no host would want.
    const wanted = [
      [first, ['Needlecase', 'Greasy Coat', 'Sandy River Belle', 'June Apple', 'Forked Deer']],
      [second, ['Lost Indian', 'Midnight on the Water', 'Camp Chase', 'Julie Ann Johnson']],
    ] as const;
    for (const [set, titles] of wanted) {
      for (const title of titles) {
        await host.getByLabel('Find a tune').fill(title);
        const row = host.locator('aside li', { hasText: title });
        await row.waitFor();
        await drag(host, row.locator('b'), set.getByRole('button', { name: 'Add an open place' }));
        await set.getByRole('article', { name: new RegExp(`^${title},`) }).waitFor();
      }
    }
    // And a card from one set into the other.
    const card = first.getByRole('article', { name: /^June Apple,/ });
    await drag(host, card.locator('b').first(), second.getByRole('article', { name: /^Camp Chase,/ }));
    await second.getByRole('article', { name: /^June Apple,/ }).waitFor();
    await host.getByText('Saved', { exact: true }).waitFor();
    const saved = await session();
    expect(saved.sets.map((set) => set.entries.length)).toEqual([4, 5]);
    expect(await first.innerText()).toContain('Fiddle: ');
  });

  it('gets a better order, sees both, and takes it', async () => {
    const before = await session();
    await host.getByRole('button', { name: 'Suggest an order' }).click();
    await host.getByRole('heading', { name: /A better order/ }).waitFor();
    await host.getByText('No order is better. Proved.').waitFor();
    await host.getByText(`${before.score.pegChanges} peg changes as you have it`).waitFor();
    await host.getByRole('button', { name: 'Take this order' }).click();
    await host.getByRole('button', { name: 'Suggest an order' }).waitFor();
    const after = await session();
    expect(after.version).toBeGreaterThan(before.version);
    expect(after.score.pegChanges).toBeLessThan(before.score.pegChanges);
    const ids = (each: Session) => each.sets.flatMap((set) => set.entries.map(({ id }) => id));
    expect(ids(after).sort()).toEqual(ids(before).sort());
    expect(after.sets.map((set) => set.entries.length)).toEqual([4, 5]);
  });

  it('asks nothing of any other host', () => {
    expect(foreign).toEqual([]);
    expect(foreignPhone).toEqual([]);
  });
});

/** As a hand does it: press, move in steps, let go. */
async function drag(page: Page, from: Locator, to: Locator): Promise<void> {
  await to.scrollIntoViewIfNeeded();
  await from.scrollIntoViewIfNeeded();
  const [start, end] = [await from.boundingBox(), await to.boundingBox()];
  if (!start || !end) throw new Error('nothing to drag, or nowhere to');
  await page.mouse.move(start.x + start.width / 2, start.y + start.height / 2);
  await page.mouse.down();
  const [x, y] = [end.x + end.width / 2, end.y + end.height / 2];
  await page.mouse.move(start.x + start.width / 2 + 12, start.y + start.height / 2 + 12, { steps: 3 });
  await page.mouse.move(x, y, { steps: 12 });
  await page.mouse.move(x, y + 2, { steps: 2 });
  await page.waitForTimeout(100);
  await page.mouse.up();
}
