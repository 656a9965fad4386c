import { randomUUID } from 'node:crypto';
import type { Circle } from '@pegwell/shared/contract/circles';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { startApp, type TestApp } from './app';
import { buildCircle, buildFiddleTune, buildSession, buildTune, type Person } from './build';

describe('an evening and its board', () => {
  let test: TestApp;
  let circle: Circle;
  let host: Person;
  let tunes: Tune[];
  beforeAll(async () => {
    test = await startApp();
    ({ circle, host } = await buildCircle(test));
    tunes = await Promise.all(
      ['GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE'].map((tuning, index) =>
        buildFiddleTune(host, circle.id, `Tune ${index + 1}`, tuning),
      ),
    );
  });
  afterAll(() => test.close());

  const put = (session: { id: string }, body: object, status = 200) =>
    host.caller.put(`/api/sessions/${session.id}/board`).send(body).expect(status);
  const entries = (...indexes: number[]) => indexes.map((index) => ({ tuneId: tunes[index]?.id }));
  const titles = (session: Session) => session.sets.map((set) => set.entries.map(({ title }) => title));

  it('begins with one fiddle in standard, and a code without letters that are mistaken', async () => {
    const session = await buildSession(host, circle.id);
    expect(session).toMatchObject({
      version: 1,
      status: 'planned',
      chairs: [{ kind: 'fiddle', count: 1 }],
      openings: { fiddle: 'GDAE' },
      goal: 'pegs',
      spacedRhythms: ['waltz', 'air'],
      sets: [],
    });
    expect(session.code).toMatch(/^[2-9A-HJKMNP-Z]{8}$/);
  });

  it('keeps the local start and computes the instant from the circle’s zone', async () => {
    // 14 January 2027 is winter time in Berlin: UTC+1 (IANA tz database, Europe/Berlin).
    const winter = await buildSession(host, circle.id, { startsAt: '2027-01-14T19:30' });
    expect(winter).toMatchObject({
      startsAt: '2027-01-14T18:30:00.000Z',
      localStart: '2027-01-14T19:30',
      timeZone: 'Europe/Berlin',
    });
    const given = await buildSession(host, circle.id, {
      startsAt: '2027-07-01T19:30:00-04:00',
      timeZone: 'America/New_York',
    });
    expect(given).toMatchObject({ startsAt: '2027-07-01T23:30:00.000Z', localStart: '2027-07-01T19:30' });
    const body = { title: 'No such day', startsAt: '2027-02-30T19:30' };
    const answer = await host.caller.post(`/api/circles/${circle.id}/sessions`).send(body).expect(422);
    expect(answer.body).toMatchObject({ errors: [{ path: 'startsAt' }] });
  });

  it('saves, scores (worked example 1) and raises the version', async () => {
    const session = await buildSession(host, circle.id);
    const { body } = await put(session, {
      version: 1,
      sets: [{ title: '', entries: entries(0, 1, 2, 3, 4) }],
    });
    const saved = body as Session;
    expect(saved.version).toBe(2);
    expect(saved.sets[0]?.title).toBe('First set');
    expect(saved.score).toMatchObject({ pegChanges: 6, retuneStops: 4, semitones: 12 });
  });

  it('takes the same board again as a success, however old the version, and refuses an old one with the state', async () => {
    const session = await buildSession(host, circle.id);
    const board = { version: 1, sets: [{ title: 'First', entries: entries(0, 1) }] };
    const first = (await put(session, board)).body as Session;
    expect((await put(session, board)).body).toEqual(first);
    const answer = await put(session, { version: 1, sets: [{ title: 'First', entries: entries(2) }] }, 409);
    expect(answer.body).toMatchObject({ code: 'changed', current: { id: session.id, version: 2 } });
    expect((answer.body as { current: Session }).current).toEqual(first);
  });

  it('lets exactly one of two that save at once through', async () => {
    const session = await buildSession(host, circle.id);
    const save = (index: number) =>
      host.caller
        .put(`/api/sessions/${session.id}/board`)
        .send({ version: 1, sets: [{ entries: entries(index) }] });
    const answers = await Promise.all([save(0), save(1), save(2)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
  });

  it('takes ids that a client makes up, and keeps omitted fields of a known id', async () => {
    const session = await buildSession(host, circle.id);
    const [setId, entryId] = [randomUUID(), randomUUID()];
    const entry = { id: entryId, tuneId: tunes[0]?.id, pinned: true, sitOut: ['banjo'] };
    await put(session, { version: 1, sets: [{ id: setId, title: 'Warm up', entries: [entry] }] });
    const { body } = await put(session, {
      version: 2,
      sets: [{ id: setId, entries: [{ tuneId: tunes[1]?.id }, { id: entryId }] }],
    });
    const [set] = (body as Session).sets;
    expect(set).toMatchObject({ id: setId, title: 'Warm up' });
    expect(set?.entries[1]).toMatchObject({
      id: entryId,
      tuneId: tunes[0]?.id,
      pinned: true,
      sitOut: ['banjo'],
    });
  });

  it('keeps rules that are omitted, less the entries that are gone', async () => {
    const session = await buildSession(host, circle.id);
    const ids = [randomUUID(), randomUUID(), randomUUID()];
    const all = ids.map((id, index) => ({ id, tuneId: tunes[index]?.id }));
    const [a, b, c] = ids;
    await put(session, {
      version: 1,
      sets: [{ entries: all }],
      medleys: [[a, b, c]],
      befores: [
        [a, c],
        [a, b],
      ],
    });
    const { body } = await put(session, { version: 2, sets: [{ entries: all.slice(0, 2) }] });
    expect(body).toMatchObject({ medleys: [[a, b]], befores: [[a, b]] });
    const answer = await put(
      session,
      { version: 3, sets: [{ entries: all.slice(0, 2) }], medleys: [[a, c]] },
      422,
    );
    expect(answer.body).toMatchObject({ errors: [{ path: 'medleys.0.1' }] });
  });

  it('has open places, which score like a tune', async () => {
    const session = await buildSession(host, circle.id);
    const open = {
      key: 'A',
      mode: 'major',
      minutes: 40,
      tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'AEAE' }] }],
    };
    const { body } = await put(session, { version: 1, sets: [{ entries: [...entries(0), { open }] }] });
    const saved = body as Session;
    expect(saved.sets[0]?.entries[1]).toMatchObject({ title: null, tuneId: null, minutes: 40 });
    expect(saved.score).toMatchObject({ pegChanges: 2, retuneStops: 1, keyChanges: 1 });
  });

  it('refuses a tune of another circle, at its place, and changes nothing', async () => {
    const other = await buildCircle(test);
    const foreign = await buildTune(other.host, other.circle.id);
    const session = await buildSession(host, circle.id);
    const sets = [{ entries: [...entries(0), { tuneId: foreign.id }, { tuneId: randomUUID() }, {}] }];
    const answer = await put(session, { version: 1, sets }, 422);
    const paths = (answer.body as { errors: { path: string }[] }).errors.map(({ path }) => path);
    expect(paths).toEqual(['sets.0.entries.1.tuneId', 'sets.0.entries.2.tuneId', 'sets.0.entries.3.tuneId']);
    const after = await host.caller.get(`/api/sessions/${session.id}`).expect(200);
    expect(after.body).toMatchObject({ version: 1, sets: [] });
  });

  it('refuses an entry of another evening, and one that stands twice', async () => {
    const one = await buildSession(host, circle.id);
    const id = randomUUID();
    await put(one, { version: 1, sets: [{ entries: [{ id, tuneId: tunes[0]?.id }] }] });
    const two = await buildSession(host, circle.id);
    await put(two, { version: 1, sets: [{ entries: [{ id, tuneId: tunes[0]?.id }] }] }, 422);
    const twice = randomUUID();
    const entry = { id: twice, tuneId: tunes[0]?.id };
    await put(two, { version: 1, sets: [{ entries: [entry, entry] }] }, 422);
  });

  it('keeps a removed tune on the evening it is on, and takes it on no other', async () => {
    const tune = await buildFiddleTune(host, circle.id, 'Gone Tomorrow', 'GDAE');
    const session = await buildSession(host, circle.id);
    const first = (await put(session, { version: 1, sets: [{ entries: [{ tuneId: tune.id }] }] }))
      .body as Session;
    await host.caller.delete(`/api/circles/${circle.id}/tunes/${tune.id}`).expect(204);
    const { body } = await host.caller.get(`/api/sessions/${session.id}`).expect(200);
    expect((body as Session).sets[0]?.entries[0]).toMatchObject({ title: 'Gone Tomorrow', removed: true });
    const kept = first.sets[0]?.entries.map(({ id }) => ({ id })) ?? [];
    const saved = await put(session, { version: 2, sets: [{ entries: [...kept, ...entries(1)] }] });
    expect(titles(saved.body as Session)).toEqual([['Gone Tomorrow', 'Tune 2']]);
    const other = await buildSession(host, circle.id);
    await put(other, { version: 1, sets: [{ entries: [{ tuneId: tune.id }] }] }, 422);
  });

  it('fills in the circle’s usual tunings and says that they are assumed', async () => {
    const tune = await buildTune(host, circle.id, {
      title: 'Nothing Said',
      key: 'A',
      mode: 'modal',
      tunings: [],
    });
    const session = await buildSession(host, circle.id, { chairs: [{ kind: 'banjo', count: 2 }] });
    const { body } = await put(session, { version: 1, sets: [{ entries: [{ tuneId: tune.id }] }] });
    const saved = body as Session;
    // Sawmill with the capo at 2 for A modal: common practice.
    expect(saved.sets[0]?.entries[0]?.tunings).toEqual([
      {
        kind: 'fiddle',
        accepted: [{ tuning: 'GDAE', pitches: ['G3', 'D4', 'A4', 'E5'], capo: 0 }],
        assumed: true,
      },
      {
        kind: 'banjo',
        accepted: [{ tuning: 'gDGCD', pitches: ['G4', 'D3', 'G3', 'C4', 'D4'], capo: 2 }],
        assumed: true,
      },
    ]);
    expect(saved.score).toMatchObject({ pegChanges: 2, offClockPegChanges: 2 });
    const own = { items: [{ kind: 'banjo', key: 'A', family: 'minor', tuning: 'gDGBD capo 2' }] };
    await host.caller.put(`/api/circles/${circle.id}/usual-tunings`).send(own).expect(200);
    const after = await host.caller.get(`/api/sessions/${session.id}`).expect(200);
    expect((after.body as Session).score).toMatchObject({ pegChanges: 0 });
  });

  it('lists evenings newest first, page by page, and refuses pages that are too large', async () => {
    const { body } = await host.caller.get(`/api/circles/${circle.id}/sessions?pageSize=2`).expect(200);
    expect(body).toMatchObject({ page: 1, pageSize: 2 });
    expect((body as { items: unknown[] }).items).toHaveLength(2);
    await host.caller.get(`/api/circles/${circle.id}/sessions?pageSize=201`).expect(400);
  });

  it('says in the list how many tunes and sets stand on each board', async () => {
    const session = await buildSession(host, circle.id, { title: 'Counted', startsAt: '2031-05-01T20:00' });
    const sets = [{ entries: entries(0, 1, 2) }, { entries: entries(3) }];
    const saved = (await put(session, { version: 1, sets })).body as Session;
    const shorter = saved.sets.map(({ id, entries: [first] }) => ({ id, entries: [{ id: first?.id }] }));
    await put(session, { version: 2, sets: shorter });
    const { body } = await host.caller.get(`/api/circles/${circle.id}/sessions`).expect(200);
    const listed = (body as { items: { id: string }[] }).items.find(({ id }) => id === session.id);
    expect(listed).toMatchObject({ title: 'Counted', tunes: 2, sets: 2 });
  });
});
