import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { ScoreAnswer } from '@pegwell/shared/contract/ordering';
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
    await host.getByText(`${tunes} added, 0 changed, 0 unchanged, 0 left out.`).waitFor();
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
        // The list has settled on what was typed: nothing moves under the hand any more.
        await expect.poll(() => host.locator('aside li').count(), { timeout: 20_000 }).toBe(1);
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
    await host.getByText(/^No order of these tunes turns fewer pegs: proved/).waitFor();
    await host.getByText(`${before.score.pegChanges} peg changes as you have it`).waitFor();
    await host.getByRole('button', { name: 'Take this order' }).click();
    await host.getByRole('button', { name: 'Suggest an order' }).waitFor();
    await expect
      .poll(async () => (await session()).version, { timeout: 20_000 })
      .toBeGreaterThan(before.version);
    const after = await session();
    expect(after.score.pegChanges).toBeLessThan(before.score.pegChanges);
    const ids = (each: Session) => each.sets.flatMap((set) => set.entries.map(({ id }) => id));
    expect(ids(after).sort()).toEqual(ids(before).sort());
    expect(after.sets.map((set) => set.entries.length)).toEqual([4, 5]);
  });

  it('runs the evening, and a phone shows its own instrument what to turn after every step', async () => {
    const evening = await session();
    const expected = await turnsOf(host, evening);
    const titles = evening.sets.flatMap((set) => set.entries.map(({ title }) => title ?? ''));
    await host.getByRole('link', { name: 'Run the evening' }).click();
    await host.getByRole('button', { name: 'Start the evening' }).waitFor();

    await phone.goto(`/f/${evening.code}`);
    await phone.getByRole('button', { name: 'Fiddle', exact: true }).click();
    await phone.getByRole('heading', { name: new RegExp(`^${titles[0]}`) }).waitFor();
    await phoneShows(null, 0);

    await host.getByRole('button', { name: 'Start the evening' }).click();
    for (let at = 0; at < titles.length; at++) {
      if (at > 0) await host.getByRole('button', { name: /^Next/ }).click();
      await phoneShows(at, at + 1);
      const tuned = host.getByRole('button', { name: 'Everyone is in tune' });
      if (await tuned.isVisible()) {
        await tuned.click();
        await tuned.waitFor({ state: 'detached' });
        await phone.getByText('Playing now', { exact: true }).waitFor({ timeout: TWO_POLLS });
      }
    }
    await host.getByRole('button', { name: 'Finish the evening' }).click();
    await host.getByRole('button', { name: 'Finish', exact: true }).click();
    await phone.getByText('This evening is over.').first().waitFor({ timeout: TWO_POLLS });

    /** Within two polls: the tune that is now with its letters, and what is turned for the next, peg by peg. */
    async function phoneShows(now: number | null, next: number): Promise<void> {
      if (now !== null) {
        const section = phone.getByRole('region', { name: 'Now' });
        await section.getByRole('heading', { name: titles[now] }).waitFor({ timeout: TWO_POLLS });
        expect((await section.locator('[role=img] b').allInnerTexts()).join('')).toBe(expected[now]?.to);
      }
      if (next >= titles.length) return;
      const section = phone.getByRole('region', { name: now === null ? 'First' : 'Next' });
      await section
        .getByRole('heading', { name: new RegExp(`^${titles[next]},`) })
        .waitFor({ timeout: TWO_POLLS });
      const words = expected[next]?.words ?? [];
      if (words.length === 0) expect(await section.innerText()).toContain('stay as you are');
      else expect(await section.locator('ol').first().locator('li').allInnerTexts()).toEqual(words);
    }
  });

  it('remembers what was played', async () => {
    await host.getByRole('link', { name: 'Record', exact: true }).click();
    await host.getByText('Second Thursday').first().waitFor();
  });

  it('downloads the set sheet', async () => {
    await host.goBack();
    await host.getByRole('link', { name: 'Evenings' }).click();
    await host
      .getByRole('link', { name: /Second Thursday/ })
      .first()
      .click();
    const id = /evenings\/([0-9a-f-]{36})/.exec(host.url())?.[1];
    await host.getByRole('button', { name: 'Sheet' }).click();
    await host.getByRole('menuitem', { name: /A4/ }).waitFor();
    const sheet = await host.request.get(`/api/sessions/${id}/sheet.pdf?paper=a4`);
    expect(sheet.headers()['content-type']).toBe('application/pdf');
    expect((await sheet.body()).subarray(0, 5).toString()).toBe('%PDF-');
  });

  it('asks nothing of any other host', () => {
    expect(foreign).toEqual([]);
    expect(foreignPhone).toEqual([]);
  });
});

interface Turns {
  /** The short name. */
  readonly to: string | null;
  /** In the order of turning: strings that come down first, then those that go up. */
  readonly words: readonly string[];
}

/** The pegs of a fiddle by their standing names, 4th to 1st string (every violin is built so). */
const PEGS = ['G peg (4th)', 'D peg (3rd)', 'A peg (2nd)', 'E peg (1st)'];
/** Semitones as people say them: 1 is a half step, 2 a whole step. */
const STEPS = ['', 'a half step', 'a whole step', '1½ steps', '2 steps', '2½ steps', '3 steps', '3½ steps'];

/** What the stateless score says of the fiddle, in the test's own words. */
async function turnsOf(page: Page, session: Session): Promise<Turns[]> {
  const entries = session.sets.flatMap((set) => set.entries);
  const body = {
    chairs: session.chairs,
    openings: session.openings,
    tunes: entries.map(({ id, key, mode, rhythm, tunings }) => ({
      id,
      key,
      mode,
      rhythm,
      tunings: tunings.map(({ kind, accepted }) => ({
        kind,
        accepted: accepted.map(({ tuning, capo }) => ({ tuning, capo })),
      })),
    })),
    sets: session.sets.map((set) => set.entries.map(({ id }) => id)),
  };
  const answer = (await (await page.request.post('/api/score', { data: body })).json()) as ScoreAnswer;
  return answer.places.map((place) => {
    const move = place.kinds.find(({ kind }) => kind === 'fiddle');
    if (!move) throw new Error('no fiddle in the room');
    const letters = (name: string | null) => name?.match(/[A-G][#b]?/g) ?? [];
    const turns = move.deltas.flatMap((delta, string) => {
      if (delta === 0) return [];
      const way = `${delta > 0 ? 'up' : 'down'} ${STEPS[Math.abs(delta)]}`;
      const ends = `from ${letters(move.from)[string]} to ${letters(move.to)[string]}`;
      return [{ delta, words: `${PEGS[string]}: ${way}, ${ends}` }];
    });
    const ordered = [...turns.filter(({ delta }) => delta < 0), ...turns.filter(({ delta }) => delta > 0)];
    return { to: move.to, words: ordered.map(({ words }) => words) };
  });
}

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
