import { BUILT_IN_KINDS, builtInKind } from '@pegwell/shared/music/instrument';
import type { CirclePlay, Play } from '@pegwell/shared/contract/live';
import type { SessionSuggestion } from '@pegwell/shared/contract/ordering';
import type { Racks } from '@pegwell/shared/contract/racks';
import type { Session, SessionSummary } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { parseTuning } from '@pegwell/shared/music/tuning';
import { compareScores } from '@pegwell/shared/session/score';
import { DemoService } from '../src/demo/demo.service';
import { demoDates } from '../src/demo/evenings';
import { DEMO_HOST, DEMO_PASSWORD, DEMO_PEOPLE } from '../src/demo/people';
import { startApp, type Caller, type TestApp } from './app';

/** A Wednesday; the second Thursday of its month is the 11th, so the one before is in February. */
const NOW = new Date('2027-03-03T12:00:00Z');

let test: TestApp;
let host: Caller;
let circleId: string;
let tunes: Tune[];
let past: SessionSummary;
let coming: Session;
let seedCpuMs: number;

beforeAll(async () => {
  test = await startApp();
  const begun = process.cpuUsage();
  await test.app.get(DemoService).seed(NOW);
  const { user, system } = process.cpuUsage(begun);
  seedCpuMs = (user + system) / 1000;
  host = test.caller();
  const answer = await host
    .post('/api/auth/login')
    .send({ email: DEMO_HOST.email, password: DEMO_PASSWORD })
    .expect(200);
  expect(answer.body).toMatchObject({ user: { displayName: DEMO_HOST.name } });
  const me = await host.get('/api/auth/me').expect(200);
  circleId = (me.body as { circles: { id: string }[] }).circles[0]!.id;
  tunes = (
    (await host.get(`/api/circles/${circleId}/tunes?pageSize=200`).expect(200)).body as { items: Tune[] }
  ).items;
  const evenings = (await host.get(`/api/circles/${circleId}/sessions`).expect(200)).body as {
    items: SessionSummary[];
  };
  past = evenings.items.find(({ status }) => status === 'finished')!;
  const planned = evenings.items.find(({ status }) => status === 'planned')!;
  coming = (await host.get(`/api/sessions/${planned.id}`).expect(200)).body as Session;
});

afterAll(() => test.close());

