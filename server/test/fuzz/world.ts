import { randomUUID } from 'node:crypto';
import type { SignIns } from '@pegwell/shared/contract/accounts';
import type { Circle } from '@pegwell/shared/contract/circles';
import type { Rack } from '@pegwell/shared/contract/racks';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import type { TestApp } from '../app';
import { buildAccount, buildSession, type Person } from '../build';
import type { CallerName } from './recipe';

/** Those who stay from circle to circle. */
export type People = Readonly<Record<'host' | 'cohost' | 'player', Person>>;

/** A circle to break, and who is in it. */
export interface World {
  readonly cookies: Readonly<Record<CallerName, string>>;
  /** What `@kind:index` stands for. */
  readonly ids: Readonly<Record<string, readonly string[]>>;
}

const TUNES = `title,key,rhythm,fiddle
Slack Tide,D,reel,GDAE
Ebb Gate,A,reel,AEAE
Ash Ford,D,waltz,ADAE
Low Ropes,D,reel,DDAD or ADAE
Weir Hill,G,jig,GDAE
Far Sluice,A,reel,AEAE or GDAE
`;

export async function buildPeople(test: TestApp): Promise<People> {
  return {
    host: await buildAccount(test, 'Host'),
    cohost: await buildAccount(test, 'Cohost'),
    player: await buildAccount(test, 'Player'),
  };
}

export async function buildWorld(test: TestApp, people: People): Promise<World> {
  const { caller: host } = people.host;
  const circle = (await host.post('/api/circles').send({ name: 'Ash Ford Circle' }).expect(201))
    .body as Circle;
  const home = `/api/circles/${circle.id}`;
  for (const role of ['cohost', 'player'] as const) {
    await host.post(`${home}/members`).send({ email: people[role].email, role }).expect(201);
  }
  const progress = randomUUID();
  await host
    .post(`${home}/tunes/import?progress=${progress}`)
    .attach('file', Buffer.from(TUNES), 'tunes.csv')
    .expect(200);
  const library = (await host.get(`${home}/tunes`).expect(200)).body as { items: Tune[] };
  const tunes = library.items.map(({ id }) => id);
  const sessions: Session[] = [];
  for (let count = 0; count < 3; count++) {
    const { id, version } = await buildSession(people.host, circle.id);
    const sets = [tunes.slice(0, 3), tunes.slice(3)].map((ids) => ({
      entries: ids.map((tuneId) => ({ tuneId })),
    }));
    const answer = await host.put(`/api/sessions/${id}/board`).send({ version, sets }).expect(200);
    sessions.push(answer.body as Session);
  }
  const rack = { player: 'Ada', kind: 'fiddle', instruments: [{}, {}] };
  const racks = await host
    .post(`/api/sessions/${sessions[0]?.id ?? ''}/racks`)
    .send(rack)
    .expect(201);
  // Signs out, and leaves: a new one for every circle.
  const elsewhere = await buildAccount(test, 'Elsewhere');
  const signIns = (await elsewhere.caller.get('/api/auth/sign-ins').expect(200)).body as SignIns;
  const everybody = [people.host, people.cohost, people.player, elsewhere];
  const [hostCookie = '', cohost = '', player = '', elsewhereCookie = ''] = everybody.map((person) =>
    cookieOf(test, person),
  );
  return {
    cookies: { host: hostCookie, cohost, player, elsewhere: elsewhereCookie, nobody: '' },
    ids: {
      circle: [circle.id],
      account: everybody.map(({ id }) => id),
      email: everybody.map(({ email }) => email),
      tune: tunes,
      session: sessions.map(({ id }) => id),
      code: sessions.map(({ code }) => code),
      set: sessions.flatMap(({ sets }) => sets.map(({ id }) => id)),
      entry: sessions.flatMap(({ sets }) => sets.flatMap(({ entries }) => entries.map(({ id }) => id))),
      rack: [(racks.body as Rack).id],
      import: [progress],
      signin: signIns.items.map(({ id }) => id),
    },
  };
}

function cookieOf({ url }: TestApp, { caller }: Person): string {
  const { hostname } = new URL(url);
  return caller.jar.getCookies({ domain: hostname, path: '/', secure: false, script: false }).toValueString();
}

/** The text with every `@kind:index` replaced by an id of this world. */
export function placed(text: string, { ids }: World): string {
  return text.replace(/@([a-z]+):(\d)/g, (whole, kind: string, index: string) => {
    const known = ids[kind] ?? [];
    return known[Number(index) % Math.max(known.length, 1)] ?? whole;
  });
}
