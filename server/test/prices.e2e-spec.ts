import type { ScoreAnswer } from '@pegwell/shared/contract/ordering';
import type { PricedTunePage, TunePrices } from '@pegwell/shared/contract/prices';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { startApp, type TestApp } from './app';
import { buildCircle, buildFiddleTune, buildMember, buildSession, buildTune, type Person } from './build';

describe('what one more tune costs', () => {
  let test: TestApp;
  let host: Person;
  let player: Person;
  let circleId: string;
  let session: Session;
  const library: Tune[] = [];

  beforeAll(async () => {
    test = await startApp();
    const built = await buildCircle(test);
    host = built.host;
    circleId = built.circle.id;
    player = await buildMember(test, built.circle, host, 'player');
    const on = (kind: string, ...tunings: string[]) => ({
      kind,
      accepted: tunings.map((tuning) => ({ tuning })),
    });
    const made = [
      ['Slack Tide', 'D', 'reel', on('fiddle', 'ADAE'), on('banjo', 'gCGCD')],
      ['Stone Weir', 'A', 'reel', on('fiddle', 'AEAE', 'GDAE')],
      ['Cold Frosty Gate', 'A', 'waltz', on('fiddle', 'AEAC#')],
      ['Grey Owl', 'G', 'reel', on('fiddle', 'GDGD'), on('banjo', 'gDGBD')],
      ['Home Again', 'G', 'waltz', on('fiddle', 'GDAE'), on('banjo', 'any')],
      // Silent on both: the circle's usual tunings are assumed.
      ['Ash Ford', 'A', 'reel'],
    ] as const;
    for (const [title, key, rhythm, ...tunings] of made) {
      library.push(await buildTune(host, circleId, { title, key, rhythm, tunings }));
    }
    const chairs = [
      { kind: 'fiddle', count: 5 },
      { kind: 'banjo', count: 2 },
    ];
    const { id } = await buildSession(host, circleId, { chairs });
    const entries = (...at: number[]) => at.map((index) => ({ tuneId: library[index]!.id }));
    const sets = [{ entries: entries(0, 1, 3) }, { title: 'Later', entries: [] }, { entries: entries(2, 4) }];
    const body = { version: 1, sets, medleys: [] };
    session = (await host.caller.put(`/api/sessions/${id}/board`).send(body).expect(200)).body as Session;
  });
  afterAll(() => test.close());

  const path = (rest = '') => `/api/sessions/${session.id}/prices${rest}`;
  const pricesOf = async (tune: Tune) =>
    (await host.caller.get(path(`/${tune.id}`)).expect(200)).body as TunePrices;
  const page = async (query: object) =>
    (await host.caller.get(path()).query(query).expect(200)).body as PricedTunePage;

  /** The board with a tune in it, scored by the route that outside programs use. */
  async function scoredWith(tune: Tune, setIndex: number, index: number): Promise<ScoreAnswer['score']> {
    const shown = [...tune.tunings, ...tune.assumed];
    const entry = { id: 'one more', key: tune.key, mode: tune.mode, rhythm: tune.rhythm, tunings: shown };
    const all = session.sets.flatMap(({ entries }) => entries);
    const sets = session.sets.map(({ entries }) => entries.map(({ id }) => id));
    sets[setIndex]!.splice(index, 0, entry.id);
    const body = {
      ...{ chairs: session.chairs, openings: session.openings, goal: session.goal, sets },
      tunes: [...all, entry].map(({ id, key, mode, rhythm, tunings }) => ({
        ...{ id, key, mode, rhythm },
        tunings: tunings.map(({ kind, accepted }) => ({
          kind,
          accepted: accepted.map(({ tuning, capo }) => ({ tuning, capo })),
        })),
      })),
    };
    return ((await host.caller.post('/api/score').send(body).expect(200)).body as ScoreAnswer).score;
  }

  it('is what scoring the evening with and without it says, at every place', async () => {
    for (const tune of library) {
      const prices = await pricesOf(tune);
      expect(prices).toMatchObject({ version: session.version, goal: 'pegs', tuneId: tune.id });
      // Three, none and two tunes: four places, one and three.
      expect(prices.places.map(({ setId, index, position }) => [setId, index, position])).toEqual(
        [
          [0, 0, 0],
          [0, 1, 1],
          [0, 2, 2],
          [0, 3, 3],
          [1, 0, 3],
          [2, 0, 3],
          [2, 1, 4],
          [2, 2, 5],
        ].map(([set, index, position]) => [session.sets[set!]!.id, index, position]),
      );
      for (const { setId, index, pegChanges, levels } of prices.places) {
        const set = session.sets.findIndex(({ id }) => id === setId);
        const score = await scoredWith(tune, set, index);
        expect(pegChanges).toBe(score.pegChanges - session.score.pegChanges);
        for (const [level, more] of Object.entries(levels!)) {
          const name = level as keyof typeof session.score;
          expect([tune.title, setId, index, name, more]).toEqual([
            ...[tune.title, setId, index, name],
            score[name] - session.score[name],
          ]);
        }
      }
      const least = Math.min(...prices.places.map((each) => each.pegChanges));
      expect(prices.cheapest!.pegChanges).toBe(least);
      expect(prices.places).toContainEqual(prices.cheapest);
      expect(prices.next).toEqual(prices.places.at(-1));
    }
  });

  it('sorts the library by price, a page at a time, and searches it', async () => {
    const all = await page({ pageSize: 200 });
    expect(all).toMatchObject({ total: 6, page: 1, pageSize: 200, version: session.version, goal: 'pegs' });
    const byHand = await Promise.all(
      library.map(async (tune) => [tune.title, (await pricesOf(tune)).cheapest]),
    );
    const pegs = all.items.map(({ price }) => price!.pegChanges);
    expect(pegs).toEqual([...pegs].sort((a, b) => a - b));
    expect(new Map(all.items.map(({ tune, price }) => [tune.title, price]))).toEqual(new Map(byHand as []));
    const two = await page({ page: 2, pageSize: 2 });
    expect(two.items).toEqual(all.items.slice(2, 4));
    expect(two.total).toBe(6);

    const byTitle = await page({ sort: 'title', place: 'next', pageSize: 2 });
    expect(byTitle.items.map(({ tune }) => tune.title)).toEqual(['Ash Ford', 'Cold Frosty Gate']);
    for (const { tune, price } of byTitle.items) expect(price).toEqual((await pricesOf(tune)).next);
    expect((await page({ search: 'owl' })).items.map(({ tune }) => tune.title)).toEqual(['Grey Owl']);
    const inA = await page({ kind: 'fiddle', tuning: 'AEAE' });
    expect(inA.items.map(({ tune }) => tune.title)).toEqual(['Stone Weir']);
  });

  it('refuses what it cannot weigh, and shows members of other circles nothing', async () => {
    await host.caller.get(path()).query({ tuning: 'AEAE' }).expect(400);
    await host.caller.get(path()).query({ kind: 'fiddle', tuning: 'AEA' }).expect(422);
    await host.caller.get(path()).query({ sort: 'rhythm' }).expect(400);
    await host.caller.get(path('/not-an-id')).expect(404);
    const elsewhere = await buildCircle(test);
    const theirs = await buildFiddleTune(elsewhere.host, elsewhere.circle.id, 'Theirs', 'GDAE');
    await host.caller.get(path(`/${theirs.id}`)).expect(404);
    await elsewhere.host.caller.get(path()).expect(404);
    await player.caller.get(path(`/${library[0]!.id}`)).expect(200);
  });

  it('covers what is left of an evening that runs: the next one stands behind what is now', async () => {
    const live = (action: string) =>
      host.caller.post(`/api/sessions/${session.id}/live`).send({ action }).expect(200);
    await live('start');
    await live('next');
    const prices = await pricesOf(library[3]!);
    expect(prices.places[0]).toMatchObject({ setId: session.sets[0]!.id, index: 2, position: 2 });
    expect(prices.places).toHaveLength(6);
    expect(prices.next).toEqual(prices.places[0]);
    // Before Grey Owl, in its own tuning: the pegs turn one tune earlier.
    expect(prices.next!.pegChanges).toBe(0);
    await live('finish');
  });

  it('answers for a board without a set', async () => {
    const bare = await buildSession(host, circleId);
    const answer = await host.caller.get(`/api/sessions/${bare.id}/prices/${library[0]!.id}`).expect(200);
    // ADAE from GDAE: one peg, one fiddle.
    const place = { setId: null, index: 0, position: 0, pegChanges: 1 };
    expect((answer.body as TunePrices).places).toMatchObject([place]);
  });
});
