import type { SuggestAnswer } from '@pegwell/shared/contract/ordering';
import { Solver } from '../src/ordering/solver/solver';
import { startApp, type TestApp } from './app';
import { buildAccount, type Person } from './build';

const FIDDLE = [
  'GDAE',
  'AEAE',
  'ADAE',
  'AEAC#',
  'GDGD',
  'DDAD',
  'GDAD',
  'AEAD',
  'EDAE',
  'EEAE',
  'FCGD',
  'GDGB',
];
FIDDLE.push('ADAD', 'G3 D4 A4 F5', 'G3 E4 A4 E5');
const BANJO = ['gDGBD', 'gCGCD', 'gCGBD', 'gDGCD', 'f#DF#AD', 'aDF#AD', 'gDGBbD', 'aDADE', 'aEADE', 'gDGAD'];
BANJO.push('gCGAD', 'gEGBD', 'gDGBE', 'gCGCE', 'gDACD');
const POOLS = { fiddle: FIDDLE, banjo: BANJO };

/** What stands in a body of /api/suggest; every problem is told, or an answer is given, and the thread lives on. */
interface Body {
  chairs: { kind: string; count: number }[];
  tunes: object[];
  sets: string[][];
  [more: string]: unknown;
}

function evening(count: number, tuningsOf: (tune: number, kind: 'fiddle' | 'banjo') => string[]): Body {
  const ids = Array.from({ length: count }, (_, index) => `${index + 1}`);
  const kinds = ['fiddle', 'banjo'] as const;
  return {
    chairs: kinds.map((kind) => ({ kind, count: 2 })),
    tunes: ids.map((id, tune) => ({
      id,
      key: ['D', 'A', 'G', 'C'][tune % 4],
      rhythm: tune % 7 === 0 ? 'waltz' : 'reel',
      tunings: kinds.map((kind) => ({
        kind,
        accepted: tuningsOf(tune, kind).map((tuning) => ({ tuning })),
      })),
    })),
    sets: [ids.slice(0, count / 2), ids.slice(count / 2)],
  };
}
const plain = (count: number): Body => evening(count, (tune, kind) => [POOLS[kind][(tune * 5) % 7]!]);
const six = {
  ...plain(6),
  sets: [
    ['1', '2', '3'],
    ['4', '5', '6'],
  ],
};

