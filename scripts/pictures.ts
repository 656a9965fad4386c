// Every page's picture, in both lights, on a laptop and on a phone, into pictures/ (which git ignores).
import { mkdirSync, rmSync } from 'node:fs';
import path from 'node:path';
import type { Browser } from 'playwright-core';
import { LAPTOP, person, PHONE, startBrowser, type Light } from '../e2e/browser';
import {
  demoPlaces,
  openPagesOf,
  pagesOf,
  runEvening,
  settled,
  signInHost,
  type SeenPage,
} from '../e2e/pages';
import { freshDatabase, startSite } from '../e2e/site';
import { findBrowser } from './browser';
import { build } from './build';
import { inRoot } from './places';
import { say, Sentence } from './sentence';
import { throwawayDatabase } from './throwaway-database';

const FOLDER = inRoot('pictures');
const SIZES = { laptop: LAPTOP, phone: PHONE } as const;
const LIGHTS: readonly Light[] = ['day', 'lamp'];

/** @param only names of pages; none is all of them */
export async function pictures(only: readonly string[]): Promise<number> {
  for (const workspace of ['shared', 'server', 'client'] as const) {
    if ((await build(workspace, 'show')) !== 0) throw new Sentence(`${workspace} does not build; see above.`);
  }
  await findBrowser();
  process.env['PEGWELL_TEST_DATABASE_URL'] ??= await throwawayDatabase();
  if (only.length === 0) rmSync(FOLDER, { recursive: true, force: true });
  mkdirSync(FOLDER, { recursive: true });
  const database = await freshDatabase();
  const site = await startSite(database.url, { demo: true });
  const browser = await startBrowser();
  try {
    const { page } = await person(browser, site.url);
    await signInHost(page);
    const places = await demoPlaces(page);
    const wanted = (pages: readonly SeenPage[]) =>
      pages.filter(({ name }) => only.length === 0 || only.includes(name));
    await take(browser, site.url, wanted(pagesOf(places)), '', signInHost);
    await take(browser, site.url, wanted(openPagesOf(places)), '');
    await runEvening(page, places);
    const live = (pages: readonly SeenPage[]) =>
      wanted(pages).filter(({ name }) => ['board', 'console', 'follow', 'room'].includes(name));
    await take(browser, site.url, live(pagesOf(places)), '-live', signInHost);
    await take(browser, site.url, live(openPagesOf(places)), '-live');
  } finally {
    await browser.close();
    await site.stop();
    await database.drop();
  }
  return 0;
}

async function take(
  browser: Browser,
  siteUrl: string,
  pages: readonly SeenPage[],
  suffix: string,
  signIn?: typeof signInHost,
): Promise<void> {
  for (const light of LIGHTS) {
    for (const [size, viewport] of Object.entries(SIZES)) {
      const { context, page } = await person(browser, siteUrl, viewport, light);
      if (signIn) await signIn(page);
      for (const seen of pages) {
        await page.goto(seen.path);
        await settled(page);
        await seen.doing?.(page);
        await settled(page);
        const file = path.join(FOLDER, `${seen.name}${suffix}-${light}-${size}.png`);
        await page.screenshot({ path: file, fullPage: true });
        say(path.relative(inRoot(), file));
      }
      await context.close();
    }
  }
}
