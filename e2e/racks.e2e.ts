import type { ScoreAnswer } from '@pegwell/shared/contract/ordering';
import type { Session } from '@pegwell/shared/contract/sessions';
import { builtInKind, standardPitches, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { parseTuning, showTuning } from '@pegwell/shared/music/tuning';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { planRack, type RackPlan, type RackTune } from '../server/src/ordering/engine/rack';
import { LAPTOP, person, PHONE, startBrowser } from './browser';
import { addMember, seed, type Seed } from './seed';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';

const fiddle = builtInKind('fiddle')!;

describe('a player with two fiddles', () => {
  let database: SiteDatabase;
  let site: Site;
  let browser: Browser;
  let host: Page;
  let player: Page;
  let seeded: Seed;
  let plan: RackPlan;
  beforeAll(async () => {
    database = await freshDatabase();
    site = await startSite(database.url);
    browser = await startBrowser();
    ({ page: host } = await person(browser, site.url, LAPTOP));
    ({ page: player } = await person(browser, site.url, PHONE, 'lamp'));
    seeded = await seed(host, [
      ["Soldier's Joy", 'June Apple', 'Angeline the Baker', 'Greasy Coat', 'Sandy River Belle'],
      ['Cluck Old Hen', 'Forked Deer', 'Camp Chase', 'Big Sciota'],
    ]);
    await addMember(host, player, seeded.circle, 'Mara', 'player');
    plan = await planned(host, seeded.session.id);
  });
  afterAll(async () => {
    await browser.close();
    await site.stop();
    await database.drop();
  });

  it('is written down by a host, who sees at once what the second one saves', async () => {
    await host.goto(`/c/${seeded.circle.id}/evenings/${seeded.session.id}`);
    await host.getByRole('link', { name: 'Instruments' }).click();
    await host.getByRole('heading', { name: 'Nobody is down with instruments of their own' }).waitFor();
    await host.getByRole('button', { name: 'Add a player' }).click();
    await host.getByRole('textbox', { name: 'Player' }).fill('Mara');
    await host.getByLabel('Fiddle 2 comes').selectOption('tuned to what the plan says');
    await host.getByRole('button', { name: 'Add and see the plan' }).click();
    await shows(host);
    // What a second fiddle is for.
    expect(plan.cost.pegChanges).toBeLessThan(plan.alone.pegChanges);
  });

  it('reads on a phone which to play for which tune, and what to turn when', async () => {
    await player.goto(`/c/${seeded.circle.id}/evenings/${seeded.session.id}/racks`);
    await shows(player);
    expect(await player.getByRole('button', { name: /Add a player|Change|Take out/ }).count()).toBe(0);
  });

  it('sees another plan once the order on the board is another', async () => {
    const session = await sessionOf(host, seeded.session.id);
    const sets = session.sets.map(({ id, entries }) => ({
      id,
      entries: [...entries].reverse().map((entry) => ({ id: entry.id })),
    }));
    const answer = await host.request.put(`/api/sessions/${session.id}/board`, {
      data: { version: session.version, sets },
    });
    expect(answer.ok()).toBe(true);
    plan = await planned(host, session.id);
    await player.reload();
    await shows(player);
  });

  /** The page says what the engine says, read apart from the page: figures, what to bring, instruments, turns. */
  async function shows(page: Page): Promise<void> {
    const mara = page.getByRole('region', { name: /^Mara two fiddles/ });
    await mara.waitFor();
    const { cost, alone } = plan;
    expect(await mara.getByRole('definition').allInnerTexts()).toEqual([
      String(cost.pegChanges),
      String(cost.stops),
    ]);
    const terms = (await mara.getByRole('term').allInnerTexts()).join(' ');
    expect(terms).toContain(`instead of ${alone.pegChanges}`);
    const bring = mara.getByRole('region', { name: 'Before you come' });
    expect(await bring.getByRole('img').allInnerTexts()).toEqual(
      plan.bring.map((pitches) => (pitches ? showTuning(fiddle, pitches) : '')),
    );
    const session = await sessionOf(page, seeded.session.id);
    const entries = session.sets.flatMap((set) => set.entries);
    const told = await page.evaluate(() =>
      [...document.querySelectorAll('section section > ol > li')].map((step) => {
        const badges = [...step.querySelectorAll('[data-state]')].map(
          (badge) => badge.lastChild?.textContent,
        );
        return { turning: step.querySelector('h4') !== null, badges, text: (step as HTMLElement).innerText };
      }),
    );
    const byTune = told
      .filter(({ turning }) => !turning)
      .flatMap(({ badges, text }) =>
        entries
          .filter(({ title }) => text.includes(title ?? '?'))
          .map(({ id }) => [id, Number(badges[0]) - 1]),
      );
    expect(byTune).toEqual(plan.tunes.map(({ id, instrument }) => [id, instrument]));
    const turned = told
      .filter(({ turning }) => turning)
      .flatMap(({ badges }) => badges.map((badge) => Number(badge) - 1));
    expect(turned).toEqual(plan.turns.map(({ instrument }) => instrument));
  }
});

const sessionOf = async (page: Page, id: string): Promise<Session> =>
  (await (await page.request.get(`/api/sessions/${id}`)).json()) as Session;

/** One fiddle as everybody arrives, one free: planned by the engine from what the stateless score announces. */
async function planned(page: Page, sessionId: string): Promise<RackPlan> {
  const session = await sessionOf(page, sessionId);
  const entries = session.sets.flatMap((set) => set.entries);
  const body = {
    chairs: session.chairs,
    openings: session.openings,
    tunes: entries.map(({ id, key, mode, rhythm, tunings }) => ({
      ...{ id, key, mode, rhythm },
      tunings: tunings.map(({ kind, accepted }) => ({
        kind,
        accepted: accepted.map(({ tuning, capo }) => ({ tuning, capo })),
      })),
    })),
    sets: session.sets.map((set) => set.entries.map(({ id }) => id)),
  };
  const answer = (await (await page.request.post('/api/score', { data: body })).json()) as ScoreAnswer;
  const tunes = answer.places.map(({ before, offClock, kinds }): RackTune => {
    const accepted = entries.find(({ id }) => id === before)?.tunings.find(({ kind }) => kind === 'fiddle');
    const said = accepted?.accepted.some(({ tuning }) => tuning !== 'any') ?? false;
    const to = kinds.find(({ kind }) => kind === 'fiddle')?.to ?? '';
    return { id: before, offClock, announced: said ? readAs(fiddle, to) : null };
  });
  const made = planRack({ kind: fiddle, starts: [standardPitches(fiddle), null], tunes });
  if (!made.ok) throw new Error(made.reason);
  return made.value;
}

function readAs(kind: InstrumentKind, text: string) {
  const tuned = parseTuning(kind, text);
  if (!tuned.ok) throw new Error(tuned.reason);
  return tuned.value;
}
