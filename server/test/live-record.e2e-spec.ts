import type { CirclePlay, Play } from '@pegwell/shared/contract/live';
import { Pool } from 'pg';
import { startApp, type TestApp } from './app';
import { buildEvening, fiddleTunes, type LiveEvening } from './live-evening';

describe('the record of what was played', () => {
  let test: TestApp;
  beforeAll(async () => void (test = await startApp()));
  afterAll(() => test.close());

  const example = () => buildEvening(test, [fiddleTunes('GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE')]);
  const plays = async ({ host, session }: LiveEvening) => {
    const { body } = await host.caller.get(`/api/sessions/${session.id}/plays`).expect(200);
    return (body as { items: Play[] }).items;
  };
  const titles = async (evening: LiveEvening) => (await plays(evening)).map(({ title }) => title);
  const ofCircle = async ({ host, circleId }: LiveEvening, query: object = {}) => {
    const { body } = await host.caller.get(`/api/circles/${circleId}/plays`).query(query).expect(200);
    return body as { items: CirclePlay[]; total: number };
  };
  /** As if this many seconds had passed since the last step. */
  const passTime = async ({ session }: LiveEvening, seconds: number) => {
    const pool = new Pool({ connectionString: test.env.DATABASE_URL });
    await pool.query(
      `update plays set called_at = called_at - make_interval(secs => $2),
         playing_at = playing_at - make_interval(secs => $2), ended_at = ended_at - make_interval(secs => $2)
       where session_id = $1`,
      [session.id, seconds],
    );
    await pool.end();
  };

  it('is empty before the start', async () => {
    const evening = await example();
    expect(await plays(evening)).toEqual([]);
    expect(await ofCircle(evening)).toMatchObject({ items: [], total: 0 });
  });

  it('writes down each tune with its times: called, in tune, ended', async () => {
    const evening = await example();
    const { startedAt } = await evening.step('start');
    const called = await evening.step('next');
    const retuned = await evening.step('retuned');
    const next = await evening.step('next');
    const finished = await evening.step('finish');
    expect(await plays(evening)).toMatchObject([
      {
        entryId: evening.order[0],
        title: 'Tune 1',
        key: 'A',
        mode: 'major',
        tunings: { fiddle: 'GDAE' },
        calledAt: startedAt,
        playingAt: startedAt,
        endedAt: called.stepAt,
      },
      {
        calledAt: called.stepAt,
        playingAt: retuned.stepAt,
        endedAt: next.stepAt,
        tunings: { fiddle: 'AEAE' },
      },
      // Finished from tuning: nobody said when the room was in tune.
      { calledAt: next.stepAt, playingAt: null, endedAt: finished.finishedAt },
    ]);
  });

  it('leaves out a tune that was stepped back from before anybody was in tune', async () => {
    const evening = await example();
    const { startedAt } = await evening.step('start');
    await evening.step('next');
    await passTime(evening, 120);
    await evening.step('back');
    expect(await titles(evening)).toEqual(['Tune 1']);
    // The first tune goes on: it was played once, without a gap.
    const [play] = await plays(evening);
    expect(play?.endedAt).toBeNull();
    expect(Date.parse(play!.calledAt)).toBe(Date.parse(startedAt!) - 120_000);
  });

  it('leaves out a tune that was called by mistake and stepped back from at once', async () => {
    const evening = await buildEvening(test, [fiddleTunes('GDAE', 'GDAE', 'GDAE')]);
    await evening.step('start');
    await evening.step('next');
    await evening.step('back');
    expect(await titles(evening)).toEqual(['Tune 1']);
    // Once it was played for a while, going back plays the earlier one again.
    await evening.step('next');
    await passTime(evening, 31);
    await evening.step('back');
    expect(await titles(evening)).toEqual(['Tune 1', 'Tune 2', 'Tune 1']);
  });

  it('stays true when tunes change and go', async () => {
    const evening = await example();
    await evening.step('start');
    await evening.step('next');
    const [first] = (await evening.read()).sets[0]!.entries;
    const tune = `/api/circles/${evening.circleId}/tunes/${first!.tuneId}`;
    await evening.host.caller.patch(tune).send({ title: 'Another name', key: 'D' }).expect(200);
    await evening.host.caller.delete(tune).expect(204);
    expect((await plays(evening))[0]).toMatchObject({ title: 'Tune 1', key: 'A' });
  });

  it('is read by circle, newest first, page by page, with whose evening it was', async () => {
    const evening = await example();
    for (const action of ['start', 'next', 'next']) await evening.step(action);
    const { items, total } = await ofCircle(evening, { pageSize: 2 });
    expect(total).toBe(3);
    expect(items.map(({ title }) => title)).toEqual(['Tune 3', 'Tune 2']);
    expect(items[0]?.session).toEqual({
      title: 'An evening',
      startsAt: evening.session.startsAt,
      timeZone: 'Europe/Berlin',
    });
    const second = await ofCircle(evening, { pageSize: 2, page: 2 });
    expect(second.items.map(({ title }) => title)).toEqual(['Tune 1']);
    await evening.host.caller.delete(`/api/sessions/${evening.session.id}`).expect(204);
    expect(await ofCircle(evening)).toMatchObject({ items: [], total: 0 });
  });
});
