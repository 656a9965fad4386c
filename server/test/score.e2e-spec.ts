import { startApp, type TestApp } from './app';
import { buildAccount, type Person } from './build';

/** One fiddle tune in D. */
const tune = (id: string, ...tunings: string[]) => ({
  id,
  key: 'D',
  mode: 'major',
  rhythm: 'reel',
  tunings: [{ kind: 'fiddle', accepted: tunings.map((tuning) => ({ tuning })) }],
});

/** The tunes of both worked examples of the score's definition. */
const five = [tune('1', 'GDAE'), tune('2', 'AEAE'), tune('3', 'GDAE'), tune('4', 'ADAE'), tune('5', 'AEAE')];

describe('POST /api/score', () => {
  let test: TestApp;
  let person: Person;
  beforeAll(async () => {
    test = await startApp();
    person = await buildAccount(test);
  });
  afterAll(() => test.close());

  const post = (body: object, status = 200) => person.caller.post('/api/score').send(body).expect(status);

  it('scores worked example 1 of the definition: 6 pegs, 4 stops, 12 semitones', async () => {
    const { body } = await post({
      chairs: [{ kind: 'fiddle', count: 1 }],
      openings: { fiddle: 'GDAE' },
      tunes: five,
      sets: [['1', '2', '3', '4', '5']],
    });
    expect((body as { score: unknown }).score).toEqual({
      pegChanges: 6,
      retuneStops: 4,
      ruleBreaks: 0,
      secondChoices: 0,
      capoMoves: 0,
      keyChanges: 0,
      semitones: 12,
      offClockPegChanges: 0,
    });
    const { places } = body as { places: unknown[] };
    expect(places).toHaveLength(5);
    expect(places[1]).toEqual({
      before: '2',
      offClock: false,
      pegChanges: 2,
      kinds: [
        {
          kind: 'fiddle',
          from: 'GDAE',
          to: 'AEAE',
          capoFrom: 0,
          capoTo: 0,
          deltas: [2, 2, 0, 0],
          pegChanges: 2,
        },
      ],
    });
  });

  it('scores worked example 2: two sets, five fiddles, 10 pegs of which 5 in the break, 1 stop, 20 semitones', async () => {
    const { body } = await post({
      chairs: [{ kind: 'fiddle', count: 5 }],
      openings: {},
      tunes: five,
      sets: [
        ['1', '3', '4'],
        ['2', '5'],
      ],
    });
    expect((body as { score: unknown }).score).toMatchObject({
      pegChanges: 10,
      offClockPegChanges: 5,
      retuneStops: 1,
      semitones: 20,
    });
  });

  it('shows a free kind as null until something is stated', async () => {
    const { body } = await post({
      chairs: [{ kind: 'banjo', count: 1 }],
      openings: { banjo: null },
      tunes: [
        { id: 'a', key: 'D', mode: 'major', tunings: [] },
        { id: 'b', key: 'D', mode: 'major', tunings: [{ kind: 'banjo', accepted: [{ tuning: 'aDADE' }] }] },
      ],
      sets: [['a', 'b']],
    });
    const places = (body as { places: { kinds: unknown[] }[] }).places;
    const free = { from: null, capoFrom: null, deltas: [0, 0, 0, 0, 0], pegChanges: 0 };
    expect(places[0]?.kinds).toEqual([{ kind: 'banjo', ...free, to: null, capoTo: null }]);
    // Double D is double C with the capo at 2 (27thstreet.me "Tuning tangle"; common practice).
    expect(places[1]?.kinds).toEqual([{ kind: 'banjo', ...free, to: 'gCGCD', capoTo: 2 }]);
  });

  it('names every place that cannot be', async () => {
    const { body } = await post(
      {
        chairs: [
          { kind: 'kazoo', count: 1 },
          { kind: 'fiddle', count: 1 },
        ],
        openings: { fiddle: 'GDA' },
        tunes: [tune('1', 'GDAX'), tune('1', 'GDAE'), tune('2', 'GDAE')],
        sets: [['1', '1', '9']],
      },
      422,
    );
    expect(body).toMatchObject({ code: 'cannot-be' });
    const paths = (body as { errors: { path: string }[] }).errors.map(({ path }) => path);
    expect(paths).toEqual([
      'chairs.0.kind',
      'openings.fiddle',
      'tunes.0.tunings.0.accepted.0.tuning',
      'tunes.1.id',
      'sets.0.1',
      'sets.0.2',
      'tunes.2.id',
    ]);
    // A fiddle has four strings; the sentence says what was expected and what was read.
    const opening = (body as { errors: { message: string }[] }).errors[1]?.message;
    expect(opening).toMatch(/4 strings/);
    expect(opening).toMatch(/G D A/);
  });

  it('scores an empty evening as zeros', async () => {
    const { body } = await post({ chairs: [], openings: {}, tunes: [], sets: [] });
    expect(Object.values((body as { score: object }).score)).toEqual([0, 0, 0, 0, 0, 0, 0, 0]);
  });

  it('refuses nonsense by schema', async () => {
    await post({ chairs: [], openings: {}, tunes: [], sets: [], goal: 'fun' }, 400);
    await post(
      { chairs: [], openings: {}, tunes: [{ id: 'a', key: 'H', mode: 'major' }], sets: [['a']] },
      400,
    );
    await test.caller().post('/api/score').send({}).expect(401);
  });
});
