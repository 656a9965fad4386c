import type { Circle } from '@pegwell/shared/contract/circles';
import { startApp, type TestApp } from './app';
import { buildCircle, buildMember, type Person } from './build';

describe('who is in a circle', () => {
  let test: TestApp;
  let circle: Circle;
  let host: Person;
  beforeAll(async () => void (test = await startApp()));
  beforeEach(async () => void ({ circle, host } = await buildCircle(test)));
  afterAll(() => test.close());

  const home = () => `/api/circles/${circle.id}`;
  const setRole = (by: Person, of: Person, role: string) =>
    by.caller.patch(`${home()}/members/${of.id}`).send({ role });

  it('gives a member another role, which counts from the next request on', async () => {
    const player = await buildMember(test, circle, host, 'player');
    const tune = { title: 'Slack Tide', key: 'D', mode: 'major', tunings: [] };
    await player.caller.post(`${home()}/tunes`).send(tune).expect(403);
    const answer = await setRole(host, player, 'cohost').expect(200);
    expect(answer.body).toMatchObject({ accountId: player.id, role: 'cohost' });
    await player.caller.post(`${home()}/tunes`).send(tune).expect(201);
  });

  it('removes a member, who from then on finds nothing, and takes them back in the role then given', async () => {
    const cohost = await buildMember(test, circle, host, 'cohost');
    await host.caller.delete(`${home()}/members/${cohost.id}`).expect(204);
    await cohost.caller.get(home()).expect(404);
    await host.caller.delete(`${home()}/members/${cohost.id}`).expect(404);
    await host.caller.post(`${home()}/members`).send({ email: cohost.email, role: 'player' }).expect(201);
    expect((await cohost.caller.get(home()).expect(200)).body).toMatchObject({ role: 'player' });
  });

  it('lets anybody leave', async () => {
    const player = await buildMember(test, circle, host, 'player');
    await player.caller.delete(`${home()}/membership`).expect(204);
    await player.caller.get(home()).expect(404);
  });

  it('keeps a host, whoever asks', async () => {
    await setRole(host, host, 'player').expect(422);
    await host.caller.delete(`${home()}/membership`).expect(422);
    const answer = await host.caller.delete(`${home()}/members/${host.id}`).expect(422);
    expect(answer.body).toMatchObject({ code: 'cannot-be', errors: [{ path: 'role' }] });
  });

  it('keeps a host also when two make each other players at once', async () => {
    for (let round = 0; round < 10; round++) {
      const other = await buildMember(test, circle, host, 'host');
      const answers = await Promise.all([setRole(host, other, 'player'), setRole(other, host, 'player')]);
      const statuses = answers.map(({ status }) => status).sort();
      // Whoever comes second is no host any more (403), or the last one (422).
      expect(statuses[0]).toBe(200);
      expect([403, 422]).toContain(statuses[1]);
      if (answers[1].status === 200) host = other;
    }
  });

  it('writes down who did what, for hosts and cohosts, newest first', async () => {
    const player = await buildMember(test, circle, host, 'player');
    await setRole(host, player, 'cohost').expect(200);
    const tune = await host.caller
      .post(`${home()}/tunes`)
      .send({ title: 'Slack Tide', key: 'D', mode: 'major', tunings: [] })
      .expect(201);
    const tuneId = (tune.body as { id: string }).id;
    await player.caller
      .patch(`${home()}/tunes/${tuneId}`)
      .send({ title: 'Slack Water', key: 'A' })
      .expect(200);
    const answer = await player.caller.get(`${home()}/history?pageSize=3`).expect(200);
    const page = answer.body as { total: number; items: Record<string, unknown>[] };
    expect(page.total).toBe(5);
    expect(page.items).toMatchObject([
      { what: 'tune.changed', who: 'player', subject: 'Slack Water', subjectId: tuneId },
      { what: 'tune.created', who: 'Host', subject: 'Slack Tide', changed: [], counts: null },
      { what: 'member.changed', who: 'Host', subject: 'player', role: 'cohost', changed: ['role'] },
    ]);
    expect(page.items[0]?.['changed']).toEqual(expect.arrayContaining(['key', 'title']));
    await setRole(host, player, 'player').expect(200);
    await player.caller.get(`${home()}/history`).expect(403);
  });

  it('counts an import instead of listing it', async () => {
    await host.caller
      .post(`${home()}/tunes/import`)
      .attach('file', Buffer.from('title,key\nSlack Tide,D\nEbb Gate,G\n'), 'tunes.csv')
      .expect(200);
    const answer = await host.caller.get(`${home()}/history?pageSize=1`).expect(200);
    expect((answer.body as { items: unknown[] }).items).toMatchObject([
      { what: 'tunes.imported', subject: null, counts: { created: 2, updated: 0 } },
    ]);
  });
});
