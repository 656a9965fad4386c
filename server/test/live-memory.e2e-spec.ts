import { Client } from 'pg';
import type { Follow } from '@pegwell/shared/contract/live';
import { FollowService } from '../src/live/follow.service';
import { startApp, type TestApp } from './app';
import { migratedDatabase, type TestDatabase } from './database';
import { buildEvening, fiddleTunes, type LiveEvening } from './live-evening';

describe('two server processes on one database', () => {
  let database: TestDatabase;
  let first: TestApp;
  let second: TestApp;
  let admin: Client;
  let evening: LiveEvening;

  beforeAll(async () => {
    database = await migratedDatabase();
    first = await startApp(database);
    second = await startApp(database);
    admin = new Client({ connectionString: database.url });
    await admin.connect();
  });
  afterAll(async () => {
    await admin.end();
    await first.close();
    await second.close();
    await database.drop();
  });
  beforeEach(async () => {
    evening = await buildEvening(first, [fiddleTunes('GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE')]);
  });

  const poll = (server: TestApp, tag?: string) => {
    const asked = server.caller().get(`/api/follow/${evening.session.code}`);
    return tag === undefined ? asked : asked.set('If-None-Match', tag);
  };
  const titleOn = async (server: TestApp) => ((await poll(server).expect(200)).body as Follow).now?.title;
  const wait = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

  /** How often this server reads the evening while something is done. */
  async function readings(server: TestApp, work: () => Promise<unknown>): Promise<number> {
    const service = server.app.get(FollowService);
    const spy = jest.spyOn(service as unknown as { read(): unknown }, 'read');
    await work();
    const { length } = spy.mock.calls;
    spy.mockRestore();
    return length;
  }

  it('a phone on the second sees a step made on the first within two polls', async () => {
    await evening.step('start');
    let tag = (await poll(second).expect(200)).headers['etag'] ?? '';
    for (const title of ['Tune 2', 'Tune 3', 'Tune 4', 'Tune 5']) {
      await evening.step('next');
      const polls: (string | undefined)[] = [];
      for (let number = 0; number < 2; number++) {
        const answer = await poll(second, tag);
        if (answer.status === 200) {
          tag = answer.headers['etag'] ?? '';
          polls.push((answer.body as Follow).now?.title ?? undefined);
        }
        await wait(50);
      }
      expect(polls).toEqual([title]);
    }
  });

  it('whoever took a step sees it with the next question, on the same process', async () => {
    await evening.step('start');
    for (const title of ['Tune 2', 'Tune 3', 'Tune 4', 'Tune 5']) {
      await evening.step('next');
      expect(await titleOn(first)).toBe(title);
    }
  });

  it('answers phones from memory: no reading while nothing changes, one for all after a change', async () => {
    await evening.step('start');
    const { headers } = await poll(second).expect(200);
    const crowd = (status: number) => () =>
      Promise.all(Array.from({ length: 40 }, () => poll(second, headers['etag']).expect(status)));
    expect(await readings(second, crowd(304))).toBe(0);
    await evening.step('next');
    await wait(50);
    expect(await readings(second, crowd(200))).toBe(1);
  });

  it('reads through while it does not hear, and remembers again when it does', async () => {
    await evening.step('start');
    expect(await titleOn(second)).toBe('Tune 1');
    const cut = await admin.query(
      `select pg_terminate_backend(pid) from pg_stat_activity
       where datname = current_database() and application_name = 'pegwell follow'`,
    );
    expect(cut.rowCount).toBe(2);
    await wait(100);
    await evening.step('next');
    expect(await titleOn(second)).toBe('Tune 2');
    expect(
      await readings(second, async () => {
        await titleOn(second);
        await titleOn(second);
      }),
    ).toBe(2);
    // It is tried again every three seconds.
    await wait(3_500);
    await titleOn(second);
    expect(await readings(second, () => titleOn(second))).toBe(0);
    await evening.step('next');
    await wait(50);
    expect(await titleOn(second)).toBe('Tune 3');
  });
});
