import type { Circle } from '@pegwell/shared/contract/circles';
import type { Rack } from '@pegwell/shared/contract/racks';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { startApp, type TestApp } from '../app';
import { buildCircle, buildFiddleTune, buildMember, buildSession, type Person } from '../build';

const SOME_ID = '7b0c3a52-5f9d-4b7e-9f0a-2f6c1e1d0a77';

/** A circle with something of everything. */
interface Home {
  readonly circle: Circle;
  readonly host: Person;
  readonly tune: Tune;
  readonly session: Session;
  readonly rack: Rack;
}

/** What it is, and how somebody would try to set it. */
const NOT_ONES_OWN: readonly [string, 'post' | 'patch', (home: Home) => string, object][] = [
  ['a circle’s id and role', 'post', () => '/api/circles', { name: 'Mine', id: SOME_ID, role: 'host' }],
  [
    'an evening’s circle',
    'patch',
    (home) => `/api/sessions/${home.session.id}`,
    { title: 'x', circleId: SOME_ID },
  ],
  ['an evening’s code', 'patch', (home) => `/api/sessions/${home.session.id}`, { code: 'AAAAAAAA' }],
  [
    'an evening’s status and version',
    'patch',
    (home) => `/api/sessions/${home.session.id}`,
    { status: 'live', version: 99 },
  ],
  [
    'a tune’s circle',
    'patch',
    (home) => `/api/circles/${home.circle.id}/tunes/${home.tune.id}`,
    { circleId: SOME_ID },
  ],
  [
    'a member’s account',
    'patch',
    (home) => `/api/circles/${home.circle.id}/members/${home.host.id}`,
    { role: 'host', accountId: SOME_ID },
  ],
  ['somebody’s address', 'patch', () => '/api/auth/me', { displayName: 'Host', email: 'other@example.org' }],
  ['that an address is confirmed', 'patch', () => '/api/auth/me', { displayName: 'Host', confirmed: true }],
];

