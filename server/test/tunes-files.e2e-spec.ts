import { randomUUID } from 'node:crypto';
import { Client } from 'pg';
import type { Circle } from '@pegwell/shared/contract/circles';
import type { Page } from '@pegwell/shared/contract/page';
import {
  IMPORT_MAX_BYTES,
  type ImportProgress,
  type ImportReport,
  type Tune,
} from '@pegwell/shared/contract/tunes';
import { startApp, type TestApp } from './app';
import { buildCircle, buildMember, buildSession, buildTune, type Person } from './build';

const CSV = [
  'title,key,mode,rhythm,fiddle,banjo',
  'Lantern Hill,A,major,reel,AEAE or GDAE,gDGBD capo 2',
  'Cold Kettle,D dorian,,jig,any,',
  'No Key,,,,,',
  'Bad Tuning,A,,,GDA,',
].join('\r\n');

const ABC = `%abc-2.1
R:reel

X:1
T:Lantern Hill
%%pegwell-tuning fiddle AEAE or GDAE
K:A

X:2
T:Drums
K:none

X:3
T:Cold Kettle
T:The Hot Kettle
K:Ddor
`;

describe('files of tunes', () => {
  let test: TestApp;
  let host: Person;
  let circle: Circle;
  beforeAll(async () => void (test = await startApp()));
  afterAll(() => test.close());
  beforeEach(async () => void ({ circle, host } = await buildCircle(test)));

  const path = (rest = '') => `/api/circles/${circle.id}/tunes${rest}`;
  const send = (
    content: string | Buffer,
    name = 'tunes.csv',
    query: Record<string, string> = {},
    by = host,
  ) => by.caller.post(path('/import')).query(query).attach('file', Buffer.from(content), name);
  const take = async (content: string | Buffer, name?: string, query?: Record<string, string>) =>
    (await send(content, name, query).expect(200)).body as ImportReport;
  const list = async (): Promise<Page<Tune>> =>
    (await host.caller.get(path()).query({ pageSize: 200 }).expect(200)).body as Page<Tune>;
  const download = async (format: 'csv' | 'abc'): Promise<string> => {
    const answer = await host.caller
      .get(path('/export'))
      .query({ format })
      .buffer(true)
      .parse(asText)
      .expect(200);
    return answer.body as string;
  };
  const query = async <Row extends object>(statement: string, values: unknown[] = []): Promise<Row[]> => {
    const client = new Client({ connectionString: test.env.DATABASE_URL });
    await client.connect();
    const { rows } = await client.query<Row>(statement, values);
    await client.end();
    return rows;
  };

  describe('import', () => {
    it('reads a table, says line by line what became of it, and lets no bad tune stop the rest', async () => {
      const report = await take(CSV);
      expect(report).toEqual({
        ...{ format: 'csv', encoding: 'utf-8', importId: expect.any(String) },
        ...{ read: 4, created: 2, updated: 0, unchanged: 0, skipped: 2 },
        problems: [
          { line: 4, tune: 'No Key', message: expect.stringMatching(/^No key is given/) },
          { line: 5, tune: 'Bad Tuning', message: 'A fiddle has 4 strings; GDA names 3: G D A.' },
        ],
        tunes: [
          { line: 2, title: 'Lantern Hill', action: 'create', id: expect.any(String) },
          { line: 3, title: 'Cold Kettle', action: 'create', id: expect.any(String) },
          { line: 4, title: 'No Key', action: 'skip' },
          { line: 5, title: 'Bad Tuning', action: 'skip' },
        ],
      });
      const { items, total } = await list();
      expect(total).toBe(2);
      expect(items[1]).toMatchObject({
        ...{ id: report.tunes[0]!.id, title: 'Lantern Hill', key: 'A', mode: 'major', rhythm: 'reel' },
        tunings: [
          { kind: 'fiddle', accepted: [{ tuning: 'AEAE' }, { tuning: 'GDAE' }] },
          { kind: 'banjo', accepted: [{ tuning: 'gDGBD', capo: 2 }] },
        ],
      });
      expect(items[0]).toMatchObject({ title: 'Cold Kettle', key: 'D', mode: 'dorian' });
    });

    it('reads ABC headers', async () => {
      const report = await take(ABC, 'Tunes.ABC');
      expect(report).toMatchObject({
        ...{ format: 'abc', read: 3, created: 2, skipped: 1 },
        problems: [{ line: 11, tune: 'Drums' }],
        tunes: [
          { line: 4, title: 'Lantern Hill', action: 'create' },
          { line: 9, title: 'Drums', action: 'skip' },
          { line: 13, title: 'Cold Kettle', action: 'create' },
        ],
      });
      const { items } = await list();
      expect(items).toMatchObject([
        { title: 'Cold Kettle', key: 'D', mode: 'dorian', rhythm: 'reel', notes: 'Also: The Hot Kettle' },
        { title: 'Lantern Hill', key: 'A', mode: 'major', rhythm: 'reel' },
      ]);
    });

    it('changes nothing the second time, and only what is different the third', async () => {
      const first = await take(CSV);
      expect(await take(CSV)).toMatchObject({ created: 0, updated: 0, unchanged: 2, skipped: 2 });
      const third = await take('title,key,mode,notes\nLANTERN HILL,A,,slower\nCold Kettle,D,dorian,');
      expect(third).toMatchObject({
        ...{ created: 0, updated: 1, unchanged: 1 },
        tunes: [
          { title: 'LANTERN HILL', action: 'update', id: first.tunes[0]!.id },
          { title: 'Cold Kettle', action: 'unchanged', id: first.tunes[1]!.id },
        ],
      });
      const { items } = await list();
      expect(items[1]).toMatchObject({ notes: 'slower', rhythm: 'reel', mode: 'major' });
      expect(items[1]!.tunings).toHaveLength(2);
    });

    it('writes nothing in a dry run, and says the same', async () => {
      const dry = await take(CSV, 'tunes.csv', { dryRun: 'true', progress: randomUUID() });
      expect(dry).toMatchObject({ read: 4, created: 2, skipped: 2 });
      expect(dry.tunes[0]).toEqual({ line: 2, title: 'Lantern Hill', action: 'create' });
      expect((await list()).total).toBe(0);
      const { tunes, importId: __, ...real } = await take(CSV);
      expect({ ...real, tunes: tunes.map(({ id: _, ...rest }) => rest) }).toEqual(dry);
    });

    it('passes over the id of a tune of another circle', async () => {
      const { circle: other, host: stranger } = await buildCircle(test);
      const theirs = await buildTune(stranger, other.id, { title: 'Theirs' });
      const report = await take(`id,title,key\n${theirs.id},Mine,A`);
      expect(report.created).toBe(1);
      expect(report.tunes[0]!.id).not.toBe(theirs.id);
      await stranger.caller
        .get(`/api/circles/${other.id}/tunes/${theirs.id}`)
        .expect(200)
        .expect(({ body }) => expect(body).toMatchObject({ title: 'Theirs' }));
    });

    it('is one line of the history, with how it was before; phones hear of what changed', async () => {
      const tune = await buildTune(host, circle.id, { title: 'Lantern Hill', key: 'A', notes: 'as it was' });
      await buildSession(host, circle.id);
      const version = async () =>
        Number((await query<{ sum: string }>('select sum(version) from follow_versions'))[0]!.sum);
      const before = await version();
      await take('title,key,notes\nLantern Hill,A,as it is\nNew,D,');
      expect(await version()).toBe(before + 1);
      const rows = await query<{ before: Tune[]; after: { created: string[]; updated: Tune[] } }>(
        `select before, after from events where circle_id = $1 and what = 'tunes.imported'`,
        [circle.id],
      );
      expect(rows).toMatchObject([
        {
          before: [{ id: tune.id, notes: 'as it was' }],
          after: { created: [expect.any(String)], updated: [{ id: tune.id, notes: 'as it is' }] },
        },
      ]);
    });

    it('makes no twins when two imports run at once', async () => {
      await Promise.all([take(CSV), take(CSV), take(CSV)]);
      expect((await list()).total).toBe(2);
    });

    it.each([
      ['empty', Buffer.alloc(0), 'tunes.csv', 422, 'This file is empty.'],
      [
        'binary',
        Buffer.from([0x89, 0x50, 0x4e, 0x47, 0, 0, 0, 13]),
        'tunes.abc',
        422,
        'This file is not text.',
      ],
      [
        'no list of tunes',
        Buffer.from('Invoice,Total\nA-1,20'),
        'tunes.csv',
        422,
        /^This is no list of tunes: the first row has to name the columns/,
      ],
      [
        'too long',
        Buffer.from(`title,key\n${'x,A\n'.repeat(20_001)}`),
        'tunes.csv',
        422,
        /more than 20000 tunes/,
      ],
      ['of another kind', Buffer.from('title'), 'tunes.txt', 415, /\.csv or \.abc/],
      ['without extension', Buffer.from('title'), 'csv', 415, /\.csv or \.abc/],
    ])('refuses a file that is %s', async (_what, content, name, status, message) => {
      const answer = await send(content, name).expect(status);
      expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
      const sentence = typeof message === 'string' ? message : expect.stringMatching(message);
      expect(answer.body).toMatchObject({ status, errors: [{ path: 'file', message: sentence }] });
    });

    it('takes a file of exactly 10 MB and refuses a byte more', async () => {
      const most = Buffer.alloc(IMPORT_MAX_BYTES, ' ');
      most.write('title,key\nOne,A\n');
      await send(most, 'tunes.csv', { dryRun: 'true' }).expect(200);
      const answer = await send(Buffer.concat([most, Buffer.from(' ')])).expect(413);
      expect(answer.body).toMatchObject({ code: 'too-large', errors: [{ path: 'file' }] });
      await send(Buffer.alloc(3 * IMPORT_MAX_BYTES, 'x')).expect(413);
    });

    it('refuses an upload that is none', async () => {
      const post = () => host.caller.post(path('/import'));
      const at = { errors: [{ path: 'file' }] };
      expect((await post().expect(400)).body).toMatchObject(at);
      expect((await post().send({ file: 'x' }).expect(400)).body).toMatchObject(at);
      expect((await post().attach('data', Buffer.from('x'), 'a.csv').expect(400)).body).toMatchObject(at);
      const twice = post()
        .attach('file', Buffer.from('x'), 'a.csv')
        .attach('file', Buffer.from('x'), 'b.csv');
      expect((await twice.expect(400)).body).toMatchObject(at);
      await post().type('multipart/form-data; boundary=x').send('--x\r\nnonsense').expect(400);
      await post().type('text/csv').send('title').expect(415);
      await send('title,key\nA,A', 'a.csv', { dryRun: 'perhaps' }).expect(400);
      await send('title,key\nA,A', 'a.csv', { progress: 'no-id' }).expect(400);
    });

    it('is for hosts and cohosts', async () => {
      const player = await buildMember(test, circle, host, 'player');
      const cohost = await buildMember(test, circle, host, 'cohost');
      const { host: stranger } = await buildCircle(test);
      await send(CSV, 'tunes.csv', {}, player).expect(403);
      await send(CSV, 'tunes.csv', { dryRun: 'true' }, player).expect(403);
      await send(CSV, 'tunes.csv', {}, stranger).expect(404);
      await test.caller().post(path('/import')).attach('file', Buffer.from(CSV), 'tunes.csv').expect(401);
      expect((await list()).total).toBe(0);
      await send(CSV, 'tunes.csv', {}, cohost).expect(200);
    });
  });

  describe('progress', () => {
    const many = (count: number) =>
      [
        'title,key,mode,rhythm,fiddle,banjo',
        ...Array.from({ length: count }, (_, n) => `Tune ${n},A,major,reel,AEAE or GDAE,gDGBD capo 2`),
      ].join('\n');

    it('moves with the rows that are written, two thousand in well under 15 s', async () => {
      const progress = randomUUID();
      const seen: ImportProgress[] = [];
      const watch = new AbortController();
      const watching = (async () => {
        while (!watch.signal.aborted) {
          const answer = await host.caller.get(path(`/imports/${progress}`));
          if (answer.status === 200) seen.push(answer.body as ImportProgress);
          else expect(answer.status).toBe(404);
          await new Promise((resolve) => setTimeout(resolve, 30));
        }
      })();
      const started = performance.now();
      const cpu = process.cpuUsage();
      const report = await take(many(2_000), 'tunes.csv', { progress });
      const millis = performance.now() - started;
      const { user } = process.cpuUsage(cpu);
      watch.abort();
      await watching;
      expect(report).toMatchObject({ read: 2_000, created: 2_000, problems: [] });
      expect(millis).toBeLessThan(15_000);
      const between = new Set(
        seen.map(({ written }) => written).filter((count) => count > 0 && count < 2_000),
      );
      expect(between.size).toBeGreaterThan(2);
      expect(seen.map(({ written }) => written)).toEqual(
        seen.map(({ written }) => written).sort((a, b) => a - b),
      );
      const end = await host.caller.get(path(`/imports/${progress}`)).expect(200);
      expect(end.body).toEqual({ total: 2_000, written: 2_000, finished: true });
      expect((await list()).total).toBe(2_000);
      if (process.env['PEGWELL_TEST_FIGURES']) {
        const figures = [
          `2000 tunes written in ${Math.round(millis)} ms (${Math.round(user / 1000)} ms of work), ${seen.length} looks, ${between.size} steps seen`,
        ];
        for (const format of ['csv', 'abc'] as const) {
          const file = await download(format);
          const again = process.cpuUsage();
          expect(await take(file, `tunes.${format}`)).toMatchObject({ unchanged: 2_000 });
          figures.push(
            `${format} again, unchanged: ${Math.round(process.cpuUsage(again).user / 1000)} ms of work`,
          );
        }
        const update = process.cpuUsage();
        expect(await take(many(2_000).replaceAll('reel', 'jig'))).toMatchObject({ updated: 2_000 });
        figures.push(`2000 updated in ${Math.round(process.cpuUsage(update).user / 1000)} ms of work`);
        process.stdout.write(`${figures.join('\n')}\n`);
      }
    });

    it('is finished when there was nothing to write, and its id is used once', async () => {
      const progress = randomUUID();
      await take('title,key\n,A', 'tunes.csv', { progress });
      const end = await host.caller.get(path(`/imports/${progress}`)).expect(200);
      expect(end.body).toEqual({ total: 0, written: 0, finished: true });
      const again = await send('title,key\nOne,A', 'tunes.csv', { progress }).expect(422);
      expect(again.body).toMatchObject({ errors: [{ path: 'progress' }] });
      expect((await list()).total).toBe(0);
    });

    it('is shown to who may import, in its circle', async () => {
      const progress = randomUUID();
      await take(CSV, 'tunes.csv', { progress });
      const player = await buildMember(test, circle, host, 'player');
      const { circle: other, host: stranger } = await buildCircle(test);
      await player.caller.get(path(`/imports/${progress}`)).expect(403);
      await stranger.caller.get(path(`/imports/${progress}`)).expect(404);
      await stranger.caller.get(`/api/circles/${other.id}/tunes/imports/${progress}`).expect(404);
      await host.caller.get(path(`/imports/${randomUUID()}`)).expect(404);
      await host.caller.get(path('/imports/nonsense')).expect(404);
    });
  });

  describe('export', () => {
    const AWKWARD = {
      ...{ title: '=1+1; "quoted", %50 \\ \'Tis', key: 'Bb', mode: 'modal', rhythm: '-slow' },
      ...{
        composer: '@someone',
        source: '+49 & more',
        notes: 'first\n\n  second\twith tab\r\n%% third &eacute;',
      },
      tunings: [
        { kind: 'fiddle', accepted: [{ tuning: 'AEADb' }, { tuning: 'GDAE' }] },
        // As pegs, not as a capo spelling: in full.
        { kind: 'banjo', accepted: [{ tuning: 'A4 D3 A3 D4 E4' }, { tuning: 'gDGBD', capo: 2 }] },
        { kind: 'guitar', accepted: [{ tuning: 'any' }] },
        { kind: 'dulcimer', accepted: [{ tuning: 'D3 A3 G3' }] },
      ],
    };

    it.each(['csv', 'abc'] as const)('as %s, imported again, changes nothing', async (format) => {
      await buildTune(host, circle.id, AWKWARD);
      await take(CSV);
      await buildTune(host, circle.id, { title: 'Lantern Hill', key: 'A', notes: 'a second of that name' });
      const before = (await list()).items;
      const file = await download(format);
      expect(await take(file, `tunes.${format}`)).toMatchObject({
        ...{ format, read: 4, created: 0, updated: 0, unchanged: 4, skipped: 0, problems: [] },
      });
      expect((await list()).items).toEqual(before);
      expect(await download(format)).toBe(file);
      // The same file makes the same library in another circle.
      ({ circle, host } = await buildCircle(test));
      expect(await take(`\ufeff${file}`, `tunes.${format}`)).toMatchObject({
        read: 4,
        created: 4,
        problems: [],
      });
      const words = ({ id: _, settingId: __, createdAt: ___, updatedAt: ____, ...rest }: Tune) => rest;
      expect((await list()).items.map(words)).toEqual(before.map(words));
    });

    it('names the file after the circle (RFC 6266, RFC 8187) and says what it is', async () => {
      for (const [format, type] of [
        ['csv', /^text\/csv; charset=utf-8/],
        ['abc', /^text\/vnd\.abc; charset=utf-8/],
      ] as const) {
        const answer = await host.caller
          .get(path('/export'))
          .query({ format })
          .buffer(true)
          .parse(asText)
          .expect(200);
        expect(answer.headers['content-type']).toMatch(type);
        expect(answer.headers['content-disposition']).toBe(
          `attachment; filename="Ash Ford Circle tunes.${format}"; filename*=UTF-8''Ash%20Ford%20Circle%20tunes.${format}`,
        );
        // An empty library is a file too.
        expect(await take(answer.body as string, `tunes.${format}`)).toMatchObject({ read: 0, problems: [] });
      }
    });

    it('carries tunings in ABC as directives, and quotes formulas in CSV', async () => {
      const tune = await buildTune(host, circle.id, AWKWARD);
      const abc = await download('abc');
      expect(abc).toMatch(/^%abc-2\.1\nI:abc-creator Pegwell\n\nX:1\nT:=1\+1/);
      expect(abc).toContain(`%%pegwell-id ${tune.id}\n`);
      expect(abc).toContain('%%pegwell-tuning fiddle AEADb or GDAE\n');
      expect(abc).toContain('%%pegwell-tuning banjo A4 D3 A3 D4 E4 or gDGBD capo 2\n');
      expect(abc).toContain('%%pegwell-tuning guitar any\n');
      expect(abc).toContain('K:Bbmix\n');
      const csv = await download('csv');
      expect(csv.split('\r\n')[0]).toBe(
        'id,title,key,mode,rhythm,parts,composer,source,notes,' +
          'fiddle,banjo,guitar,mandolin,tenor-banjo,bouzouki,ukulele,dulcimer,bass',
      );
      expect(csv).toContain(`"'=1+1; ""quoted""`);
      expect(csv).toContain(",'-slow,");
      expect(csv).toContain(",'@someone,'+49 & more,");
    });

    it('is for all members', async () => {
      const player = await buildMember(test, circle, host, 'player');
      const { host: stranger } = await buildCircle(test);
      await player.caller.get(path('/export')).query({ format: 'csv' }).expect(200);
      await stranger.caller.get(path('/export')).query({ format: 'csv' }).expect(404);
      await test.caller().get(path('/export')).query({ format: 'csv' }).expect(401);
      await host.caller.get(path('/export')).query({ format: 'xlsx' }).expect(400);
    });
  });
});

function asText(response: unknown, done: (error: Error | null, body: string) => void): void {
  const parts: Buffer[] = [];
  const stream = response as NodeJS.ReadableStream;
  stream.on('data', (part: Buffer) => parts.push(part));
  stream.on('end', () => done(null, Buffer.concat(parts).toString()));
}
