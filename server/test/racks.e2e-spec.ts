import type { Circle } from '@pegwell/shared/contract/circles';
import type { Rack, Racks } from '@pegwell/shared/contract/racks';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { Problem } from '@pegwell/shared/contract/errors';
import { startApp, type TestApp } from './app';
import {
  buildAccount,
  buildCircle,
  buildFiddleTune,
  buildMember,
  buildSession,
  buildTune,
  type Person,
} from './build';

describe('the instruments that players bring', () => {
  let test: TestApp;
  let circle: Circle;
  let host: Person;
  let cohost: Person;
  let player: Person;
  let elsewhere: Person;
  beforeAll(async () => {
    test = await startApp();
    ({ circle, host } = await buildCircle(test));
    cohost = await buildMember(test, circle, host, 'cohost');
    player = await buildMember(test, circle, host, 'player');
    elsewhere = await buildAccount(test);
  });
  afterAll(() => test.close());

  /** An evening with one tune per cell, set by set; a cell is what the fiddle accepts, `any` or with ` or `. */
  async function evening(
    sets: readonly (readonly string[])[],
    fields: Record<string, unknown> = {},
  ): Promise<Session> {
    const session = await buildSession(host, circle.id, {
      chairs: [{ kind: 'fiddle', count: 3 }],
      ...fields,
    });
    const entries: { tuneId: string }[][] = [];
    for (const set of sets) {
      const tunes: { tuneId: string }[] = [];
      for (const cell of set) {
        const tune = await buildFiddleTune(host, circle.id, `Plays ${cell}`, ...cell.split(' or '));
        tunes.push({ tuneId: tune.id });
      }
      entries.push(tunes);
    }
    const board = { version: session.version, sets: entries.map((each) => ({ entries: each })) };
    const answer = await host.caller.put(`/api/sessions/${session.id}/board`).send(board).expect(200);
    return answer.body as Session;
  }

  const bring = (...instruments: object[]) => ({ player: 'Mara', kind: 'fiddle', instruments });
  const add = async (session: Session, body: object, status = 201) =>
    (await host.caller.post(`/api/sessions/${session.id}/racks`).send(body).expect(status)).body as Rack;
  const list = async (session: Session, person = player) =>
    (await person.caller.get(`/api/sessions/${session.id}/racks`).expect(200)).body as Racks;
  const entryIds = (session: Session) => session.sets.flatMap((set) => set.entries.map((entry) => entry.id));

  it('plans them for every member: what to play, what to turn when, and what they save', async () => {
    const session = await evening([
      ['GDAE', 'AEAE', 'GDAE'],
      ['AEAE', 'GDGD', 'AEAE'],
    ]);
    const rack = await add(session, bring({}, { arrives: 'free' }));
    // By hand. 1 arrives in GDAE, 2 is tuned to AEAE at home. GDGD comes in the second set: 1 has rested
    // since the first, so its A and E go down in the break. With one fiddle: two pegs before each of 2, 3 and
    // 4 (in the break), four from AEAE to GDGD and four back (score.md, worked by its rules).
    expect(rack.plan?.cost).toEqual({ pegChanges: 2, stops: 0, semitones: 4 });
    expect(rack.plan?.alone).toEqual({ pegChanges: 14, stops: 4, semitones: 28 });
    const ids = entryIds(session);
    expect(rack.plan?.bring.map((each) => each?.tuning)).toEqual(['GDAE', 'AEAE']);
    expect(
      rack.plan?.tunes.map(({ entryId, instrument, tuned }) => [entryId, instrument, tuned?.tuning]),
    ).toEqual([
      [ids[0], 0, 'GDAE'],
      [ids[1], 1, 'AEAE'],
      [ids[2], 0, 'GDAE'],
      [ids[3], 1, 'AEAE'],
      [ids[4], 0, 'GDGD'],
      [ids[5], 1, 'AEAE'],
    ]);
    expect(rack.plan?.turns).toEqual([
      {
        ...{ before: ids[3], needed: ids[4], offClock: true, instrument: 0 },
        from: { tuning: 'GDAE', pitches: ['G3', 'D4', 'A4', 'E5'], capo: 0 },
        to: { tuning: 'GDGD', pitches: ['G3', 'D4', 'G4', 'D5'], capo: 0 },
        ...{ deltas: [0, 0, -2, -2], pegChanges: 2, gentler: null },
      },
    ]);
    const { evening: planned, items } = await list(session);
    expect(items).toEqual([rack]);
    expect(planned).toMatchObject({ title: 'An evening', status: 'planned', kinds: ['fiddle'] });
    expect(planned.openings['fiddle']).toBe('GDAE');
    expect(planned.sets.flatMap((set) => set.tunes.map((tune) => tune.id))).toEqual(ids);
  });

  it('goes by the tunings announced to the room, and by what the kind arrives in', async () => {
    // The room turns two pegs for AEAE once and keeps it where GDAE, the first choice, is accepted too.
    const session = await evening([['AEAE', 'GDAE or AEAE', 'AEAE']], { openings: { fiddle: null } });
    const { plan, instruments } = await add(session, bring({}, { arrives: 'tuned', tuning: 'ADAE' }));
    expect(instruments).toEqual([
      { arrives: 'opening', tuning: null },
      { arrives: 'tuned', tuning: 'ADAE' },
    ]);
    expect(plan?.tunes.map(({ instrument, tuned }) => [instrument, tuned?.tuning])).toEqual([
      [0, 'AEAE'],
      [0, 'AEAE'],
      [0, 'AEAE'],
    ]);
    expect(plan?.cost.pegChanges).toBe(0);
  });

  it('plans a kind that nobody else retunes, with capos, and tunes played as they stand', async () => {
    const session = await buildSession(host, circle.id, { chairs: [{ kind: 'fiddle', count: 1 }] });
    const banjo = (tuning: string) =>
      buildTune(host, circle.id, { key: 'E', tunings: [{ kind: 'banjo', accepted: [{ tuning }] }] });
    const tunes = [
      await banjo('gDGBD'),
      await banjo('gCGCD capo 2'),
      await banjo('any'),
      await banjo('gDGBD capo 2'),
    ];
    const sets = [{ entries: tunes.map(({ id }) => ({ tuneId: id })) }];
    await host.caller
      .put(`/api/sessions/${session.id}/board`)
      .send({ version: session.version, sets })
      .expect(200);
    const { plan } = await add(session, { ...bring({}, { arrives: 'free' }), kind: 'banjo' });
    expect(
      plan?.tunes.map(({ instrument, tuned, asItStands }) => [
        instrument,
        tuned?.tuning,
        tuned?.capo,
        asItStands,
      ]),
    ).toEqual([
      [0, 'gDGBD', 0, false],
      [1, 'gCGCD', 2, false],
      [1, 'gCGCD', 2, true],
      [0, 'gDGBD', 2, false],
    ]);
    expect(plan?.cost).toEqual({ pegChanges: 0, stops: 0, semitones: 0 });
  });

  it('names a tuning that raises less where the tune accepts one', async () => {
    // The room stands in GDAE for the first; both choices of the second cost it one peg, so it takes the first.
    const session = await evening([['AEAE', 'AEAF# or AEAC#']], { openings: { fiddle: 'AEAE' } });
    const { plan } = await add(session, bring({}));
    expect(plan?.turns.map(({ to, gentler }) => [to.tuning, gentler])).toEqual([['AEAF#', 'AEAC#']]);
  });

  it('keeps the plan while the evening is live', async () => {
    const session = await evening([['GDAE', 'AEAE', 'GDAE']]);
    const { plan } = await add(session, bring({}, {}));
    for (const action of ['start', 'next']) {
      await host.caller.post(`/api/sessions/${session.id}/live`).send({ action }).expect(200);
    }
    const now = await list(session);
    expect(now.evening.status).toBe('live');
    expect(now.items[0]?.plan).toEqual(plan);
  });

  it('answers an evening without tunes', async () => {
    const session = await evening([]);
    const none = { pegChanges: 0, stops: 0, semitones: 0 };
    const { plan } = await add(session, bring({}));
    expect(plan).toMatchObject({ tunes: [], turns: [], cost: none, alone: none });
  });

  it('says why there is no plan for 15 tunings', async () => {
    const lows = [
      'C3',
      'C#3',
      'D3',
      'D#3',
      'E3',
      'F3',
      'F#3',
      'G3',
      'G#3',
      'A3',
      'A#3',
      'B3',
      'C4',
      'C#4',
      'D4',
    ];
    const session = await evening([lows.map((low) => `${low} D4 A4 E5`)]);
    const { plan, refusal } = await add(session, bring({}, {}));
    expect(plan).toBeNull();
    expect(refusal).toBe('This evening asks a fiddle for 15 tunings. A plan is worked out for up to 14.');
  });

  it.each([
    [{ player: ' ' }, 'player', 'A name is missing.'],
    [{ instruments: [] }, 'instruments', 'At least one instrument.'],
    [{ instruments: [{}, {}, {}, {}, {}] }, 'instruments', 'At most 4 instruments a player.'],
    [{ instruments: [{ arrives: 'tuned' }] }, 'instruments.0.tuning', 'Tuned to what? A tuning is missing.'],
    [{ instruments: [{ tuning: 'AEAE' }] }, 'instruments.0.tuning', 'A tuning goes with "arrives": "tuned".'],
  ])('answers 400 to %j', async (fields, path, message) => {
    const session = await buildSession(host, circle.id);
    const body = { ...bring({}), ...fields };
    const answer = await host.caller.post(`/api/sessions/${session.id}/racks`).send(body).expect(400);
    expect((answer.body as Problem).errors).toEqual([{ path, message }]);
  });

  it.each([
    [{ kind: 'lyre' }, 'kind', 'lyre is no instrument that Pegwell knows.'],
    [
      { instruments: [{}, { arrives: 'tuned', tuning: 'AEA' }] },
      'instruments.1.tuning',
      'A fiddle has 4 strings; AEA names 3: A E A.',
    ],
  ])('answers 422 to %j', async (fields, path, message) => {
    const session = await buildSession(host, circle.id);
    const body = { ...bring({}), ...fields };
    const answer = await host.caller.post(`/api/sessions/${session.id}/racks`).send(body).expect(422);
    expect((answer.body as Problem).errors).toEqual([{ path, message }]);
  });

  it('lets hosts and cohosts write, members read, and others not know of it', async () => {
    const session = await evening([['GDAE']]);
    const path = `/api/sessions/${session.id}/racks`;
    const { id, version } = await add(session, bring({}));
    await cohost.caller
      .put(`${path}/${id}`)
      .send({ version, ...bring({}, {}) })
      .expect(200);
    await player.caller.get(path).expect(200);
    await player.caller.post(path).send(bring({})).expect(403);
    await player.caller
      .put(`${path}/${id}`)
      .send({ version: 2, ...bring({}) })
      .expect(403);
    await player.caller.delete(`${path}/${id}`).expect(403);
    await elsewhere.caller.get(path).expect(404);
    await test.caller().get(path).expect(401);
    expect((await list(session)).items.map(({ instruments }) => instruments.length)).toEqual([2]);
  });

  it('answers 409 with how it stands to an old version, and takes the same again', async () => {
    const session = await evening([['GDAE']]);
    const { id, version } = await add(session, bring({}));
    const put = (body: object) => host.caller.put(`/api/sessions/${session.id}/racks/${id}`).send(body);
    await put({ version, ...bring({}, { arrives: 'tuned', tuning: 'AEAE' }) }).expect(200);
    const again = await put({ version, ...bring({}, { arrives: 'tuned', tuning: 'A3 E4 A4 E5' }) }).expect(
      200,
    );
    expect((again.body as Rack).version).toBe(version + 1);
    const late = await put({ version, ...bring({ arrives: 'free' }) }).expect(409);
    expect((late.body as { current: Rack }).current).toEqual(again.body);
  });

  it('takes them out, and finds them only in their own evening', async () => {
    const [session, other] = [await evening([['GDAE']]), await evening([])];
    const { id, version } = await add(session, bring({}));
    await host.caller
      .put(`/api/sessions/${other.id}/racks/${id}`)
      .send({ version, ...bring({}) })
      .expect(404);
    await host.caller.delete(`/api/sessions/${other.id}/racks/${id}`).expect(404);
    await host.caller.delete(`/api/sessions/${session.id}/racks/not-an-id`).expect(404);
    await host.caller.delete(`/api/sessions/${session.id}/racks/${id}`).expect(204);
    await host.caller.delete(`/api/sessions/${session.id}/racks/${id}`).expect(404);
    expect((await list(session)).items).toEqual([]);
  });
});
