import type { Circle } from '@pegwell/shared/contract/circles';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { LAPTOP, person, startBrowser } from './browser';
import { register } from './seed';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';

const TUNES = 4_000;
const SOON = 60_000;

describe('a server that is killed in the middle of an import', () => {
  let database: SiteDatabase;
  let site: Site;
  let browser: Browser;
  let page: Page;
  beforeAll(async () => {
    database = await freshDatabase();
    site = await startSite(database.url);
    browser = await startBrowser();
    ({ page } = await person(browser, site.url, LAPTOP));
  });
  afterAll(async () => {
    await browser.close();
    await site.stop();
    await database.drop();
  });

  it('keeps nothing of it; the page asks again, and every tune is there once', async () => {
    await register(page, 'Hollis');
    const made = await page.request.post('/api/circles', { data: { name: 'Ash Ford' } });
    const { id } = (await made.json()) as Circle;
    const total = async () => {
      const answer = await page.request.get(`/api/circles/${id}/tunes?pageSize=1`);
      return ((await answer.json()) as { total: number }).total;
    };
    await page.goto(`/c/${id}/tunes/import`);
    const rows = Array.from({ length: TUNES }, (_, nth) => `Tune ${nth},A,reel,AEAE or GDAE`);
    const buffer = Buffer.from(['title,key,rhythm,fiddle', ...rows].join('\n'));
    await page.getByLabel('Choose a file').setInputFiles({ name: 'tunes.csv', mimeType: 'text/csv', buffer });
    await page.getByRole('button', { name: 'Import 4000 tunes' }).click({ timeout: SOON });
    // Some are written, in a transaction that is still open.
    await page.getByText(/^[1-3],?\d00 of 4,000 tunes written$/).waitFor({ timeout: SOON });
    await site.kill();
    await page.getByText(/^The connection broke\. The import goes on/).waitFor({ timeout: SOON });
    site = await startSite(database.url, { port: Number(new URL(site.url).port) });
    expect(await total()).toBe(0);
    await page.getByText('4,000 added, 0 changed, 0 unchanged, 0 left out.').waitFor({ timeout: SOON });
    expect(await total()).toBe(TUNES);
  }, 240_000);
});
