import { frequencyOf, midiOf } from '@pegwell/shared/music/pitch';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { person, PHONE, seriousProblems, startBrowser } from './browser';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';
import { plucked, waveFile } from './wave';

const hertz = (pitch: string, cents = 0): number => frequencyOf(midiOf(pitch)) * 2 ** (cents / 1200);
const G = hertz('G3');
const D = hertz('D4');

/** A fiddle brought from GDAE to AEAE by somebody who turns nothing at first, and a wrong peg once. */
const SOUND = plucked([
  1.5,
  ...[0, 1, -1, 0].flatMap((cents) => [{ from: hertz('G3', cents), seconds: 0.7 }, 0.4]),
  { from: hertz('G3', 50), to: hertz('A3', -40), seconds: 1 },
  0.3,
  { from: hertz('A3', -8), to: hertz('A3'), seconds: 0.5 },
  0.3,
  { from: hertz('A3'), seconds: 1.6 },
  2.5,
  { from: D, seconds: 0.7 },
  0.4,
  { from: hertz('A4'), seconds: 0.9 },
  0.4,
  { from: hertz('D4', 40), to: hertz('E4', -30), seconds: 1 },
  0.3,
  { from: hertz('E4'), seconds: 1.6 },
  2,
]);

describe('a fiddle tuned by the phone alone', () => {
  const folder = mkdtempSync(path.join(tmpdir(), 'pegwell-tuner-'));
  let database: SiteDatabase;
  let site: Site;
  let browser: Browser;
  let page: Page;
  beforeAll(async () => {
    const file = path.join(folder, 'fiddle.wav');
    writeFileSync(file, waveFile(SOUND));
    database = await freshDatabase();
    site = await startSite(database.url);
    browser = await startBrowser([
      '--use-fake-ui-for-media-stream',
      '--use-fake-device-for-media-stream',
      `--use-file-for-fake-audio-capture=${file}%noloop`,
    ]);
    ({ page } = await person(browser, site.url, PHONE, 'lamp'));
  });
  afterAll(async () => {
    await browser.close();
    await site.stop();
    await database.drop();
    rmSync(folder, { recursive: true, force: true });
  });

  it('goes from GDAE to AEAE by itself, and says what goes wrong when it does', async () => {
    expect(G).toBeCloseTo(195.998, 3);
    await page.goto('/retune?kind=fiddle&from=GDAE&to=AEAE');
    const heading = page.getByRole('heading', { level: 1 });
    expect(await heading.textContent()).toBe('G peg (4th): up a whole step');
    await page.evaluate(() => {
      const said: string[] = [];
      (window as unknown as { said: string[] }).said = said;
      setInterval(() => {
        const title = document.querySelector('h1')?.textContent ?? '';
        const words = document.querySelector('[aria-label="Tuner"] p')?.textContent ?? '';
        const now = `${title.slice(0, 1)} | ${words.replace(/^\d+ cents/, 'some cents')}`;
        if (said.at(-1) !== now) said.push(now);
      }, 15);
    });
    await page.getByRole('button', { name: 'Listen to my string' }).click();
    await page.getByRole('heading', { name: 'Look, and listen' }).waitFor({ timeout: 40_000 });
    const said = await page.evaluate(() => (window as unknown as { said: string[] }).said);
    const worded = said.filter((each) => !each.endsWith('| '));
    expect(worded).toEqual([
      'G | Pluck the string of the G peg (4th).',
      'G | some cents to go, up',
      'G | The pitch is not moving: are you turning the right peg?',
      'G | some cents to go, up',
      'G | There. Let it ring.',
      'G | In tune.',
      'D | Pluck the string of the D peg (3rd).',
      'D | some cents to go, up',
      'D | That was the string of the A peg (2nd). Pluck the one of the D peg (3rd).',
      'D | some cents to go, up',
      'D | There. Let it ring.',
      'D | In tune.',
    ]);
  });

  it('has nothing serious for axe, at any step', async () => {
    expect(await seriousProblems(page)).toEqual([]);
    await page.goto('/retune?kind=fiddle&from=GDAE&to=AEAC%23');
    await page.getByRole('button', { name: 'Listen to my string' }).click();
    await page.getByRole('region', { name: 'Tuner' }).waitFor();
    expect(await seriousProblems(page)).toEqual([]);
  });
});