describe('the demo circle', () => {
  it('lets everybody in with the password that is printed, each in their role', async () => {
    for (const { email, role, name } of DEMO_PEOPLE) {
      const caller = test.caller();
      await caller.post('/api/auth/login').send({ email, password: DEMO_PASSWORD }).expect(200);
      const me = await caller.get('/api/auth/me').expect(200);
      expect(me.body).toMatchObject({ user: { displayName: name }, circles: [{ id: circleId, role }] });
    }
    expect(new Set(DEMO_PEOPLE.map(({ role }) => role))).toEqual(new Set(['host', 'cohost', 'player']));
  });

  // Of this process, so that what else the machine does makes no difference; most of it is hashing passwords.
  it('costs under two seconds of one core', () => {
    expect(seedCpuMs).toBeLessThan(2_000);
  });

  it('has sixty tunes or more over at least seven fiddle tunings and four of the banjo', () => {
    expect(tunes.length).toBeGreaterThanOrEqual(60);
    expect(new Set(tunes.map(({ title }) => title)).size).toBe(tunes.length);
    expect(tuningsOf('fiddle').size).toBeGreaterThanOrEqual(7);
    expect(tuningsOf('banjo').size).toBeGreaterThanOrEqual(4);
  });

  it('has only tunings that read back as they are shown', () => {
    for (const { title, tunings } of tunes) {
      for (const { kind, accepted } of tunings) {
        for (const { tuning, pitches } of accepted) {
          if (tuning === 'any') continue;
          const read = parseTuning(builtInKind(kind)!, tuning);
          expect([title, read.ok && read.value.pitches]).toEqual([title, pitches]);
        }
      }
    }
  });

  it('says of every tune that it is invented or that its tunings are common practice or from memory', () => {
    for (const { source } of tunes) {
      expect(source).toMatch(
        /^(Invented for this demo|Traditional\. Tunings: (common practice|from memory))\.$/,
      );
    }
  });

  it('has waltzes, several keys and modes, alternatives, and tunes that leave the tuning open', () => {
    expect(tunes.filter(({ rhythm }) => rhythm === 'waltz').length).toBeGreaterThanOrEqual(4);
    expect(new Set(tunes.map(({ key }) => key)).size).toBeGreaterThanOrEqual(4);
    expect(new Set(tunes.map(({ mode }) => mode)).size).toBeGreaterThanOrEqual(4);
    expect(
      tunes.filter((tune) => tune.tunings.some(({ accepted }) => accepted.length > 1)).length,
    ).toBeGreaterThan(5);
    expect(tunes.filter((tune) => tune.tunings.length === 0).length).toBeGreaterThan(5);
    expect(tunes.some((tune) => tune.tunings.some(({ accepted }) => accepted[0]?.tuning === 'any'))).toBe(
      true,
    );
  });

  it('has a coming evening of twenty-four tunes in two sets, for five fiddles and two banjos', () => {
    expect(coming.sets.map(({ entries }) => entries.length)).toEqual([12, 12]);
    expect(coming.chairs).toEqual(
      expect.arrayContaining([
        { kind: 'fiddle', count: 5 },
        { kind: 'banjo', count: 2 },
      ]),
    );
    expect(coming.localStart).toBe('2027-03-11T19:30');
    expect(coming.startsAt).toBe('2027-03-12T00:30:00.000Z');
  });

  it('has a coming evening whose order a host would wish better', async () => {
    const answer = await host.post(`/api/sessions/${coming.id}/suggestion`).send({}).expect(200);
    const { before, after, provenLevels, moved } = answer.body as SessionSuggestion;
    expect(before).toEqual(coming.score);
    expect(compareScores(after, before, 'pegs')).toBeLessThan(0);
    expect(after.pegChanges).toBeLessThan(before.pegChanges / 2);
    expect(after.retuneStops).toBeLessThan(before.retuneStops);
    expect(provenLevels).toBeGreaterThanOrEqual(2);
    expect(moved.length).toBeGreaterThan(0);
  });

  it('has a player with two fiddles, who turns fewer pegs than with one', async () => {
    const answer = await host.get(`/api/sessions/${coming.id}/racks`).expect(200);
    const { items } = answer.body as Racks;
    expect(items.map(({ player, instruments }) => [player, instruments.length])).toEqual([
      ['Neva Thistlemere', 2],
    ]);
    const { plan } = items[0]!;
    expect(plan!.cost.pegChanges).toBeLessThan(plan!.alone.pegChanges);
    expect(plan!.cost.stops).toBeLessThan(plan!.alone.stops);
  });

  it('remembers an evening that is over: every tune with its times, one after the other, the last one left out', async () => {
    const session = (await host.get(`/api/sessions/${past.id}`).expect(200)).body as Session;
    const entries = session.sets.flatMap((set) => set.entries);
    const { items } = (await host.get(`/api/sessions/${past.id}/plays`).expect(200)).body as {
      items: Play[];
    };
    expect(items.map(({ entryId }) => entryId)).toEqual(entries.slice(0, -1).map(({ id }) => id));
    expect(items.map(({ title }) => title)).toEqual(entries.slice(0, -1).map(({ title }) => title));
    const times = items.flatMap((play) => [play.calledAt, play.playingAt!, play.endedAt!].map(Date.parse));
    expect(times).toEqual([...times].sort((a, b) => a - b));
    expect(times[0]).toBeGreaterThanOrEqual(Date.parse(past.startsAt));
    expect(session.called).toEqual(entries.slice(0, -1).map(({ id }) => id));
    expect(Object.keys(items[0]!.tunings).sort()).toEqual(['banjo', 'fiddle']);
    const lately = await host.get(`/api/circles/${circleId}/plays`).expect(200);
    expect((lately.body as { total: number; items: CirclePlay[] }).total).toBe(items.length);
  });
});

describe('the dates of the demo', () => {
  // Second Thursdays by the calendar: 14 January, 11 February, 11 March, 8 April 2027.
  it.each([
    ['2027-01-16T12:00:00Z', '2027-01-14T19:30', '2027-02-11T19:30'],
    ['2027-02-11T20:00:00Z', '2027-01-14T19:30', '2027-03-11T19:30'],
    ['2027-02-09T12:00:00Z', '2027-01-14T19:30', '2027-02-11T19:30'],
    ['2027-03-31T12:00:00Z', '2027-03-11T19:30', '2027-04-08T19:30'],
    ['2026-12-31T12:00:00Z', '2026-12-10T19:30', '2027-01-14T19:30'],
  ])('seen from %s are %s and %s', (now, before, next) => {
    expect(demoDates(new Date(now))).toEqual({ past: before, coming: next });
  });
});

/** By sound of the strings: capos make no other tuning. */
function tuningsOf(kind: string): Set<string> {
  expect(BUILT_IN_KINDS.some(({ id }) => id === kind)).toBe(true);
  const rows = tunes.flatMap((tune) => tune.tunings.filter((each) => each.kind === kind));
  return new Set(rows.flatMap(({ accepted }) => accepted.flatMap(({ pitches }) => pitches?.join(' ') ?? [])));
}
