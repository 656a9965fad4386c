import type { Explanation, HeldBack } from '@pegwell/shared/contract/explain';
import type { SessionSuggestion, SuggestAnswer } from '@pegwell/shared/contract/ordering';
import type { Score } from '@pegwell/shared/session/evening';
import type { Session } from '@pegwell/shared/contract/sessions';
import { startApp, type TestApp } from './app';
import { buildCircle, buildFiddleTune, buildMember, buildSession, buildTune, type Person } from './build';

/** Worked example 1 of score.md, with the AEAE that stands second pinned to the head of the evening. */
const TUNINGS = ['AEAE', 'GDAE', 'GDAE', 'ADAE', 'AEAE'] as const;

describe('an order explained', () => {
  let test: TestApp;
  let host: Person;
  let player: Person;
  let circleId: string;
  let session: Session;
  let path: string;
  let ids: string[];
  beforeAll(async () => {
    test = await startApp();
    const built = await buildCircle(test);
    host = built.host;
    circleId = built.circle.id;
    player = await buildMember(test, built.circle, host, 'player');
    const entries = [];
    for (const [index, tuning] of TUNINGS.entries()) {
      const tune = await buildFiddleTune(host, circleId, `Tune ${index + 1}`, tuning);
      entries.push({ tuneId: tune.id, pinned: index === 0 });
    }
    const { id } = await buildSession(host, circleId);
    path = `/api/sessions/${id}`;
    const body = {
      version: 1,
      sets: [{ entries: entries.slice(0, 3) }, { entries: [] }, { entries: entries.slice(3) }],
    };
    session = (await host.caller.put(`${path}/board`).send(body).expect(200)).body as Session;
    ids = session.sets.flatMap((set) => set.entries.map((entry) => entry.id));
  });
  afterAll(() => test.close());

  const explanation = async (body: object = {}, person = host, status = 200) =>
    (await person.caller.post(`${path}/explanation`).send(body).expect(status)).body as Explanation;
  const heldBack = async (body: object, status = 200) =>
    (await host.caller.post(`${path}/suggestion/held-back`).send(body).expect(status)).body as HeldBack;
  const suggest = async (body: object = {}, status = 200) =>
    (await host.caller.post(`${path}/suggestion`).send(body).expect(status)).body as SessionSuggestion;
  const at = (...places: number[]) => places.map((place) => ids[place - 1]!);

  describe('in sentences, a place at a time', () => {
    it('adds up to the score, for the board as it stands and for any order of it', async () => {
      for (const sets of [undefined, [at(1, 5, 4), [], at(2, 3)], [at(5, 4, 3), [], at(2, 1)]]) {
        const answer = await explanation({ ...(sets && { sets }) }, player);
        expect(answer).toMatchObject({ version: session.version, goal: 'pegs' });
        if (!sets) expect(answer.score).toEqual(session.score);
        expect(answer.places.map(({ before }) => before)).toEqual(sets?.flat() ?? ids);
        expect(answer.places.map(({ number }) => number)).toEqual([1, 2, 3, 4, 5]);
        for (const level of ['pegChanges', 'retuneStops', 'keyChanges', 'semitones'] as const) {
          const reasons = answer.places.flatMap((place) =>
            place.reasons.filter((each) => each.level === level),
          );
          const sum = reasons.reduce((all, { count }) => all + count, 0);
          expect([level, sum]).toEqual([level, answer.score[level]]);
        }
      }
    });

    it('says it in words', async () => {
      const [first, second, , fourth] = (await explanation()).places;
      expect(first).toMatchObject({ title: 'Tune 1', offClock: true, pegChanges: 2 });
      expect(first?.reasons.map(({ words }) => words)).toEqual([
        '1 fiddle: G peg up a whole step, to A; D peg up a whole step, to E.',
        'No stop: it is done before the first tune, and nobody waits.',
        '4 half steps turned in all.',
      ]);
      expect(second?.reasons[1]?.words).toBe('A stop inside a set: the room waits about 2 min.');
      expect(fourth?.reasons[1]?.words).toBe('No stop: it is done in the break, and nobody waits.');
    });

    it('refuses what is no order of the board', async () => {
      for (const sets of [[at(1, 2, 3, 4, 5)], [at(1, 2, 3), [], at(4)], [at(1, 2, 3), [], at(4, 4)]]) {
        await explanation({ sets }, host, 422);
      }
      await explanation({ sets: [['x']] }, host, 400);
    });
  });

  describe('what holds it back', () => {
    it('is what the rule costs: the score without it, proved', async () => {
      const { sets, after } = await suggest();
      // AEAE first: two pegs off the clock; AEAE, ADAE, then GDAE, GDAE behind the break.
      expect(after).toMatchObject({ pegChanges: 4 });
      const answer = await heldBack({ sets });
      expect(answer).toMatchObject({ version: session.version, goal: 'pegs', score: after, untried: 0 });
      const pin = answer.items.find(({ rule }) => rule === 'pin');
      expect(pin).toMatchObject({ ids: at(1), gains: true, proved: true });
      // The worked example itself: two pegs.
      expect(pin?.score.pegChanges).toBe(2);
      expect(pin?.words).toMatch(/^Without the pin on Tune 1: 2 pegs (and 1 stop )?fewer\.$/);
      const tune = answer.items.find(({ rule, ids: [id] }) => rule === 'tune' && id === ids[0]);
      expect(tune?.words).toMatch(/^Without Tune 1: 2 pegs/);
      expect(answer.items.every(({ gains, score }) => !gains || score.pegChanges <= after.pegChanges)).toBe(
        true,
      );
    });

    it('weighs medleys and pairs alike, as the stateless route does without them', async () => {
      const [one, two, three, four, five] = ids as [string, string, string, string, string];
      const rules = { medleys: [[two, five]], befores: [[three, four]] };
      const board = { version: session.version, sets: session.sets, ...rules };
      const put = {
        ...board,
        sets: session.sets.map((set) => ({
          id: set.id,
          entries: set.entries.map((entry) => ({ id: entry.id, tuneId: entry.tuneId })),
        })),
      };
      session = (await host.caller.put(`${path}/board`).send(put).expect(200)).body as Session;
      const { sets, after } = await suggest();
      const answer = await heldBack({ sets });
      const stateless = async (more: object) => {
        const body = {
          ...{ chairs: session.chairs, openings: session.openings, sets: [at(1, 2, 3), [], at(4, 5)] },
          tunes: ids.map((id, index) => ({
            ...{ id, key: 'D', mode: 'major', rhythm: 'reel' },
            tunings: [{ kind: 'fiddle', accepted: [{ tuning: TUNINGS[index]! }] }],
          })),
          ...{ pins: { [one]: 0 }, ...rules, ...more },
        };
        return ((await host.caller.post('/api/suggest').send(body).expect(200)).body as SuggestAnswer).score;
      };
      expect(await stateless({})).toEqual(after);
      const said = new Map(answer.items.map(({ rule, score }): [string, Score] => [rule, score]));
      expect(said.get('pin')).toEqual(await stateless({ pins: {} }));
      expect(said.get('medley')).toEqual(await stateless({ medleys: [] }));
      expect(said.get('before')).toEqual(await stateless({ befores: [] }));
      const medley = answer.items.find(({ rule }) => rule === 'medley');
      expect(medley?.words).toMatch(/^If Tune 2 and Tune 5 were no medley: /);
    });

    it('is told to hosts who send an order of the board, and to nobody else', async () => {
      await heldBack({}, 400);
      await heldBack({ sets: [ids] }, 422);
      await player.caller
        .post(`${path}/suggestion/held-back`)
        .send({ sets: [ids] })
        .expect(403);
    });
  });

  describe('an order of one set', () => {
    it('leaves every other set as it is, and is the best of that set', async () => {
      const entries = session.sets.map((set) => ({
        id: set.id,
        entries: set.entries.map(({ id, tuneId }) => ({ id, tuneId })),
      }));
      const free = { version: session.version, sets: entries, medleys: [], befores: [] };
      session = (await host.caller.put(`${path}/board`).send(free).expect(200)).body as Session;
      const [first, , last] = session.sets;
      const whole = await suggest();
      const one = await suggest({ setId: last!.id });
      expect(one.sets[0]).toEqual(at(1, 2, 3));
      expect([...one.sets[2]!].sort()).toEqual([...at(4, 5)].sort());
      expect(one.optimal).toBe(true);
      expect(one.after.pegChanges).toBeGreaterThanOrEqual(whole.after.pegChanges);
      // Two tunes: both orders by hand.
      const both = await Promise.all(
        [at(4, 5), at(5, 4)].map((set) => explanation({ sets: [at(1, 2, 3), [], set] })),
      );
      const least = Math.min(...both.map(({ score }) => score.pegChanges));
      expect(one.after.pegChanges).toBe(least);
      expect((await suggest({ setId: first!.id })).sets[2]).toEqual(at(4, 5));
      await suggest({ setId: circleId }, 422);
    });

    it('needs no rule that another set breaks already, and then claims pegs and stops alone', async () => {
      const tune = await buildTune(host, circleId, { title: 'Apart', tunings: [] });
      const { id } = await buildSession(host, circleId);
      const entry = () => ({ tuneId: tune.id });
      const sets = [{ entries: [entry(), entry(), entry()] }, { entries: [entry(), entry()] }];
      const put = async (body: object) =>
        (await host.caller.put(`/api/sessions/${id}/board`).send(body).expect(200)).body as Session;
      const bare = await put({ version: 1, sets });
      const [a, b, c, d] = bare.sets.flatMap((set) => set.entries.map((each) => each.id));
      const board = {
        version: bare.version,
        sets: bare.sets.map((set) => ({
          ...{ id: set.id, title: set.title },
          entries: set.entries.map((each) => ({ id: each.id, tuneId: each.tuneId })),
        })),
        ...{ medleys: [[a, c]], befores: [[d, b]] },
      };
      const broken = await put(board);
      const suggestion = await host.caller
        .post(`/api/sessions/${id}/suggestion`)
        .send({ setId: broken.sets[1]!.id })
        .expect(200);
      expect(suggestion.body).toMatchObject({ provenLevels: 2, optimal: false });
    });
  });
});
