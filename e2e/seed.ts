import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { Circle, Role } from '@pegwell/shared/contract/circles';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import type { APIRequestContext, Page } from 'playwright-core';

/** 44 tunes: titles and tunings of common practice or from memory, a few invented (the file says which). */
export const LIST = path.join(__dirname, 'files', 'old-time-list.csv');

const PASSWORD = 'crooked tunes at dusk';

/** What a journey begins with where the journey is about something later: made through the API. */
export interface Seed {
  readonly circle: Circle;
  readonly session: Session;
  tuneId(title: string): string;
}

async function answerOf<T>(asked: ReturnType<APIRequestContext['post']>): Promise<T> {
  const answer = await asked;
  if (!answer.ok()) throw new Error(`${answer.url()} answered ${answer.status()}: ${await answer.text()}`);
  return (await answer.json()) as T;
}

/** Registers somebody and leaves their browser signed in. */
export async function register(page: Page, name: string): Promise<string> {
  const email = `${name.toLowerCase()}@example.org`;
  await answerOf(
    page.request.post('/api/auth/register', { data: { email, password: PASSWORD, displayName: name } }),
  );
  return email;
}

/** A circle with the 44 tunes and an evening for five fiddles and two banjos, set by set by title. */
export async function seed(host: Page, sets: readonly (readonly string[])[]): Promise<Seed> {
  await register(host, 'Hollis');
  const circle = await answerOf<Circle>(
    host.request.post('/api/circles', { data: { name: 'Ash Ford Circle' } }),
  );
  const home = `/api/circles/${circle.id}`;
  const file = { name: 'list.csv', mimeType: 'text/csv', buffer: readFileSync(LIST) };
  await answerOf(host.request.post(`${home}/tunes/import`, { multipart: { file } }));
  const page = await answerOf<{ items: Tune[] }>(host.request.get(`${home}/tunes?pageSize=200`));
  const tuneId = (title: string) => {
    const tune = page.items.find((each) => each.title === title);
    if (!tune) throw new Error(`the list has no ${title}`);
    return tune.id;
  };
  const planned = await answerOf<Session>(
    host.request.post(`${home}/sessions`, {
      data: {
        title: 'Second Thursday',
        startsAt: '2027-01-14T19:30',
        chairs: [
          { kind: 'fiddle', count: 5 },
          { kind: 'banjo', count: 2 },
        ],
      },
    }),
  );
  const board = {
    version: planned.version,
    sets: sets.map((titles) => ({ entries: titles.map((title) => ({ tuneId: tuneId(title) })) })),
  };
  const session = await answerOf<Session>(
    host.request.put(`/api/sessions/${planned.id}/board`, { data: board }),
  );
  return { circle, session, tuneId };
}

/** Registers somebody else, signed in at their own page, and makes them a member of the circle. */
export async function addMember(
  host: Page,
  page: Page,
  circle: Circle,
  name: string,
  role: Role,
): Promise<void> {
  const email = await register(page, name);
  await answerOf(host.request.post(`/api/circles/${circle.id}/members`, { data: { email, role } }));
}

/** The board as it is stored, in titles. */
export async function storedTitles(page: Page, sessionId: string): Promise<(string | null)[][]> {
  const session = await answerOf<Session>(page.request.get(`/api/sessions/${sessionId}`));
  return session.sets.map((set) => set.entries.map(({ title }) => title));
}
