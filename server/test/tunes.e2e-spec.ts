import { Client } from 'pg';
import type { Circle } from '@pegwell/shared/contract/circles';
import type { Page } from '@pegwell/shared/contract/page';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { startApp, type TestApp } from './app';
import { buildCircle, buildFiddleTune, buildMember, buildSession, buildTune, type Person } from './build';

const NOWHERE = '5b0d6b0a-3f0e-4d43-9a5e-0c5a1f8f2f77';

describe('the library', () => {
  let test: TestApp;
  let host: Person;
  let circle: Circle;
  beforeAll(async () => {
    test = await startApp();
    ({ circle, host } = await buildCircle(test));
  });
  afterAll(() => test.close());

  const path = (rest = '') => `/api/circles/${circle.id}/tunes${rest}`;

  describe('a tune', () => {
    it('is made with everything that it says, and shown with what is assumed for the rest', async () => {
      const answer = await host.caller
        .post(path())
        .send({
          ...{ title: '  Lantern Hill ', key: 'A', mode: 'modal', rhythm: 'Breakdown', parts: 'AABB' },
          ...{ composer: 'traditional', source: 'a field recording', notes: 'crooked B part' },
          tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'AEAE' }, { tuning: 'G3 D4 A4 E5' }] }],
        })
        .expect(201);
      const tune = answer.body as Tune;
      expect(tune).toMatchObject({
        ...{ title: 'Lantern Hill', key: 'A', mode: 'modal', rhythm: 'Breakdown', parts: 'AABB' },
        ...{ composer: 'traditional', source: 'a field recording', notes: 'crooked B part' },
        tunings: [
          {
            kind: 'fiddle',
            accepted: [
              { tuning: 'AEAE', pitches: ['A3', 'E4', 'A4', 'E5'], capo: 0 },
              { tuning: 'GDAE', pitches: ['G3', 'D4', 'A4', 'E5'], capo: 0 },
            ],
          },
        ],
        // The circle's usual tunings, built in: banjo A modal is gDGCD with capo 2.
        assumed: [
          {
            kind: 'banjo',
            accepted: [{ tuning: 'gDGCD', pitches: ['G4', 'D3', 'G3', 'C4', 'D4'], capo: 2 }],
          },
        ],
        can: ['tunes.read', 'tunes.change'],
      });
      await host.caller
        .get(path(`/${tune.id}`))
        .expect(200)
        .expect(({ body }) => expect(body).toEqual(tune));
    });

    it('needs no more than a title, a key and a mode; a capo is 0 unless said, and a capo spelling is read', async () => {
      const tune = await buildTune(host, circle.id, {
        rhythm: undefined,
        tunings: [{ kind: 'banjo', accepted: [{ tuning: 'aDADE' }, { tuning: 'gDGBD', capo: 2 }] }],
      });
      expect(tune.rhythm).toBeNull();
      expect(tune.tunings[0]!.accepted).toEqual([
        { tuning: 'gCGCD', pitches: ['G4', 'C3', 'G3', 'C4', 'D4'], capo: 2 },
        { tuning: 'gDGBD', pitches: ['G4', 'D3', 'G3', 'B3', 'D4'], capo: 2 },
      ]);
    });

    it('keeps pitches as spelled, and says `any` only where it was said', async () => {
      const tune = await buildTune(host, circle.id, {
        tunings: [
          { kind: 'guitar', accepted: [{ tuning: 'any' }] },
          { kind: 'fiddle', accepted: [{ tuning: 'AEADb' }] },
          { kind: 'mandolin', accepted: [] },
        ],
      });
      expect(tune.tunings).toEqual([
        {
          kind: 'fiddle',
          accepted: [{ tuning: 'AEADb', pitches: ['A3', 'E4', 'A4', 'Db5'], capo: 0 }],
        },
        { kind: 'guitar', accepted: [{ tuning: 'any', pitches: null, capo: 0 }] },
      ]);
    });

    it('changes what is sent and keeps what is not', async () => {
      const tune = await buildFiddleTune(host, circle.id, 'Cold Kettle', 'AEAE');
      const changed = await host.caller
        .patch(path(`/${tune.id}`))
        .send({ key: 'Bb', notes: 'slow', rhythm: null })
        .expect(200);
      expect(changed.body).toEqual({
        ...tune,
        ...{ key: 'Bb', notes: 'slow', rhythm: null, assumed: [] },
        updatedAt: expect.any(String),
      });
      const again = await host.caller
        .patch(path(`/${tune.id}`))
        .send({ key: 'Bb' })
        .expect(200);
      expect(again.body).toEqual(changed.body);
      const tunings = [{ kind: 'fiddle', accepted: [{ tuning: 'any' }] }];
      const other = await host.caller
        .patch(path(`/${tune.id}`))
        .send({ tunings })
        .expect(200);
      expect((other.body as Tune).tunings).toEqual([
        { kind: 'fiddle', accepted: [{ tuning: 'any', pitches: null, capo: 0 }] },
      ]);
    });

    it('is removed and brought back as it was', async () => {
      const tune = await buildFiddleTune(host, circle.id, 'Gone Tomorrow', 'GDGD');
      await host.caller.delete(path(`/${tune.id}`)).expect(204);
      await host.caller.get(path(`/${tune.id}`)).expect(404);
      await host.caller.delete(path(`/${tune.id}`)).expect(404);
      await host.caller
        .patch(path(`/${tune.id}`))
        .send({ title: 'x' })
        .expect(404);
      expect(await titles({ search: 'gone tomorrow' })).toEqual([]);
      const back = await host.caller.post(path(`/${tune.id}/restore`)).expect(200);
      expect(back.body).toEqual(tune);
      await host.caller.post(path(`/${tune.id}/restore`)).expect(200);
      expect(await titles({ search: 'gone tomorrow' })).toEqual(['Gone Tomorrow']);
    });

    it('leaves its history, with how it was before', async () => {
      const tune = await buildFiddleTune(host, circle.id, 'History', 'AEAE');
      await host.caller.patch(path(`/${tune.id}`)).send({ title: 'Histories' });
      await host.caller.patch(path(`/${tune.id}`)).send({ title: 'Histories' });
      await host.caller.delete(path(`/${tune.id}`));
      await host.caller.post(path(`/${tune.id}/restore`));
      const client = new Client({ connectionString: test.env.DATABASE_URL });
      await client.connect();
      const { rows } = await client.query<{ what: string; before: { title: string }; account_id: string }>(
        'select what, before, account_id from events where subject_id = $1 order by at',
        [tune.id],
      );
      await client.end();
      const happened = rows.map(({ what }) => what);
      expect(happened).toEqual(['tune.created', 'tune.changed', 'tune.removed', 'tune.restored']);
      expect(rows[1]).toMatchObject({
        ...{ before: { title: 'History' }, account_id: host.id },
      });
    });

    it('tells phones when it changes, and not when it was said again', async () => {
      const tune = await buildFiddleTune(host, circle.id, 'Announced', 'AEAE');
      await buildSession(host, circle.id);
      const version = async () => {
        const client = new Client({ connectionString: test.env.DATABASE_URL });
        await client.connect();
        const { rows } = await client.query<{ sum: string }>(
          'select coalesce(sum(version), 0) as sum from follow_versions',
        );
        await client.end();
        return Number(rows[0]!.sum);
      };
      const before = await version();
      await host.caller.patch(path(`/${tune.id}`)).send({ title: 'Announced' });
      expect(await version()).toBe(before);
      await host.caller.patch(path(`/${tune.id}`)).send({ title: 'Announced anew' });
      expect(await version()).toBe(before + 1);
    });
  });

  describe('what cannot be', () => {
    const refused = async (fields: Record<string, unknown>, status: number) => {
      const body = { title: 'Bad', key: 'A', mode: 'major', ...fields };
      const answer = await host.caller.post(path()).send(body).expect(status);
      return (answer.body as { errors: { path: string; message: string }[] }).errors;
    };

    it.each([
      [{ title: undefined }, 'title', 'A title is missing.'],
      [{ title: '  ' }, 'title', 'A title is missing.'],
      [{ title: 'a\u0000b' }, 'title', 'A title has characters that cannot be shown.'],
      [{ key: undefined }, 'key', 'A key is missing.'],
      [{ key: 'H' }, 'key', 'A key is a letter A to G, with # or b where it has one.'],
      [{ mode: 'sad' }, 'mode', expect.stringMatching(/^A mode is one of major, minor/)],
      [{ rhythm: 'a\u0000' }, 'rhythm', 'A rhythm has characters that cannot be shown.'],
      [{ tempo: 100 }, 'tempo', 'There is no field "tempo" here.'],
    ])('says 400 for %j', async (fields, where, message) => {
      expect(await refused(fields, 400)).toEqual([{ path: where, message }]);
    });

    const fiddle = (...accepted: string[]) => ({
      kind: 'fiddle',
      accepted: accepted.map((tuning) => ({ tuning })),
    });

    it.each([
      [[fiddle('GDA')], 'tunings.0.accepted.0.tuning', /^A fiddle has 4 strings; GDA names 3: G D A\.$/],
      [[fiddle('AEAE', 'GXAE')], 'tunings.0.accepted.1.tuning', /could not be read/],
      [[fiddle('GDAE', 'any')], 'tunings.0.accepted.1.tuning', /stands alone/],
      [[{ kind: 'kazoo', accepted: [] }], 'tunings.0.kind', /^kazoo is no instrument/],
      [[fiddle('GDAE'), fiddle('AEAE')], 'tunings.1.kind', /^Fiddle is named twice/],
    ])('says 422 for the tunings %j', async (tunings, where, message) => {
      const errors = await refused({ tunings }, 422);
      expect(errors).toEqual([{ path: where, message: expect.stringMatching(message) }]);
    });

    it('says all of it, and stores none', async () => {
      const errors = await refused({ title: 'All Of It', tunings: [fiddle('GDA', 'GDAE', 'H')] }, 422);
      expect(errors.map((error) => error.path)).toEqual([
        'tunings.0.accepted.0.tuning',
        'tunings.0.accepted.2.tuning',
      ]);
      expect(await titles({ search: 'all of it' })).toEqual([]);
    });

    it('is not there with a malformed id', async () => {
      await host.caller.get(path('/not-an-id')).expect(404);
      await host.caller.patch(path('/not-an-id')).send({ title: 'x' }).expect(404);
      await host.caller.get(path(`/${NOWHERE}`)).expect(404);
    });
  });

  describe('who may', () => {
    it('lets players read and not write, and shows strangers nothing', async () => {
      const player = await buildMember(test, circle, host, 'player');
      const cohost = await buildMember(test, circle, host, 'cohost');
      const { host: stranger } = await buildCircle(test);
      const tune = await buildFiddleTune(cohost, circle.id, 'Shared', 'AEAE');
      const one = path(`/${tune.id}`);
      await player.caller
        .get(one)
        .expect(200)
        .expect(({ body }) => expect(body).toMatchObject({ can: ['tunes.read'] }));
      for (const [who, status] of [
        [player, 403],
        [stranger, 404],
      ] as const) {
        await who.caller.post(path()).send({ title: 'x', key: 'A', mode: 'major' }).expect(status);
        await who.caller.patch(one).send({ title: 'x' }).expect(status);
        await who.caller.delete(one).expect(status);
        await who.caller.post(`${one}/restore`).expect(status);
      }
      await stranger.caller.get(path()).expect(404);
      await stranger.caller.get(one).expect(404);
      await test.caller().get(one).expect(401);
    });

    it("does not reach a tune through another circle's address", async () => {
      const tune = await buildFiddleTune(host, circle.id, 'At Home', 'AEAE');
      const { circle: other, host: stranger } = await buildCircle(test);
      const away = `/api/circles/${other.id}/tunes/${tune.id}`;
      await stranger.caller.get(away).expect(404);
      await stranger.caller.patch(away).send({ title: 'Stolen' }).expect(404);
      await stranger.caller.delete(away).expect(404);
      await stranger.caller.post(`${away}/restore`).expect(404);
    });
  });

  const titles = async (query: Record<string, string | number>, at = circle.id): Promise<string[]> => {
    const answer = await host.caller.get(`/api/circles/${at}/tunes`).query(query).expect(200);
    return (answer.body as Page<Tune>).items.map(({ title }) => title);
  };

  describe('the table', () => {
    let shelf: Circle;
    const find = (query: Record<string, string | number>) => titles(query, shelf.id);

    beforeAll(async () => {
      const answer = await host.caller.post('/api/circles').send({ name: 'A shelf' }).expect(201);
      shelf = answer.body as Circle;
      const put = (title: string, key: string, mode: string, rhythm: string, tunings: [string, string][]) =>
        buildTune(host, shelf.id, {
          ...{ title, key, mode, rhythm },
          tunings: tunings.map(([kind, cell]) => ({
            kind,
            accepted: cell.split(' or ').map((text) => {
              const [tuning, capo] = text.split(' capo ');
              return { tuning, capo: Number(capo ?? 0) };
            }),
          })),
        });
      // Titles are traditional or invented; their tunings are made up to tell them apart.
      await put('Mná na hÉireann', 'E', 'minor', 'air', [['fiddle', 'GDAE']]);
      await put("Soldier's Joy", 'D', 'major', 'Reel', [['fiddle', 'ADAE or GDAE']]);
      await put('Calico Morning', 'A', 'major', 'reel', [
        ['fiddle', 'AEAC#'],
        ['banjo', 'gDGBD capo 2'],
      ]);
      await put('Blue Ford', 'A#', 'dorian', 'jig', [['fiddle', 'any']]);
      await put('Silent Ford', 'G', 'major', 'reel', []);
      await put('Old Ford', 'G', 'minor', 'waltz', [['banjo', 'gDGBD']]);
    });

    it.each([
      ['soldiers joy', ["Soldier's Joy"]],
      ['SOLDIER’S', ["Soldier's Joy"]],
      ['mna na heir', ['Mná na hÉireann']],
      ['ford', ['Blue Ford', 'Old Ford', 'Silent Ford']],
      ['  ford ', ['Blue Ford', 'Old Ford', 'Silent Ford']],
      ['%', []],
      ['_', []],
      ['', ALL()],
    ])('finds %j, whatever the case, the accents and the apostrophes', async (search, found) => {
      expect(await find({ search })).toEqual(found);
    });

    function ALL() {
      return ['Blue Ford', 'Calico Morning', 'Mná na hÉireann', 'Old Ford', 'Silent Ford', "Soldier's Joy"];
    }

    it.each([
      // Spelled differently, sounding alike: tunings are equal when their MIDI numbers are.
      [{ kind: 'fiddle', tuning: 'AEADb' }, ['Calico Morning']],
      [{ kind: 'fiddle', tuning: 'a3 e4 a4 c#5' }, ['Calico Morning']],
      // A second choice is accepted too; where a tune is silent, the usual tuning stands (fiddle GDAE).
      [{ kind: 'fiddle', tuning: 'GDAE' }, ['Mná na hÉireann', 'Old Ford', 'Silent Ford', "Soldier's Joy"]],
      [{ kind: 'fiddle', tuning: 'ADAE' }, ["Soldier's Joy"]],
      [{ kind: 'fiddle', tuning: 'any' }, ['Blue Ford']],
      [{ kind: 'fiddle', tuning: '' }, ['Blue Ford', 'Calico Morning', 'Mná na hÉireann', "Soldier's Joy"]],
      // Pegs, whatever the capo; with a fret only that one. G major is assumed to be gDGBD without.
      [{ kind: 'banjo', tuning: 'gDGBD' }, ['Calico Morning', 'Old Ford', 'Silent Ford']],
      [{ kind: 'banjo', tuning: 'gDGBD capo 2' }, ['Calico Morning']],
      [{ kind: 'banjo', tuning: 'gDGBD capo 0' }, ['Old Ford', 'Silent Ford']],
      [{ kind: 'banjo', tuning: 'aEAC#E' }, ['Calico Morning']],
      [{ kind: 'banjo' }, ['Calico Morning', 'Old Ford']],
      [{ kind: 'bass', tuning: 'EADG' }, []],
      [{ key: 'Bb' }, ['Blue Ford']],
      [{ key: 'G', mode: 'minor' }, ['Old Ford']],
      [{ rhythm: 'REEL' }, ['Calico Morning', 'Silent Ford', "Soldier's Joy"]],
      [{ search: 'ford', kind: 'banjo', tuning: 'gDGBD', key: 'G', rhythm: 'reel' }, ['Silent Ford']],
      [{ search: 'ford', kind: '', tuning: '', key: '', mode: '', rhythm: 'jig' }, ['Blue Ford']],
    ] as [Record<string, string>, string[]][])('filters by %j', async (query, found) => {
      expect(await find(query)).toEqual(found);
    });

    it("takes the circle's own usual tunings where a tune is silent", async () => {
      await host.caller
        .put(`/api/circles/${shelf.id}/usual-tunings`)
        .send({ items: [{ kind: 'bass', key: 'G', family: 'major', tuning: 'EADG' }] })
        .expect(200);
      expect(await find({ kind: 'bass', tuning: 'EADG' })).toEqual(['Silent Ford']);
      const [tune] = (
        (await host.caller.get(`/api/circles/${shelf.id}/tunes`).query({ search: 'silent' }))
          .body as Page<Tune>
      ).items;
      expect(tune!.assumed.map(({ kind }) => kind)).toEqual(['fiddle', 'banjo', 'bass']);
      await host.caller.put(`/api/circles/${shelf.id}/usual-tunings`).send({ items: [] }).expect(200);
    });

    it.each([
      ['-title', [...ALL()].reverse()],
      ['key', ['Calico Morning', 'Blue Ford', "Soldier's Joy", 'Mná na hÉireann', 'Silent Ford', 'Old Ford']],
      [
        'rhythm',
        ['Mná na hÉireann', 'Blue Ford', 'Calico Morning', 'Silent Ford', "Soldier's Joy", 'Old Ford'],
      ],
      [
        'updated',
        ['Mná na hÉireann', "Soldier's Joy", 'Calico Morning', 'Blue Ford', 'Silent Ford', 'Old Ford'],
      ],
      [
        '-updated',
        ['Old Ford', 'Silent Ford', 'Blue Ford', 'Calico Morning', "Soldier's Joy", 'Mná na hÉireann'],
      ],
    ])('sorts by %s', async (sort, sorted) => {
      expect(await find({ sort })).toEqual(sorted);
    });

    it('gives every tune once over the pages, also where all are alike', async () => {
      const answer = await host.caller.post('/api/circles').send({ name: 'Pages' }).expect(201);
      const pages = answer.body as Circle;
      for (let made = 0; made < 7; made++) await buildTune(host, pages.id, { title: 'Same' });
      const seen: string[] = [];
      for (const page of [1, 2, 3, 4]) {
        const at = await host.caller
          .get(`/api/circles/${pages.id}/tunes`)
          .query({ page, pageSize: 3, sort: 'rhythm' })
          .expect(200);
        const body = at.body as Page<Tune>;
        expect(body).toMatchObject({ total: 7, page, pageSize: 3 });
        seen.push(...body.items.map(({ id }) => id));
      }
      expect(seen).toHaveLength(7);
      expect(new Set(seen).size).toBe(7);
    });

    it.each([
      [{ tuning: 'AEAE' }, 400, 'tuning'],
      [{ pageSize: '201' }, 400, 'pageSize'],
      [{ key: 'H' }, 400, 'key'],
      [{ mode: 'sad' }, 400, 'mode'],
      [{ rhythm: 'a\u0000' }, 400, 'rhythm'],
      [{ colour: 'red' }, 400, 'colour'],
      [{ kind: 'kazoo' }, 422, 'kind'],
      [{ kind: 'fiddle', tuning: 'GDA' }, 422, 'tuning'],
    ] as [Record<string, string>, number, string][])(
      'refuses %j with %i at %s',
      async (query, status, where) => {
        const answer = await host.caller.get(path()).query(query).expect(status);
        expect((answer.body as { errors: unknown[] }).errors).toMatchObject([{ path: where }]);
      },
    );
  });
});
