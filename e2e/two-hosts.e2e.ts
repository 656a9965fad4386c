import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { LAPTOP, person, startBrowser } from './browser';
import { addMember, seed, storedTitles, type Seed } from './seed';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';

/** Milliseconds in which a board is saved, or takes in what the other host did. */
const SOON = 20_000;

describe('two hosts at one board', () => {
  let database: SiteDatabase;
  let site: Site;
  let browser: Browser;
  let hollis: Page;
  let mara: Page;
  let seeded: Seed;
  beforeAll(async () => {
    database = await freshDatabase();
    site = await startSite(database.url);
    browser = await startBrowser();
    ({ page: hollis } = await person(browser, site.url, LAPTOP));
    ({ page: mara } = await person(browser, site.url, LAPTOP));
    seeded = await seed(hollis, [
      ["Soldier's Joy", 'Angeline the Baker', 'Sandy River Belle'],
      ['June Apple', 'Greasy Coat'],
    ]);
    await addMember(hollis, mara, seeded.circle, 'Mara', 'cohost');
    const board = `/c/${seeded.circle.id}/evenings/${seeded.session.id}`;
    await Promise.all([hollis.goto(board), mara.goto(board)]);
    await Promise.all([hollis, mara].map((page) => page.getByText('Add a tune').first().waitFor()));
  });
  afterAll(async () => {
    await browser.close();
    await site.stop();
    await database.drop();
  });

  const act = async (page: Page, title: string, word: string | RegExp) => {
    await page.getByRole('button', { name: `What to do with ${title}`, exact: true }).click();
    await page.getByRole('menuitem', { name: word }).click();
  };
  const add = async (page: Page, title: string) => {
    await page.getByLabel('Find a tune').fill(title);
    await page.getByRole('button', { name: new RegExp(`^Add ${title}`) }).click();
    await page.getByRole('article', { name: new RegExp(`^${title},`) }).waitFor();
  };
  const titles = (page: Page) =>
    page
      .getByRole('article')
      .evaluateAll((cards) =>
        cards.map((card) => (card.getAttribute('aria-label') ?? '').replace(/, place.*/, '')),
      );

  it('keeps the work of both when one is offline for three saves of the other', async () => {
    await mara.context().setOffline(true);
    // Mara, without a connection.
    await act(mara, 'Angeline the Baker', 'Take out');
    await act(mara, "Soldier's Joy", /^Pin/);
    await act(mara, 'June Apple', 'Move down');
    await mara.getByText(/Offline: 3 changes kept here/).waitFor();

    // Hollis meanwhile, three saves.
    for (const title of ['Forked Deer', 'Camp Chase', 'Big Sciota']) {
      await add(hollis, title);
      await expect
        .poll(async () => (await storedTitles(hollis, seeded.session.id)).flat(), { timeout: SOON })
        .toContain(title);
    }

    await mara.context().setOffline(false);
    const both = async () => (await storedTitles(hollis, seeded.session.id)).flat();
    await expect.poll(both, { timeout: SOON }).not.toContain('Angeline the Baker');
    const stored = await both();
    expect(stored).toEqual(expect.arrayContaining(['Forked Deer', 'Camp Chase', 'Big Sciota']));
    expect(stored).toHaveLength(7);
    expect(stored.indexOf('June Apple')).toBeGreaterThan(stored.indexOf('Greasy Coat'));
    // Both screens come to show the same board.
    await expect.poll(() => titles(mara), { timeout: SOON }).toEqual(stored);
    await expect.poll(() => titles(hollis), { timeout: SOON }).toEqual(stored);
    await hollis
      .getByRole('article', { name: /^Soldier's Joy/ })
      .getByText('pinned')
      .waitFor();
  });

  it('loses nothing of a board that is reloaded while it is offline', async () => {
    await mara.context().setOffline(true);
    await act(mara, 'Big Sciota', 'Take out');
    await mara.getByText(/Offline: 1 change kept here/).waitFor();
    // The page itself cannot be loaded without a connection; what was not saved waits in the browser.
    await mara.goto('about:blank');
    await mara.context().setOffline(false);
    await mara.goto(`/c/${seeded.circle.id}/evenings/${seeded.session.id}`);
    await expect
      .poll(async () => (await storedTitles(hollis, seeded.session.id)).flat(), { timeout: SOON })
      .not.toContain('Big Sciota');
  });
});
