import type { UsualTuning } from '@pegwell/shared/contract/circles';
import { startApp, type TestApp } from './app';
import { buildAccount, buildCircle, buildMember } from './build';

describe('circles', () => {
  let test: TestApp;
  beforeAll(async () => void (test = await startApp()));
  afterAll(() => test.close());

  it('makes whoever creates a circle its host', async () => {
    const { circle, host } = await buildCircle(test);
    expect(circle).toMatchObject({
      name: 'Ash Ford Circle',
      role: 'host',
      timeZone: 'Europe/Berlin',
      referenceA: 440,
    });
    const me = await host.caller.get('/api/auth/me').expect(200);
    expect(me.body).toMatchObject({ circles: [{ id: circle.id, name: 'Ash Ford Circle', role: 'host' }] });
  });

  it('refuses a time zone that nobody knows', async () => {
    const { caller } = await buildAccount(test);
    const answer = await caller
      .post('/api/circles')
      .send({ name: 'A circle', timeZone: 'Mars/Olympus' })
      .expect(400);
    expect(answer.body).toMatchObject({ errors: [{ path: 'timeZone' }] });
  });

  it('adds an existing account in any case of its address, once', async () => {
    const { circle, host } = await buildCircle(test);
    const person = await buildAccount(test, 'Ilse');
    const add = (email: string) =>
      host.caller.post(`/api/circles/${circle.id}/members`).send({ email, role: 'player' });
    const added = await add(person.email.toUpperCase()).expect(201);
    expect(added.body).toMatchObject({ accountId: person.id, displayName: 'Ilse', role: 'player' });
    const again = await add(person.email).expect(409);
    expect(again.body).toMatchObject({ code: 'already-member', errors: [{ path: 'email' }] });
    const unknown = await add('nobody@example.org').expect(422);
    expect(unknown.body).toMatchObject({ errors: [{ path: 'email' }] });
  });

  it('lists members page by page, with addresses for hosts alone', async () => {
    const { circle, host } = await buildCircle(test);
    const player = await buildMember(test, circle, host, 'player');
    const path = `/api/circles/${circle.id}/members`;
    const seen = await player.caller.get(`${path}?pageSize=1&page=2`).expect(200);
    expect(seen.body).toMatchObject({ total: 2, page: 2, pageSize: 1, items: [{ displayName: 'player' }] });
    expect(JSON.stringify((await player.caller.get(path)).body)).not.toContain('@');
    expect(JSON.stringify((await host.caller.get(path)).body)).toContain(player.email);
  });

  it('shows the usual tunings of the trade, with the circle’s own laid over them', async () => {
    const { circle, host } = await buildCircle(test);
    const path = `/api/circles/${circle.id}/usual-tunings`;
    const row = (items: UsualTuning[], kind: string, key: string | null, family: string | null) =>
      items.find((each) => each.kind === kind && each.key === key && each.family === family);
    const before = ((await host.caller.get(path).expect(200)).body as { items: UsualTuning[] }).items;
    // Common practice: open G for G, double C for C, sawmill with the capo at 2 for A modal.
    expect(row(before, 'fiddle', null, null)).toMatchObject({ tuning: 'GDAE', own: false });
    expect(row(before, 'banjo', 'G', 'major')).toMatchObject({ tuning: 'gDGBD' });
    expect(row(before, 'banjo', 'A', 'minor')).toMatchObject({ tuning: 'gDGCD capo 2' });
    expect(row(before, 'banjo', 'C', 'major')).toMatchObject({ tuning: 'gCGCD' });
    expect(row(before, 'guitar', null, null)).toMatchObject({ tuning: 'any' });
    const own = [
      { kind: 'banjo', key: 'G', family: 'major', tuning: 'gDGBD capo 0' },
      { kind: 'guitar', key: null, family: null, tuning: 'D2 A2 D3 G3 B3 E4' },
    ];
    const after = (
      (await host.caller.put(path).send({ items: own }).expect(200)).body as { items: UsualTuning[] }
    ).items;
    expect(row(after, 'banjo', 'G', 'major')).toMatchObject({ own: true });
    expect(row(after, 'guitar', null, null)).toMatchObject({ tuning: 'DADGBE', own: true });
    expect(row(after, 'banjo', 'A', 'minor')).toMatchObject({ own: false });
    const wrong = [
      { kind: 'fiddle', key: 'A', family: 'major', tuning: 'GDA' },
      { kind: 'kazoo', key: null, family: null, tuning: 'any' },
    ];
    const answer = await host.caller.put(path).send({ items: wrong }).expect(422);
    expect(answer.body).toMatchObject({ errors: [{ path: 'items.0.tuning' }, { path: 'items.1.kind' }] });
  });
});
