import { randomUUID } from 'node:crypto';
import type { LiveState } from '@pegwell/shared/contract/live';
import { startApp, type TestApp } from './app';
import { buildAccount, buildMember } from './build';
import { buildEvening, fiddleTunes, type LiveEvening } from './live-evening';

// Worked example 1 of score.md: one fiddle, opening GDAE.
const EXAMPLE = ['GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE'];

describe('the host’s console', () => {
  let test: TestApp;
  beforeAll(async () => void (test = await startApp()));
  afterAll(() => test.close());

  const example = () => buildEvening(test, [fiddleTunes(...EXAMPLE)]);
  const post = (evening: LiveEvening, body: object, person = evening.host) =>
    person.caller.post(`/api/sessions/${evening.session.id}/live`).send(body);
  const refused = async (evening: LiveEvening, body: object) => {
    const { body: problem } = await post(evening, body).expect(422);
    return problem as { code: string; detail: string; errors?: { path: string }[] };
  };

  it('is planned before the start, and says who may see it', async () => {
    const evening = await example();
    const state = await evening.host.caller.get(`/api/sessions/${evening.session.id}/live`).expect(200);
    expect(state.body).toEqual({
      sessionId: evening.session.id,
      liveVersion: 0,
      status: 'planned',
      nowEntryId: null,
      phase: null,
      startedAt: null,
      stepAt: null,
      finishedAt: null,
      called: [],
      followUrl: `${test.env.PEGWELL_URL}/f/${evening.session.code}`,
    });
  });

  it('takes a whole evening, and each step shows in the session', async () => {
    const evening = await example();
    const { order } = evening;
    const started = await evening.step('start');
    expect(started).toMatchObject({ status: 'live', liveVersion: 1, nowEntryId: order[0], phase: 'playing' });
    expect(started.startedAt).toBe(started.stepAt);
    expect(await evening.step('next')).toMatchObject({ nowEntryId: order[1], phase: 'tuning' });
    expect(await evening.step('retuned')).toMatchObject({ nowEntryId: order[1], phase: 'playing' });
    expect(await evening.read()).toMatchObject({
      status: 'live',
      nowEntryId: order[1],
      called: order.slice(0, 2),
      inForce: { fiddle: 'AEAE' },
      // What is left, from AEAE: two pegs down to GDAE, one to ADAE, one to AEAE.
      score: { pegChanges: 4, retuneStops: 3 },
    });
    for (const entryId of order.slice(2)) {
      expect(await evening.step('next')).toMatchObject({ nowEntryId: entryId, phase: 'tuning' });
    }
    const finished = await evening.step('finish');
    expect(finished).toMatchObject({ status: 'finished', nowEntryId: null, phase: null, called: order });
    expect(finished.finishedAt).toBe(finished.stepAt);
    expect(finished.liveVersion).toBe(7);
  });

  it('goes anywhere and back, from the tunings in force', async () => {
    const evening = await example();
    const { order } = evening;
    await evening.step('start');
    await evening.step('goto', { entryId: order[4] });
    await evening.step('retuned');
    const back = await evening.step('back');
    expect(back).toMatchObject({
      nowEntryId: order[3],
      phase: 'tuning',
      called: [order[0], order[4], order[3]],
    });
    // Back from tuning: to the tune before the step, and nobody turns.
    expect(await evening.step('back')).toMatchObject({ nowEntryId: order[4], phase: 'playing' });
    expect(await evening.read()).toMatchObject({ inForce: { fiddle: 'AEAE' } });
  });

  it('refuses what cannot be from here, each with a sentence', async () => {
    const evening = await example();
    const { order } = evening;
    for (const action of ['next', 'back', 'retuned', 'finish']) {
      const problem = await refused(evening, { action });
      expect(problem).toMatchObject({ code: 'live-impossible' });
      expect(problem.detail).toMatch(/has not started/);
    }
    await evening.step('start');
    expect((await refused(evening, { action: 'back' })).detail).toMatch(/first tune/);
    const unknown = await refused(evening, { action: 'goto', entryId: randomUUID() });
    expect(unknown).toMatchObject({ code: 'cannot-be', errors: [{ path: 'entryId' }] });
    await evening.step('goto', { entryId: order[4] });
    expect((await refused(evening, { action: 'next' })).detail).toMatch(/last tune/);
    await evening.step('finish');
    for (const action of ['start', 'next', 'back', 'retuned']) {
      expect((await refused(evening, { action })).detail).toMatch(/is finished/);
    }
    await post(evening, { action: 'goto' }).expect(400);
    await post(evening, { action: 'dance' }).expect(400);
    await post(evening, { action: 'next', surprise: 1 }).expect(400);
  });

  it('has nothing to start where there is no tune', async () => {
    const evening = await buildEvening(test, []);
    expect(await refused(evening, { action: 'start' })).toMatchObject({ code: 'live-impossible' });
  });

  it('leaves the state unchanged by start on a running evening and finish on a finished one', async () => {
    const evening = await example();
    const started = await evening.step('start');
    expect(await evening.step('start')).toEqual(started);
    const finished = await evening.step('finish');
    expect(await evening.step('finish')).toEqual(finished);
  });

  it('gives a repeated action its first answer again, however old its version is by then', async () => {
    const evening = await example();
    await evening.step('start');
    const step = { action: 'next', actionId: randomUUID(), liveVersion: 1 };
    const first = (await post(evening, step).expect(200)).body as LiveState;
    expect(first).toMatchObject({ liveVersion: 2, nowEntryId: evening.order[1] });
    await evening.step('next');
    expect((await post(evening, step).expect(200)).body).toEqual(first);
    expect(await evening.step('start')).toMatchObject({ liveVersion: 3, nowEntryId: evening.order[2] });
  });

  it('takes a step that is sent twice at once only once', async () => {
    const evening = await example();
    await evening.step('start');
    const step = { action: 'next', actionId: randomUUID() };
    const answers = await Promise.all([post(evening, step), post(evening, step)]);
    expect(answers.map(({ status }) => status)).toEqual([200, 200]);
    expect(answers[1].body).toEqual(answers[0].body);
    expect(await evening.step('start')).toMatchObject({ liveVersion: 2, nowEntryId: evening.order[1] });
  });

  it('answers an old version with 409 and the state, and a host goes on from there', async () => {
    const evening = await example();
    await evening.step('start');
    const moved = await evening.step('next', { liveVersion: 1 });
    const step = { action: 'next', actionId: randomUUID(), liveVersion: 1 };
    const { body } = await post(evening, step).expect(409);
    expect(body).toMatchObject({ code: 'changed', current: moved });
    // A refused step was not taken: the same action may be sent again from the new state.
    await post(evening, { ...step, liveVersion: 2 }).expect(200);
  });

  it('lets host and cohost run it, and players only look', async () => {
    const evening = await example();
    const circle = (await evening.host.caller.get(`/api/circles/${evening.circleId}`)).body as never;
    const cohost = await buildMember(test, circle, evening.host, 'cohost');
    const player = await buildMember(test, circle, evening.host, 'player');
    const elsewhere = await buildAccount(test);
    await post(evening, { action: 'start' }, player).expect(403);
    await post(evening, { action: 'start' }, elsewhere).expect(404);
    await test
      .caller()
      .post(`/api/sessions/${evening.session.id}/live`)
      .send({ action: 'start' })
      .expect(401);
    await post(evening, { action: 'start' }, cohost).expect(200);
    await player.caller.get(`/api/sessions/${evening.session.id}/live`).expect(200);
    await elsewhere.caller.get(`/api/sessions/${evening.session.id}/live`).expect(404);
  });

  it('keeps called entries at their places on the board', async () => {
    const evening = await example();
    await evening.step('start');
    await evening.step('next');
    const session = await evening.read();
    const [set] = session.sets;
    const entries = set!.entries.map(({ id }) => ({ id }));
    const put = (order: object[]) =>
      evening.host.caller
        .put(`/api/sessions/${session.id}/board`)
        .send({ version: session.version, sets: [{ id: set!.id, title: set!.title, entries: order }] });
    const [first, second, ...rest] = entries;
    await put([second!, first!, ...rest]).expect(422);
    await put([first!, second!, ...rest.reverse()]).expect(200);
  });

  it('goes with its evening', async () => {
    const evening = await example();
    await evening.step('start');
    await evening.host.caller.delete(`/api/sessions/${evening.session.id}`).expect(204);
    await post(evening, { action: 'next' }).expect(404);
    await test.caller().get(`/api/follow/${evening.session.code}`).expect(404);
  });
});
