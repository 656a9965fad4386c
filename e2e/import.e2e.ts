import type { Circle } from '@pegwell/shared/contract/circles';
import type { Tune } from '@pegwell/shared/contract/tunes';
import type { Browser, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { LAPTOP, person, PHONE, seriousProblems, startBrowser } from './browser';
import { MESSY_LIST, messyAbc, messyTable } from './messy-files';
import { register } from './seed';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';

const MANY_TABS = 300;

// A host with nothing but a messy ABC file, a spreadsheet and a list has a clean library with tunings; the keyboard
// alone does it.
describe('a library out of messy files', () => {
  let database: SiteDatabase;
  let site: Site;
  let browser: Browser;
  let page: Page;
  let foreign: string[];
  let circle: Circle;
  beforeAll(async () => {
    database = await freshDatabase();
    site = await startSite(database.url);
    browser = await startBrowser();
    ({ page, foreign } = await person(browser, site.url, LAPTOP));
    await register(page, 'Hollis');
    circle = (await (
      await page.request.post('/api/circles', { data: { name: 'Ash Ford' } })
    ).json()) as Circle;
    await page.request.post(`/api/circles/${circle.id}/tunes`, {
      data: { title: 'The Dusty Miller', key: 'G', mode: 'major', rhythm: 'jig', tunings: [] },
    });
    await page.goto(`/c/${circle.id}/tunes/import`);
  });
  afterAll(async () => {
    await browser.close();
    await site.stop();
    await database.drop();
  });

  async function tabTo(locator: Locator): Promise<void> {
    await locator.waitFor();
    for (let presses = 0; presses < MANY_TABS; presses++) {
      if (await locator.evaluate((element) => element === document.activeElement)) return;
      await page.keyboard.press('Tab');
    }
    throw new Error(`${String(locator)} is not reached by Tab`);
  }
  const press = async (locator: Locator, key = 'Enter') => {
    await tabTo(locator);
    await page.keyboard.press(key);
  };
  const button = (name: string | RegExp) => page.getByRole('button', { name, exact: true });
  const upload = async (name: string, buffer: Buffer) => {
    const chooser = page.waitForEvent('filechooser');
    await press(page.getByLabel(/Choose a(nother)? file/), 'Space');
    await (await chooser).setFiles({ name, mimeType: 'text/plain', buffer });
  };
  const library = async (): Promise<readonly Tune[]> => {
    const answer = await page.request.get(`/api/circles/${circle.id}/tunes?pageSize=200`);
    return ((await answer.json()) as { items: Tune[] }).items;
  };
  const fiddleOf = (tunes: readonly Tune[], name: string) =>
    tunes
      .find(({ title }) => title === name)
      ?.tunings.find(({ kind }) => kind === 'fiddle')
      ?.accepted.map(({ tuning }) => tuning);

  it('previews the ABC file: 19 tunes kept, 4 refused, 4 tunings found, 1 likely there already', async () => {
    await upload('all my tunes.abc', messyAbc());
    await button('23 read').waitFor();
    await button('19 new').waitFor();
    await button('4 left out').waitFor();
    await button('4 tunings found').waitFor();
    await button('1 likely there already').waitFor();
    await page.getByText(/it was read as windows-1252/).waitFor();
    expect(await seriousProblems(page)).toEqual([]);
    expect(await library()).toHaveLength(1);
  });

  it('takes what was found, merges what is there, and writes', async () => {
    await press(button('Take all that were found'));
    await page.getByText('4 of 4 taken.').waitFor();
    await press(button('1 likely there already'));
    await tabTo(page.getByLabel('Keep both'));
    await page.keyboard.press('ArrowDown');
    expect(await page.getByLabel('Add what is new to The Dusty Miller (G)').isChecked()).toBe(true);
    expect(await seriousProblems(page)).toEqual([]);
    await press(button('Import 19 tunes'));
    await page.getByText('18 added, 1 changed, 0 unchanged, 4 left out.').waitFor();
    const tunes = await library();
    expect(tunes).toHaveLength(19);
    expect(tunes.map(({ title }) => title)).toEqual(
      expect.arrayContaining([
        "Seán's Mná & Máirtín",
        'Café Réel – l’été',
        'The 50% Reel',
        'Sandy Boys',
        'Apart',
      ]),
    );
    expect(tunes.find(({ title }) => title === 'The Dusty Miller')).toMatchObject({
      ...{ rhythm: 'jig', composer: 'trad', notes: 'Also: Dusty Miller, The' },
    });
    expect(
      ['June Apple', 'Ruffled Drawers', 'Cold Frosty Morning', 'Sandy Boys'].map((one) =>
        fiddleOf(tunes, one),
      ),
    ).toEqual([['AEAE'], ['ADAE'], ['AEAE'], ['AEAE']]);
    expect(fiddleOf(tunes, 'Old Mill')).toBeUndefined();
  });

  it('adds the spreadsheet', async () => {
    await upload('tunes.csv', messyTable());
    await button('6 read').waitFor();
    await press(button('Import 5 tunes'));
    await page.getByText('4 added, 1 changed, 0 unchanged, 1 left out.').waitFor();
    const tunes = await library();
    expect(tunes).toHaveLength(23);
    expect(fiddleOf(tunes, 'Barlow Knife')).toEqual(['GDGD', 'GDAE']);
    expect(fiddleOf(tunes, 'Lantern Hill')).toEqual(['AEAE']);
    expect(tunes.map(({ title }) => title)).toContain('=Sum of Parts');
  });

  it('adds the list, and takes it back as one step', async () => {
    await tabTo(page.getByLabel('Or paste a list'));
    await page.keyboard.insertText(MESSY_LIST);
    await press(button('Read the list'));
    await button('5 read').waitFor();
    await button('1 left out').waitFor();
    await press(button('Take all that were found'));
    await press(button('Import 4 tunes'));
    await page.getByText('4 added, 0 changed, 0 unchanged, 1 left out.').waitFor();
    const tunes = await library();
    expect(tunes).toHaveLength(27);
    expect(fiddleOf(tunes, 'Greasy Coat')).toEqual(['AEAE']);
    await press(button('Undo this import'));
    await page.getByText('Undone: 4 tunes taken out, 0 as before.').waitFor();
    expect(await seriousProblems(page)).toEqual([]);
    expect(await library()).toHaveLength(23);
  });

  it.each(['day', 'lamp'] as const)(
    'fits a phone, with nothing serious to say of it, in %s light',
    async (light) => {
      const { context, page: phone } = await person(browser, site.url, PHONE, light);
      await context.addCookies(await page.context().cookies());
      await phone.goto(`/c/${circle.id}/tunes/import`);
      await phone
        .getByLabel('Choose a file')
        .setInputFiles({ name: 'tunes.abc', mimeType: 'text/plain', buffer: messyAbc() });
      await phone.getByRole('button', { name: '23 read' }).waitFor();
      expect(await seriousProblems(phone)).toEqual([]);
      expect(await phone.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(
        PHONE.width,
      );
      const pictures = process.env['PEGWELL_IMPORT_PICTURES'];
      if (pictures) await phone.screenshot({ path: `${pictures}/phone-${light}.png`, fullPage: true });
      await context.close();
    },
  );

  it('asked nothing of any other host', () => {
    expect(foreign).toEqual([]);
  });
});