describe('attacks on rights', () => {
  let test: TestApp;
  let mine: Home;
  let theirs: Home;
  beforeAll(async () => {
    test = await startApp();
    mine = await build();
    theirs = await build();
  });
  afterAll(() => test.close());

  async function build(): Promise<Home> {
    const { circle, host } = await buildCircle(test);
    const tune = await buildFiddleTune(host, circle.id, 'Slack Tide', 'AEAE');
    const { id, version } = await buildSession(host, circle.id);
    const sets = [{ entries: [{ tuneId: tune.id }] }];
    const session = (await host.caller.put(`/api/sessions/${id}/board`).send({ version, sets }).expect(200))
      .body as Session;
    const rack = { player: 'Mara', kind: 'fiddle', instruments: [{}, {}] };
    const answer = await host.caller.post(`/api/sessions/${id}/racks`).send(rack).expect(201);
    return { circle, host, tune, session, rack: answer.body as Rack };
  }

  const entryOf = ({ session }: Home) => session.sets[0]!.entries[0]!.id;
  const stand = async (home: Home) => {
    const { caller } = home.host;
    const [circle, session, tune, members] = await Promise.all([
      caller.get(`/api/circles/${home.circle.id}`),
      caller.get(`/api/sessions/${home.session.id}`),
      caller.get(`/api/circles/${home.circle.id}/tunes/${home.tune.id}`),
      caller.get(`/api/circles/${home.circle.id}/members`),
    ]);
    return [circle.body, session.body, tune.body, members.body] as unknown[];
  };

  describe('mass assignment: fields that a body may not carry', () => {
    it.each(NOT_ONES_OWN)('%s', async (_, method, path, body) => {
      const before = await stand(mine);
      const answer = await mine.host.caller[method](path(mine)).send(body).expect(400);
      expect((answer.body as { errors: { message: string }[] }).errors[0]?.message).toMatch(
        /^There is no field/,
      );
      expect(await stand(mine)).toEqual(before);
    });

    it('a new account that says it is confirmed, or what its id is', async () => {
      const values = { email: 'mass@example.org', password: 'seven crooked tunes', displayName: 'Mass' };
      for (const extra of [
        { confirmed: true },
        { id: mine.host.id },
        { role: 'host' },
        { passwordHash: 'x' },
      ]) {
        await test
          .caller()
          .post('/api/auth/register')
          .send({ ...values, ...extra })
          .expect(400);
      }
    });
  });

  describe('the id of another circle', () => {
    it('in every path', async () => {
      const { caller } = mine.host;
      const home = `/api/circles/${mine.circle.id}`;
      const evening = `/api/sessions/${mine.session.id}`;
      const asked = [
        caller.get(`${home}/tunes/${theirs.tune.id}`),
        caller.patch(`${home}/tunes/${theirs.tune.id}`).send({ title: 'Mine now' }),
        caller.delete(`${home}/tunes/${theirs.tune.id}`),
        caller.post(`${home}/tunes/${theirs.tune.id}/restore`),
        caller.patch(`${home}/members/${theirs.host.id}`).send({ role: 'player' }),
        caller.delete(`${home}/members/${theirs.host.id}`),
        caller.get(`${evening}/prices/${theirs.tune.id}`),
        caller
          .put(`${evening}/racks/${theirs.rack.id}`)
          .send({ version: 1, player: 'Mine', kind: 'fiddle', instruments: [{}] }),
        caller.delete(`${evening}/racks/${theirs.rack.id}`),
      ];
      for (const answer of await Promise.all(asked)) expect(answer.status).toBe(404);
      expect(
        (await theirs.host.caller.get(`/api/circles/${theirs.circle.id}/tunes/${theirs.tune.id}`).expect(200))
          .body,
      ).toMatchObject({ title: 'Slack Tide' });
      const racks = await theirs.host.caller.get(`/api/sessions/${theirs.session.id}/racks`).expect(200);
      expect(JSON.stringify(racks.body)).toContain(theirs.rack.id);
    });

    it('in every body', async () => {
      const before = await stand(theirs);
      const own = await stand(mine);
      const { caller } = mine.host;
      const { version } = mine.session;
      const entry = entryOf(theirs);
      const set = theirs.session.sets[0]!.id;
      const evening = `/api/sessions/${mine.session.id}`;
      const board = (body: object) => caller.put(`${evening}/board`).send({ version, ...body });
      const tuneId = mine.tune.id;
      const asked = [
        board({ sets: [{ entries: [{ tuneId: theirs.tune.id }] }] }),
        board({ sets: [{ entries: [{ id: entry, tuneId }] }] }),
        board({ sets: [{ id: set, title: 'Theirs', entries: [{ tuneId }] }] }),
        board({ sets: [{ entries: [{ tuneId, settingId: theirs.tune.id }] }] }),
        board({ sets: [{ entries: [{ tuneId }] }], medleys: [[entry, entryOf(mine)]] }),
        board({ sets: [{ entries: [{ tuneId }] }], befores: [[entry, entryOf(mine)]] }),
        caller.post(`${evening}/suggestion`).send({ setId: set }),
        caller.post(`${evening}/suggestion/accept`).send({ version, sets: [[entry]] }),
        caller.post(`${evening}/suggestion/held-back`).send({ sets: [[entry]] }),
        caller.post(`${evening}/explanation`).send({ sets: [[entry]] }),
        caller.post(`${evening}/live`).send({ action: 'start', entryId: entry }),
      ];
      const answers = await Promise.all(asked);
      for (const [index, answer] of answers.slice(0, -1).entries()) {
        expect([index, answer.status]).toEqual([index, 422]);
      }
      expect(answers.at(-1)?.status).toBeLessThan(500);
      expect(await stand(theirs)).toEqual(before);
      if (answers.at(-1)?.status !== 200) expect(await stand(mine)).toEqual(own);
    });

    it('in a file: what names a tune of another circle makes one here, and leaves theirs', async () => {
      const file = `id,title,key\n${theirs.tune.id},Taken,D\n`;
      const answer = await mine.host.caller
        .post(`/api/circles/${mine.circle.id}/tunes/import`)
        .attach('file', Buffer.from(file), 'tunes.csv')
        .expect(200);
      expect(answer.body).toMatchObject({ created: 1, updated: 0 });
      const tune = await theirs.host.caller
        .get(`/api/circles/${theirs.circle.id}/tunes/${theirs.tune.id}`)
        .expect(200);
      expect(tune.body).toMatchObject({ title: 'Slack Tide' });
    });
  });

  describe('a role raised', () => {
    let player: Person;
    let cohost: Person;
    let members: string;
    beforeAll(async () => {
      player = await buildMember(test, mine.circle, mine.host, 'player');
      cohost = await buildMember(test, mine.circle, mine.host, 'cohost');
      members = `/api/circles/${mine.circle.id}/members`;
    });

    it('by oneself', async () => {
      for (const { caller, id } of [player, cohost]) {
        await caller.patch(`${members}/${id}`).send({ role: 'host' }).expect(403);
        await caller.delete(`${members}/${mine.host.id}`).expect(403);
      }
    });

    it('by adding oneself anew, or a friend', async () => {
      await cohost.caller.post(members).send({ email: cohost.email, role: 'host' }).expect(403);
      await player.caller.post(members).send({ email: theirs.host.email, role: 'player' }).expect(403);
      // Also a host cannot raise by adding: who is in is changed, not added.
      await mine.host.caller.post(members).send({ email: player.email, role: 'host' }).expect(409);
    });

    it('by a role that there is not', async () => {
      for (const role of ['owner', 'admin', 'HOST', ['host'], { role: 'host' }, null, 1]) {
        await mine.host.caller.patch(`${members}/${player.id}`).send({ role }).expect(400);
      }
    });

    it('by a header that names another method or another path', async () => {
      const tricks = {
        'X-HTTP-Method-Override': 'DELETE',
        'X-Original-URL': '/api/health',
        'X-Rewrite-URL': '/api/health',
      };
      await player.caller.post(`${members}/${cohost.id}`).set(tricks).expect(404);
      await test.caller().get(members).set(tricks).expect(401);
    });

    it('shows no addresses and no history to players', async () => {
      const list = await player.caller.get(members).expect(200);
      expect(JSON.stringify(list.body)).not.toContain('@');
      await player.caller.get(`/api/circles/${mine.circle.id}/history`).expect(403);
    });
  });

  it('a path written otherwise: no writing of it is behind the guard', async () => {
    const id = mine.circle.id;
    const paths = [
      ...[
        `/api/circles/${id}/`,
        `/api//circles/${id}`,
        `/api/./circles/${id}`,
        `/api/health/../circles/${id}`,
      ],
      ...[
        `/API/circles/${id}`,
        `/api/Circles/${id}`,
        `/api/circles/${id.toUpperCase()}`,
        `/api/%63ircles/${id}`,
      ],
      ...[
        `/api/circles/${id}%2f`,
        `/api/circles/${id}%00`,
        `/api/circles/${id}.json`,
        `/api/circles/${id};a=b`,
        `/api/circles/${id}?_method=GET`,
      ],
    ];
    for (const path of paths) {
      const answer = await fetch(`${test.url}${path}`);
      // Where pages are built, what is no route of the API is the application's own page, the same for everybody.
      const isPage = answer.status === 200 && answer.headers.get('content-type')?.startsWith('text/html');
      expect([path, isPage === true || [400, 401, 404].includes(answer.status)]).toEqual([path, true]);
      expect(await answer.text()).not.toContain('Ash Ford');
    }
    expect((await fetch(`${test.url}/api/circles/${id}`, { method: 'HEAD' })).status).toBe(401);
  });

  it('a code in the place of an id, and an id in the place of a code', async () => {
    await mine.host.caller.get(`/api/sessions/${mine.session.code}`).expect(404);
    await test.caller().get(`/api/follow/${mine.session.id}`).expect(404);
    await test
      .caller()
      .get(`/api/sessions/${mine.session.id}/sheet.pdf?code=${mine.session.code}`)
      .expect(401);
  });
});
