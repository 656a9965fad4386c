import type { Page } from 'playwright-core';
import type { Session, SessionSummary } from '@pegwell/shared/contract/sessions';
import type { Me } from '@pegwell/shared/contract/accounts';
import { DEMO_HOST, DEMO_PASSWORD } from '../server/src/demo/people';

/** A page of the application as somebody sees it. */
export interface SeenPage {
  /** Names the picture's file. */
  readonly name: string;
  readonly path: string;
  /** A phone page: no account, lamp by default. */
  readonly phone?: boolean;
  /** What is done there before it is looked at. */
  readonly doing?: (page: Page) => Promise<void>;
}

/** Signs the demo's host in; from then on the browser's cookie says who it is. */
export async function signInHost(page: Page): Promise<void> {
  const answer = await page.request.post('/api/auth/login', {
    data: { email: DEMO_HOST.email, password: DEMO_PASSWORD },
  });
  if (!answer.ok()) throw new Error('the demo has no host');
}

interface DemoPlaces {
  readonly circleId: string;
  readonly coming: Session;
  readonly past: Session;
  readonly tuneId: string;
}

/** Where the demo's things are; `page` is the host's. */
export async function demoPlaces(page: Page): Promise<DemoPlaces> {
  const get = async <T>(path: string) => (await (await page.request.get(path)).json()) as T;
  const me = await get<Me>('/api/auth/me');
  const circleId = me.circles[0]?.id ?? '';
  const evenings = await get<{ items: SessionSummary[] }>(`/api/circles/${circleId}/sessions`);
  const find = (status: string) => evenings.items.find((each) => each.status === status)?.id ?? '';
  const tunes = await get<{ items: { id: string }[] }>(
    `/api/circles/${circleId}/tunes?kind=fiddle&tuning=AEAE`,
  );
  return {
    circleId,
    coming: await get<Session>(`/api/sessions/${find('planned')}`),
    past: await get<Session>(`/api/sessions/${find('finished')}`),
    tuneId: tunes.items[0]?.id ?? '',
  };
}

/** Every page, in the order of a first visit. Those after `console` need the evening to run. */
export function pagesOf({ circleId, coming, past, tuneId }: DemoPlaces): readonly SeenPage[] {
  const circle = `/c/${circleId}`;
  const board = `${circle}/evenings/${coming.id}`;
  return [
    { name: 'home', path: '/' },
    { name: 'account', path: '/account' },
    {
      name: 'account-delete',
      path: '/account',
      doing: async (page) => page.getByRole('button', { name: 'Delete my account …' }).click(),
    },
    { name: 'evenings', path: `${circle}/evenings` },
    { name: 'evening-new', path: `${circle}/evenings/new` },
    { name: 'board', path: board },
    {
      name: 'suggestion',
      path: board,
      doing: async (page) => {
        await page.getByRole('button', { name: 'Suggest an order' }).click();
        await page.getByRole('button', { name: 'Take this order' }).waitFor();
      },
    },
    { name: 'card-menu', path: board, doing: openCardMenu },
    {
      name: 'must-come-before',
      path: board,
      doing: async (page) => {
        await openCardMenu(page);
        await page.getByRole('menuitem', { name: 'Must come before …' }).click();
        await page.getByRole('button', { name: 'Keep it so' }).waitFor();
      },
    },
    { name: 'racks', path: `${board}/racks` },
    {
      name: 'racks-add',
      path: `${board}/racks`,
      doing: async (page) => page.getByRole('button', { name: 'Add a player' }).click(),
    },
    { name: 'racks-none', path: `${circle}/evenings/${past.id}/racks` },
    { name: 'board-past', path: `${circle}/evenings/${past.id}` },
    { name: 'tunes', path: `${circle}/tunes` },
    { name: 'tunes-none', path: `${circle}/tunes?search=nothing+like+this` },
    { name: 'tune', path: `${circle}/tunes/${tuneId}` },
    { name: 'tune-edit', path: `${circle}/tunes/${tuneId}/edit` },
    { name: 'tune-new', path: `${circle}/tunes/new` },
    { name: 'import', path: `${circle}/tunes/import` },
    { name: 'tunings', path: `${circle}/tunings` },
    { name: 'people', path: `${circle}/people` },
    { name: 'record', path: `${circle}/record` },
    { name: 'nowhere', path: `${circle}/nowhere` },
    { name: 'console', path: `${board}/live` },
  ];
}

/** What a stranger and a phone see. */
export function openPagesOf({ coming }: DemoPlaces): readonly SeenPage[] {
  return [
    { name: 'sign-in', path: '/sign-in' },
    { name: 'register', path: '/register' },
    { name: 'forgot', path: '/forgot' },
    { name: 'reset', path: '/reset#a-token' },
    { name: 'reset-part', path: '/reset' },
    { name: 'confirm', path: '/confirm#a-token' },
    { name: 'code', path: '/f', phone: true },
    { name: 'follow-unknown', path: '/f/ZZZZZZZZ', phone: true },
    { name: 'follow-choose', path: `/f/${coming.code}`, phone: true },
    { name: 'follow', path: `/f/${coming.code}`, phone: true, doing: chooseFiddle },
    { name: 'room', path: `/f/${coming.code}/room`, phone: true },
    { name: 'retune', path: '/retune?kind=fiddle&from=GDAE&to=AEAE', phone: true },
    { name: 'retune-guitar', path: '/retune?kind=guitar&from=EADGBE&to=DADGAD', phone: true },
    { name: 'retune-there', path: '/retune?kind=fiddle&from=GDAE&to=GDAE', phone: true },
  ];
}

/** Of the second tune, which has one before it to be put together with. */
async function openCardMenu(page: Page): Promise<void> {
  await page
    .getByRole('button', { name: /^What to do with/ })
    .nth(1)
    .click();
  await page.getByRole('menuitem', { name: 'Must come before …' }).waitFor();
}

async function chooseFiddle(page: Page): Promise<void> {
  const fiddle = page.getByRole('button', { name: 'Fiddle' });
  if (await fiddle.isVisible().catch(() => false)) await fiddle.click();
}

/** Starts the coming evening and takes it to its third tune. */
export async function runEvening(page: Page, { coming }: DemoPlaces): Promise<void> {
  for (const action of ['start', 'next', 'retuned', 'next']) {
    await page.request.post(`/api/sessions/${coming.id}/live`, { data: { action } });
  }
}

/** Waits until nothing is on its way and the fonts are there. */
export async function settled(page: Page): Promise<void> {
  await page.waitForLoadState('networkidle').catch(() => undefined);
  await page.evaluate(() => document.fonts.ready);
  await page.waitForTimeout(150);
}

export type { DemoPlaces };
