import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';

const ROUNDS = 2;
const WRITES = 50;
const AT_ONCE = 5;
/** Answers. */
const KILLED_AFTER = [10, 30];
const TUNE = { title: 'Slack Tide', key: 'D', mode: 'major', tunings: [] };

/** A write that was answered, and how to see that it is there. */
interface Confirmed {
  readonly path: string;
  readonly holds: object;
}

describe('a server that is killed while it writes', () => {
  let database: SiteDatabase;
  let site: Site;
  let cookie = '';
  let home: string;
  beforeAll(async () => {
    database = await freshDatabase();
    site = await startSite(database.url);
    const values = { email: 'host@example.org', password: 'crooked tunes at dusk', displayName: 'Host' };
    const answer = await send('POST', '/api/auth/register', values);
    cookie = answer.headers.getSetCookie()[0]?.split(';')[0] ?? '';
    const circle = (await (await send('POST', '/api/circles', { name: 'Ash Ford Circle' })).json()) as {
      id: string;
    };
    home = `/api/circles/${circle.id}`;
  });
  afterAll(async () => {
    await site.stop();
    await database.drop();
  });

  const send = (method: string, path: string, body?: object) =>
    fetch(`${site.url}${path}`, {
      method,
      headers: { cookie, 'content-type': 'application/json' },
      ...(body && { body: JSON.stringify(body) }),
    });

  async function made(method: string, path: string, body: object): Promise<{ id: string; version: number }> {
    const answer = await send(method, path, body);
    if (!answer.ok) throw new Error(`${path} answered ${answer.status}`);
    return (await answer.json()) as { id: string; version: number };
  }

  /** One of the ways in which a host writes; each on something of its own, so that nothing later covers it. */
  async function write(kind: number, name: string): Promise<Confirmed> {
    const tune = await made('POST', `${home}/tunes`, { ...TUNE, title: name });
    const path = `${home}/tunes/${tune.id}`;
    if (kind === 0) return { path, holds: { title: name } };
    if (kind === 1) {
      await made('PATCH', path, { key: 'A', notes: name });
      return { path, holds: { title: name, key: 'A', notes: name } };
    }
    const session = await made('POST', `${home}/sessions`, { title: name, startsAt: '2027-01-14T19:30' });
    const evening = `/api/sessions/${session.id}`;
    if (kind === 2) return { path: evening, holds: { title: name, status: 'planned' } };
    const sets = [{ entries: [{ tuneId: tune.id }] }];
    const { version } = await made('PUT', `${evening}/board`, { version: session.version, sets });
    if (kind === 3) return { path: evening, holds: { version, sets: [{ entries: [{ tuneId: tune.id }] }] } };
    await made('POST', `${evening}/live`, { action: 'start' });
    return { path: evening, holds: { version, status: 'live' } };
  }

  it(`has everything that it confirmed, ${ROUNDS} times ${WRITES} writes of five kinds`, async () => {
    const port = Number(new URL(site.url).port);
    const confirmed: Confirmed[] = [];
    for (let round = 0; round < ROUNDS; round++) {
      const before = confirmed.length;
      let begun = 0;
      let refused = 0;
      const lane = async () => {
        while (begun < WRITES) {
          const nth = begun++;
          await write(nth % 5, `Round ${round}, write ${nth}`).then(
            (each) => confirmed.push(each),
            () => refused++,
          );
        }
      };
      const lanes = Promise.all(Array.from({ length: AT_ONCE }, lane));
      // Somewhere in the middle, at another write each time.
      while (confirmed.length < before + KILLED_AFTER[round]!)
        await new Promise((resolve) => setTimeout(resolve, 1));
      await site.kill();
      await lanes;
      expect(refused).toBeGreaterThan(0);
      site = await startSite(database.url, { port });
    }
    expect(confirmed.length).toBeGreaterThanOrEqual(10 + 30);
    for (const { path, holds } of confirmed) {
      const answer = await send('GET', path);
      expect([path, answer.status]).toEqual([path, 200]);
      expect(await answer.json()).toMatchObject(holds);
    }
  });
});
