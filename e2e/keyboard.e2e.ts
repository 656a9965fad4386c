import type { Browser, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { LAPTOP, person, startBrowser } from './browser';
import { seed, storedTitles, type Seed } from './seed';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';

const SOON = 20_000;
const MANY_TABS = 400;

describe('the keyboard alone', () => {
  let database: SiteDatabase;
  let site: Site;
  let browser: Browser;
  let page: Page;
  let seeded: Seed;
  beforeAll(async () => {
    database = await freshDatabase();
    site = await startSite(database.url);
    browser = await startBrowser();
    ({ page } = await person(browser, site.url, LAPTOP));
    seeded = await seed(page, []);
    await page.goto(`/c/${seeded.circle.id}/evenings/${seeded.session.id}`);
    await page.getByRole('button', { name: 'Begin with an empty set' }).waitFor();
  });
  afterAll(async () => {
    await browser.close();
    await site.stop();
    await database.drop();
  });

  const stored = async () => (await storedTitles(page, seeded.session.id)).flat();

  /** Goes there as somebody without a mouse does, forwards or back, and fails where that cannot be done. */
  async function tabTo(locator: Locator, key: 'Tab' | 'Shift+Tab' = 'Tab'): Promise<void> {
    await locator.waitFor();
    for (let presses = 0; presses < MANY_TABS; presses++) {
      if (await locator.evaluate((element) => element === document.activeElement)) return;
      await page.keyboard.press(key);
    }
    throw new Error(`${String(locator)} is not reached by ${key}`);
  }
  const press = async (locator: Locator, key?: 'Shift+Tab') => {
    await tabTo(locator, key);
    await page.keyboard.press('Enter');
  };
  /** Opens the menu of a card and takes a word of it, letter by letter as menus work. */
  const choose = async (title: string, word: string) => {
    await press(page.getByRole('button', { name: `What to do with ${title}`, exact: true }));
    const item = page.getByRole('menuitem', { name: word, exact: true });
    await item.waitFor();
    for (let presses = 0; presses < 20; presses++) {
      if (await item.evaluate((element) => 'highlighted' in (element as HTMLElement).dataset)) break;
      await page.keyboard.press('ArrowDown');
    }
    await page.keyboard.press('Enter');
  };

  /** What a screen reader says of the drag. */
  const told = () => page.locator('[id^=DndLiveRegion]').innerText();

  it('builds a set', async () => {
    const search = page.getByLabel('Find a tune');
    for (const title of ['Needlecase', 'Greasy Coat', 'June Apple', 'Lost Indian', 'Sail Away Ladies']) {
      await tabTo(search, 'Shift+Tab');
      await page.keyboard.press('Control+A');
      await page.keyboard.type(title);
      await press(page.getByRole('button', { name: new RegExp(`^Add ${title}`) }));
      await page.getByRole('article', { name: new RegExp(`^${title},`) }).waitFor();
    }
    await expect.poll(stored, { timeout: SOON }).toHaveLength(5);
  });

  it('moves a card by its grip, told what it would cost, and by its menu', async () => {
    const [first] = await stored();
    await tabTo(page.getByRole('button', { name: new RegExp(`^Move ${first},`) }));
    for (const key of ['Space', 'ArrowDown', 'ArrowDown']) {
      const before = await told();
      await page.keyboard.press(key);
      await expect.poll(told, { timeout: SOON }).not.toBe(before);
    }
    expect(await told()).toMatch(/peg/);
    await page.keyboard.press('Space');
    await expect.poll(async () => (await stored())[0], { timeout: SOON }).not.toBe(first);
    const before = await stored();
    await choose(before[1] ?? '', 'Move up');
    await expect.poll(async () => (await stored())[0], { timeout: SOON }).toBe(before[1]);
  });

  it('pins, asks for an order, takes it and undoes it', async () => {
    // Worse than it need be: what was put first is put last.
    const [first] = await stored();
    await choose(first ?? '', 'Move to a place …');
    await page.keyboard.press('Control+A');
    await page.keyboard.type('3');
    await page.keyboard.press('Enter');
    await expect.poll(async () => (await stored())[2], { timeout: SOON }).toBe(first);
    await choose(first ?? '', 'Pin to this place');
    await page
      .getByRole('article', { name: new RegExp(`^${first},`) })
      .getByText('pinned')
      .waitFor();

    const before = await stored();
    await press(page.getByRole('button', { name: 'Suggest an order' }), 'Shift+Tab');
    await press(page.getByRole('button', { name: 'Take this order' }));
    await expect.poll(stored, { timeout: SOON }).not.toEqual(before);
    expect((await stored())[2]).toBe(first);

    await press(page.getByRole('button', { name: 'Undo' }).first());
    await expect.poll(stored, { timeout: SOON }).toEqual(before);
  });
});
