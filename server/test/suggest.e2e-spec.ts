import type { SessionSuggestion, SuggestAnswer } from '@pegwell/shared/contract/ordering';
import type { Session } from '@pegwell/shared/contract/sessions';
import { startApp, type TestApp } from './app';
import { buildAccount, buildCircle, buildFiddleTune, buildSession, type Person } from './build';

/** The tunes of both worked examples of the score's definition. */
const TUNINGS = ['GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE'] as const;
const five = TUNINGS.map((tuning, index) => ({
  id: String(index + 1),
  key: 'D',
  mode: 'major',
  rhythm: 'reel',
  tunings: [{ kind: 'fiddle', accepted: [{ tuning }] }],
}));

describe('suggestions', () => {
  let test: TestApp;
  let person: Person;
  beforeAll(async () => {
    test = await startApp();
    person = await buildAccount(test);
  });
  afterAll(() => test.close());

  const suggest = async (body: object, status = 200) =>
    (await person.caller.post('/api/suggest').send(body).expect(status)).body as SuggestAnswer;
  const room = (count: number) => ({ chairs: [{ kind: 'fiddle', count }], openings: { fiddle: 'GDAE' } });

  it('finds the best order of worked example 1 and proves it', async () => {
    const answer = await suggest({ ...room(1), tunes: five, sets: [['1', '2', '3', '4', '5']] });
    expect(answer).toMatchObject({ optimal: true, provenLevels: 7, lowerBound: 2 });
    expect(answer.score).toMatchObject({ pegChanges: 2, retuneStops: 2, semitones: 4 });
  });

  it('finds the best order of worked example 2: sets of three and two, five fiddles', async () => {
    const sets = [
      ['1', '2', '3'],
      ['4', '5'],
    ];
    const answer = await suggest({ ...room(5), tunes: five, sets });
    expect(answer.score).toMatchObject({
      pegChanges: 10,
      offClockPegChanges: 5,
      retuneStops: 1,
      semitones: 20,
    });
    expect(answer.sets.map((set) => set.length)).toEqual([3, 2]);
  });

  it('keeps pins, medleys and before/after, and prefers fewest stops when asked to', async () => {
    const answer = await suggest({
      ...room(1),
      goal: 'stops',
      tunes: five,
      sets: [['1', '2', '3', '4', '5']],
      pins: { '2': 0 },
      medleys: [['4', '3']],
      befores: [['5', '1']],
    });
    const order = answer.sets.flat();
    expect(order[0]).toBe('2');
    expect(order.indexOf('3')).toBe(order.indexOf('4') + 1);
    expect(order.indexOf('5')).toBeLessThan(order.indexOf('1'));
  });

  it('names rules that clash, and none that could be left out', async () => {
    const answer = await suggest(
      { ...room(1), tunes: five, sets: [['1', '2', '3', '4', '5']], pins: { '1': 2, '3': 2, '5': 4 } },
      422,
    );
    expect(answer).toMatchObject({ code: 'rules-clash' });
    const { clashes, detail } = answer as unknown as {
      clashes: { rule: string; ids: string[] }[];
      detail: string;
    };
    expect(clashes.map(({ rule, ids }) => `${rule} ${ids.join()}`).sort()).toEqual(['pin 1', 'pin 3']);
    expect(detail).toBe('1 and 3 are both pinned to place 3.');
  });

  it('answers an empty evening with zeros, proved, and refuses pins of nobody', async () => {
    const empty = await suggest({ ...room(1), tunes: [], sets: [] });
    expect(empty).toMatchObject({ optimal: true, provenLevels: 7, lowerBound: 0, sets: [] });
    await suggest({ ...room(1), tunes: five, sets: [['1', '2', '3', '4', '5']], pins: { '9': 0 } }, 422);
  });

  it('answers with a limit of no time at all, and says so where it stopped', async () => {
    const answer = await suggest({ ...room(1), tunes: five, sets: [['1', '2', '3', '4', '5']], limitMs: 0 });
    expect(answer.sets.flat().sort()).toEqual(['1', '2', '3', '4', '5']);
    expect(answer.score.pegChanges).toBeLessThanOrEqual(6);
  });

  describe('of a stored evening', () => {
    let host: Person;
    let session: Session;
    beforeAll(async () => {
      const built = await buildCircle(test);
      host = built.host;
      const tunes = [];
      for (const [index, tuning] of TUNINGS.entries()) {
        tunes.push(await buildFiddleTune(host, built.circle.id, `Tune ${index + 1}`, tuning));
      }
      const { id } = await buildSession(host, built.circle.id);
      const sets = [{ entries: tunes.map((tune) => ({ tuneId: tune.id })) }, { title: 'Empty', entries: [] }];
      const saved = await host.caller.put(`/api/sessions/${id}/board`).send({ version: 1, sets }).expect(200);
      session = saved.body as Session;
    });

    it('says what moves, is taken as it is, and is refused when the board has changed or is another', async () => {
      const path = `/api/sessions/${session.id}/suggestion`;
      const suggestion = (await host.caller.post(path).send({}).expect(200)).body as SessionSuggestion;
      expect(suggestion).toMatchObject({ version: 2, optimal: true, provenLevels: 7, lowerBound: 2 });
      expect(suggestion.before).toEqual(session.score);
      expect(suggestion.after).toMatchObject({ pegChanges: 2, retuneStops: 2, semitones: 4 });
      const before = session.sets.flatMap((set) => set.entries.map(({ id }) => id));
      const after = suggestion.sets.flat();
      expect(suggestion.moved.sort()).toEqual(before.filter((id, index) => after[index] !== id).sort());

      const { version } = suggestion;
      await host.caller
        .post(`${path}/accept`)
        .send({ version, sets: [before.slice(1)] })
        .expect(422);
      await host.caller.post(`${path}/accept`).send({ version: 1, sets: suggestion.sets }).expect(409);
      const taken = await host.caller
        .post(`${path}/accept`)
        .send({ version, sets: suggestion.sets })
        .expect(200);
      expect(taken.body).toMatchObject({ version: 3, score: suggestion.after });
      // Sent again after a lost answer.
      await host.caller.post(`${path}/accept`).send({ version, sets: suggestion.sets }).expect(200);
      const again = (await host.caller.post(path).send({}).expect(200)).body as SessionSuggestion;
      expect(again.moved).toEqual([]);
    });
  });
});