describe('what no host should ask for', () => {
  let test: TestApp;
  let person: Person;
  beforeAll(async () => {
    test = await startApp();
    person = await buildAccount(test);
  });
  afterAll(() => test.close());

  /** An answer within a time that is no hang even on a machine ten times slower. */
  async function ask(body: object): Promise<{ status: number; body: SuggestAnswer & Problem }> {
    const begun = performance.now();
    const { status, body: answer } = await person.caller.post('/api/suggest').send(body);
    expect(performance.now() - begun).toBeLessThan(60_000);
    return { status, body: answer as SuggestAnswer & Problem };
  }
  interface Problem {
    code: string;
    detail: string;
    errors: { path: string; message: string }[];
  }

  /** Piscina would put a new thread in a lost one's place, cold and in silence. */
  const thread = (): number =>
    test.app.get<Solver, { started: { threads: { threadId: number }[] } }>(Solver).started.threads[0]!
      .threadId;

  it('is answered, in the same thread to the end', async () => {
    expect((await ask(six)).body).toMatchObject({ optimal: true });
    const first = thread();
    const bodies: [string, Body][] = [
      ['no tunes', { ...plain(0), sets: [] }],
      ['no tunes in sets that are there', { ...plain(0), sets: [[], []] }],
      ['one tune', plain(1)],
      ['nobody in the room', { ...plain(6), chairs: [] }],
      ['all the same', evening(40, () => ['any'])],
      ['300 tunes', plain(300)],
      [
        '15 tunings a kind',
        evening(60, (tune, kind) => [POOLS[kind][(tune * (kind === 'fiddle' ? 1 : 7)) % 15]!]),
      ],
      [
        '20 accepted tunings',
        evening(24, (tune, kind) => Array.from({ length: 20 }, (_, n) => POOLS[kind][(n + tune) % 15]!)),
      ],
      ['a limit of 0', { ...plain(60), limitMs: 0 }],
    ];
    for (const [name, body] of bodies) {
      const { status, body: answer } = await ask(body);
      expect({ name, status }).toEqual({ name, status: 200 });
      expect(answer.sets.map(({ length }) => length)).toEqual(body.sets.map(({ length }) => length));
      expect(answer.sets.flat().sort()).toEqual(body.sets.flat().sort());
      const scored = await person.caller
        .post('/api/score')
        .send({ ...body, limitMs: undefined, sets: answer.sets });
      expect({ name, body: scored.body }).toMatchObject({ name, body: { score: answer.score } });
      if (body['limitMs'] === 0) expect(answer.stopped).toBe('time');
    }
    expect(thread()).toBe(first);
  });

  it.each([
    ['a pin past the end', { pins: { '2': 6 } }, '2 is pinned to place 7, and there are only 6.'],
    ['two pins on one place', { pins: { '2': 3, '5': 3 } }, '2 and 5 are both pinned to place 4.'],
    [
      'a medley across a pin',
      { pins: { '2': 1, '5': 2 }, medleys: [['2', '3']] },
      '2 is pinned to place 2, 5 is pinned to place 3, and 2 and 3 are one medley: these cannot all hold.',
    ],
    [
      'a medley across a break',
      { pins: { '2': 2 }, medleys: [['2', '3']] },
      '2 is pinned to place 3, and there the medley of 2 and 3 does not fit into one set.',
    ],
    [
      'a circle of pairs',
      {
        befores: [
          ['1', '2'],
          ['2', '3'],
          ['3', '1'],
        ],
      },
      '1 must come before 2, 2 before 3, and 3 before 1.',
    ],
    [
      'pins against a pair',
      { pins: { '3': 1, '6': 4 }, befores: [['6', '3']] },
      '3 is pinned to place 2 but must come after 6, which is pinned to place 5.',
    ],
  ])('is a sentence where rules clash: %s', async (_, rules, sentence) => {
    expect(await ask({ ...six, ...rules })).toMatchObject({
      status: 422,
      body: { code: 'rules-clash', detail: sentence },
    });
  });

  it.each([
    [
      'a tune that stands in no set',
      {
        sets: [
          ['1', '2', '3'],
          ['4', '5'],
        ],
      },
      'tunes.5.id',
      '6 stands in no set.',
    ],
    [
      'a tune that stands in two',
      {
        sets: [
          ['1', '2', '3'],
          ['4', '5', '6', '1'],
        ],
      },
      'sets.1.3',
      '1 stands in the sets twice.',
    ],
    [
      'a set with a tune of nobody',
      {
        sets: [
          ['1', '2', '3', '9'],
          ['4', '5', '6'],
        ],
      },
      'sets.0.3',
      'No tune has the label 9.',
    ],
    ['a pair of one tune', { befores: [['1', '1']] }, 'befores.0.1', '1 is named twice.'],
    ['a pin of nobody', { pins: { '9': 0 } }, 'pins.9', 'No tune has the label 9.'],
    ['an opening with too few strings', { openings: { fiddle: 'GDA' } }, 'openings.fiddle', /4 strings/],
    [
      'a tuning with too few strings',
      {
        tunes: [{ id: '1', key: 'D', tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'GDA' }] }] }],
        sets: [['1']],
      },
      'tunes.0.tunings.0.accepted.0.tuning',
      /4 strings/,
    ],
  ])('is refused with its place: %s', async (_, change, path, message) => {
    const { status, body } = await ask({ ...six, ...change });
    expect(status).toBe(422);
    expect(body.errors).toEqual([
      { path, message: typeof message === 'string' ? message : expect.stringMatching(message) },
    ]);
  });
});
