import { randomBytes, randomUUID } from 'node:crypto';
import iconv from 'iconv-lite';
import type { Circle } from '@pegwell/shared/contract/circles';
import type { ImportChoice } from '@pegwell/shared/contract/import-choices';
import type { Page } from '@pegwell/shared/contract/page';
import type { ImportReport, ImportUndone, RecentImports, Tune } from '@pegwell/shared/contract/tunes';
import { startApp, type TestApp } from './app';
import { buildCircle, buildMember, buildTune, type Person } from './build';

describe('files of tunes as people have them', () => {
  let test: TestApp;
  let host: Person;
  let circle: Circle;
  beforeAll(async () => void (test = await startApp()));
  afterAll(() => test.close());
  beforeEach(async () => void ({ circle, host } = await buildCircle(test)));

  interface Sent {
    readonly name?: string;
    readonly query?: Record<string, string>;
    readonly choices?: readonly Partial<ImportChoice>[];
  }
  const path = (rest = '') => `/api/circles/${circle.id}/tunes${rest}`;
  const send = (content: string | Buffer, { name = 'tunes.csv', query = {}, choices }: Sent = {}) => {
    const post = host.caller.post(path('/import')).query(query);
    if (choices) void post.field('choices', JSON.stringify(choices));
    return post.attach('file', Buffer.from(content), name);
  };
  const take = async (content: string | Buffer, sent?: Sent) =>
    (await send(content, sent).expect(200)).body as ImportReport;
  const preview = (content: string | Buffer, sent: Sent = {}) =>
    take(content, { ...sent, query: { ...sent.query, dryRun: 'true' } });
  const list = async (): Promise<readonly Tune[]> =>
    ((await host.caller.get(path()).query({ pageSize: 200 }).expect(200)).body as Page<Tune>).items;
  const words = (tunes: readonly Tune[]) =>
    tunes.map(({ title, key, mode, rhythm, notes, tunings }) => ({
      title,
      key,
      mode,
      rhythm,
      notes,
      tunings,
    }));

  describe('in every encoding and with every line end', () => {
    const ABC = [
      ...[
        '%abc-2.1',
        '',
        'X:1',
        'T:Mná na hÉireann',
        'N:Seán’s way – slow',
        '%%pegwell-tuning fiddle AEAE',
        'K:Ador',
      ],
      ...['abc|', '', 'X:2', 'T:Gånglåt från Äppelbo', 'R:gånglåt', 'K:G', ''],
    ];
    const CSV = [
      'title;key;mode;notes;fiddle',
      'Mná na hÉireann;A;dorian;"Seán’s way – slow";AEAE',
      'Gånglåt från Äppelbo;G;;"";',
    ];
    const ENCODINGS = [
      { encoding: 'utf-8', addBOM: false },
      { encoding: 'utf-8', addBOM: true },
      { encoding: 'utf-16le', addBOM: true },
      { encoding: 'utf-16be', addBOM: true },
      { encoding: 'windows-1252', addBOM: false },
    ];

    it.each([
      ['abc', ABC],
      ['csv', CSV],
    ] as const)('a %s file makes the same library', async (format, lines) => {
      const libraries = [];
      for (const { encoding, addBOM } of ENCODINGS) {
        for (const end of ['\n', '\r\n', '\r']) {
          const made = await host.caller.post('/api/circles').send({ name: `${encoding} ${addBOM}` });
          circle = made.body as Circle;
          const file = iconv.encode(lines.join(end), encoding, { addBOM });
          expect(await take(file, { name: `tunes.${format}` })).toMatchObject({ created: 2, problems: [] });
          libraries.push(words(await list()));
        }
      }
      expect(libraries).toHaveLength(15);
      expect(libraries[0]).toMatchObject([
        { title: 'Gånglåt från Äppelbo', key: 'G' },
        { title: 'Mná na hÉireann', key: 'A', mode: 'dorian', notes: 'Seán’s way – slow' },
      ]);
      for (const library of libraries) expect(library).toEqual(libraries[0]);
    });

    it('says in which encoding it was read', async () => {
      const { encoding } = await preview(Buffer.from('title,key\nMn\xe1,A', 'latin1'));
      expect(encoding).toBe('windows-1252');
    });
  });

  describe('pasted', () => {
    const pasted = (text: string) => take(text, { name: 'pasted', query: { pasted: 'true' } });

    it('is read as a list, a table or ABC, by what stands in it', async () => {
      expect(await pasted('June Apple (A)\nLiza Jane (D)\nNo Key')).toMatchObject({
        ...{ format: 'list', read: 3, created: 2, skipped: 1 },
        problems: [{ line: 3, tune: 'No Key' }],
      });
      expect(await pasted('Name\tKey\nJune Apple\tA')).toMatchObject({ format: 'csv', unchanged: 1 });
      expect(await pasted('X:1\nT:June Apple\nK:A')).toMatchObject({ format: 'abc', unchanged: 1 });
      await send('June Apple (A)', { name: 'list.txt' }).expect(415);
    });
  });

  describe('choices', () => {
    const FILE = 'title,key,notes\nJune Apple (AEAE),A,\nThe Dusty Miller,G,fiddle tuned GDGD';

    it('proposes what was found and what is alike, and takes neither unasked', async () => {
      const known = await buildTune(host, circle.id, { title: 'Dusty Miller', key: 'G' });
      const report = await preview(FILE);
      expect(report.tunes).toEqual([
        {
          ...{ line: 2, title: 'June Apple (AEAE)', action: 'create' },
          found: [{ kind: 'fiddle', tuning: 'AEAE', said: 'AEAE' }],
        },
        {
          ...{
            line: 3,
            title: 'The Dusty Miller',
            action: 'create',
            key: 'G',
            mode: 'major',
            rhythm: null,
            tunings: [],
          },
          found: [{ kind: 'fiddle', tuning: 'GDGD', said: 'fiddle tuned GDGD' }],
          alike: [
            { id: known.id, title: 'Dusty Miller', key: 'G', mode: 'major', rhythm: 'reel', tunings: [] },
          ],
        },
      ]);
      expect(await take(FILE)).toMatchObject({ created: 2 });
      expect((await list()).map(({ tunings }) => tunings)).toEqual([[], [], []]);
    });

    it('does what is chosen', async () => {
      const known = await buildTune(host, circle.id, { title: 'Dusty Miller', key: 'G' });
      const report = await take(FILE, {
        choices: [
          { line: 2, found: ['fiddle'] },
          { line: 3, found: ['fiddle'], alike: 'merge', with: known.id },
        ],
      });
      expect(report).toMatchObject({
        created: 1,
        updated: 1,
        tunes: [{ title: 'June Apple' }, { id: known.id }],
      });
      expect(words(await list())).toMatchObject([
        {
          ...{ title: 'Dusty Miller', notes: 'Also: The Dusty Miller\nfiddle tuned GDGD' },
          tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'GDGD' }] }],
        },
        { title: 'June Apple', tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'AEAE' }] }] },
      ]);
    });

    it.each([
      ['nonsense', 'choices'],
      ['[{"line":0}]', 'choices.0.line'],
      ['[{"line":2,"alike":"both"}]', 'choices.0.alike'],
      ['{}', 'choices'],
    ])('refuses the choices %s', async (choices, at) => {
      const post = host.caller.post(path('/import')).field('choices', choices);
      const answer = await post.attach('file', Buffer.from(FILE), 'tunes.csv').expect(400);
      expect(answer.body).toMatchObject({ code: 'not-valid', errors: [{ path: at }] });
      expect(await list()).toEqual([]);
    });
  });

  describe('sent again', () => {
    it('answers what it answered, and writes nothing twice', async () => {
      const sent = { query: { progress: randomUUID() } };
      const first = await take('title,key\nOne,A\nOne,A', sent);
      expect(first).toMatchObject({ importId: sent.query.progress, created: 2 });
      expect(await take('title,key\nOne,A\nOne,A', sent)).toEqual(first);
      expect(await list()).toHaveLength(2);
      const other = await send('title,key\nTwo,A', sent).expect(422);
      expect(other.body).toMatchObject({ errors: [{ path: 'progress' }] });
      const chosen = await send('title,key\nOne,A\nOne,A', { ...sent, choices: [{ line: 2 }] }).expect(422);
      expect(chosen.body).toMatchObject({ errors: [{ path: 'progress' }] });
    });

    it('goes on when whoever sent it is gone, and tells who asks again', async () => {
      const query = { progress: randomUUID() };
      const file = ['title,key', ...Array.from({ length: 1_500 }, (_, n) => `Tune ${n},A`)].join('\n');
      const gone = new AbortController();
      const body = new FormData();
      body.append('file', new Blob([file]), 'tunes.csv');
      const sending = fetch(`${test.url}${path('/import')}?progress=${query.progress}`, {
        method: 'POST',
        body,
        headers: { cookie: await cookieOf(host) },
        signal: gone.signal,
      });
      const begun = async (): Promise<boolean> =>
        (await host.caller.get(path(`/imports/${query.progress}`))).status === 200;
      while (!(await begun())) await new Promise((resolve) => setTimeout(resolve, 5));
      gone.abort();
      await expect(sending).rejects.toThrow();
      // In the middle of it, or just behind: the answer is the first one's either way.
      expect(await take(file, { query })).toMatchObject({ importId: query.progress, created: 1_500 });
      const { body: page } = await host.caller.get(path()).query({ pageSize: 1 }).expect(200);
      expect((page as Page<Tune>).total).toBe(1_500);
    });
  });

  describe('undone', () => {
    const undo = async (id: string): Promise<ImportUndone> =>
      (await host.caller.post(path(`/imports/${id}/undo`)).expect(200)).body as ImportUndone;

    it('is as it was: what is new goes, what changed is back', async () => {
      await buildTune(host, circle.id, {
        title: 'Old',
        key: 'A',
        notes: 'as it was',
        tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'AEAE' }] }],
      });
      await buildTune(host, circle.id, { title: 'Other', key: 'D' });
      const before = words(await list());
      const { importId } = await take('title,key,notes,fiddle\nOld,A,as it is,GDAE\nNew,D,,\nOther,D,,');
      expect(words(await list())).not.toEqual(before);
      expect(await undo(importId!)).toEqual({ removed: 1, restored: 1, kept: [] });
      expect(words(await list())).toEqual(before);
      // Asked twice, as after a lost answer.
      expect(await undo(importId!)).toEqual({ removed: 1, restored: 1, kept: [] });
    });

    it('is listed for a day, newest first, until it is undone', async () => {
      const recent = async () => (await host.caller.get(path('/imports')).expect(200)).body as RecentImports;
      expect(await recent()).toEqual({ items: [] });
      const one = await take('title,key\nOne,A');
      await take('title,key\nOne,A');
      const two = await take('X:1\nT:One\nR:jig\nK:A\n\nX:2\nT:Two\nK:A\n', { name: 'two.abc' });
      const at = expect.any(String) as string;
      expect(await recent()).toEqual({
        items: [
          { id: two.importId, at, format: 'abc', created: 1, updated: 1 },
          { id: one.importId, at, format: 'csv', created: 1, updated: 0 },
        ],
      });
      await undo(two.importId!);
      expect((await recent()).items.map(({ id }) => id)).toEqual([one.importId]);
      const player = await buildMember(test, circle, host, 'player');
      await player.caller.get(path('/imports')).expect(403);
    });

    it('keeps what was changed since, and lists it', async () => {
      const old = await buildTune(host, circle.id, { title: 'Old', key: 'A', notes: 'as it was' });
      const { importId, tunes } = await take('title,key,notes\nOld,A,as it is\nNew,D,\nNewer,D,\nGone,D,');
      const patch = (id: string, change: object) =>
        host.caller
          .patch(path(`/${id}`))
          .send(change)
          .expect(200);
      await patch(old.id, { rhythm: 'jig' });
      await patch(tunes[1]!.id!, { rhythm: 'jig' });
      await host.caller.delete(path(`/${tunes[3]!.id!}`)).expect(204);
      expect(await undo(importId!)).toEqual({
        ...{ removed: 1, restored: 0 },
        kept: [
          { id: tunes[1]!.id, title: 'New' },
          { id: old.id, title: 'Old' },
        ],
      });
      expect((await list()).map(({ title, notes }) => [title, notes])).toEqual([
        ['New', null],
        ['Old', 'as it is'],
      ]);
    });

    it('is for who may import, in its circle', async () => {
      const { importId } = await take('title,key\nNew,D');
      const player = await buildMember(test, circle, host, 'player');
      const { host: stranger } = await buildCircle(test);
      await player.caller.post(path(`/imports/${importId!}/undo`)).expect(403);
      await stranger.caller.post(path(`/imports/${importId!}/undo`)).expect(404);
      await host.caller.post(path(`/imports/${randomUUID()}/undo`)).expect(404);
      expect(await list()).toHaveLength(1);
    });
  });

  // What a fuzzer makes. Each is answered within five seconds, with a sentence, and changes nothing.
  describe('that are none', () => {
    const MB = 1024 * 1024;
    const zip = Buffer.concat([Buffer.from('504b03041400000008', 'hex'), randomBytes(10_000)]);
    const abc = 'X:1\nT:One\nK:A\nabc|\n\n';
    const FILES: readonly (readonly [what: string, name: string, make: () => Buffer, status: number])[] = [
      ['random bytes', 'tunes.csv', () => randomBytes(9 * MB), 422],
      ['random bytes, as ABC', 'tunes.abc', () => randomBytes(MB), 422],
      ['a zip named .abc', 'tunes.abc', () => zip, 422],
      [
        'UTF-16, cut in half a letter',
        'tunes.csv',
        () => iconv.encode('title,key', 'utf-16le', { addBOM: true }).subarray(0, -1),
        200,
      ],
      ['a line of 50 MB', 'tunes.csv', () => Buffer.alloc(50 * MB, 'x'), 413],
      ['a line of 9 MB', 'tunes.csv', () => Buffer.alloc(9 * MB, 'x'), 422],
      [
        'a row of nothing but quotes',
        'tunes.csv',
        () => Buffer.from(`title,key\n${'"'.repeat(9 * MB + 1)}`),
        200,
      ],
      ['stray quotes', 'tunes.csv', () => Buffer.from(`title,key\n${'"a\nb"c\n'.repeat(MB)}"`), 422],
      ['nothing but line ends', 'tunes.csv', () => Buffer.alloc(9 * MB, '\n'), 422],
      ['nothing but separators', 'tunes.csv', () => Buffer.from(`title,key\n${',\n'.repeat(4 * MB)}`), 200],
      ['a title of 9 MB', 'tunes.abc', () => Buffer.from(`X:1\nT:${'x'.repeat(9 * MB)}\nK:A\n`), 200],
      ['backslashes', 'tunes.abc', () => Buffer.from(`X:1\nT:${'\\'.repeat(9 * MB)}\nK:A\n`), 200],
      [
        'a continued line, again and again',
        'tunes.abc',
        () => Buffer.from(`X:1\nT:a\n${'+:b\n'.repeat(2 * MB)}K:A\n`),
        200,
      ],
      ['empty paragraphs', 'tunes.abc', () => Buffer.from('X:\n\n'.repeat(2 * MB)), 422],
    ];

    it.each(FILES)('%s', async (_what, name, make, status) => {
      const file = make();
      const started = performance.now();
      const answer = await send(file, { name });
      expect(performance.now() - started).toBeLessThan(5_000);
      expect([status, answer.status]).toEqual([status, answer.status === status ? status : answer.body]);
      const { errors, problems } = answer.body as {
        errors?: { message: string }[];
        problems?: { message: string }[];
      };
      const said = [...(errors ?? []), ...(problems ?? [])].map(({ message }) => message);
      expect(said[0]).toMatch(/^[A-Z"'].{10,200}\.$/);
      expect(await list()).toEqual([]);
    });

    it('a good file cut anywhere: what is whole is read, the rest is told', async () => {
      const whole = Buffer.from(abc.repeat(3));
      for (let length = 1; length < whole.length; length += 7) {
        const { read, problems } = await preview(whole.subarray(0, length), { name: 'tunes.abc' });
        expect(read + problems.length).toBeGreaterThan(0);
      }
    });

    it('holds nobody else up', async () => {
      const watch = new AbortController();
      const sent = send(Buffer.from(`title,key\n${'"a\nb"c\n'.repeat(MB)}"`)).then(({ status }) => {
        watch.abort();
        return status;
      });
      const waits: number[] = [];
      while (!watch.signal.aborted) {
        const started = performance.now();
        await host.caller.get('/api/health').expect(200);
        waits.push(performance.now() - started);
        await new Promise((resolve) => setTimeout(resolve, 20));
      }
      expect(await sent).toBe(422);
      waits.sort((a, b) => a - b);
      // The thread and the tests share two cores; a reader on this one would hold it for seconds.
      expect(waits[Math.floor(waits.length * 0.9)]!).toBeLessThan(250);
    });
  });
});

/** The sign-in of a caller's jar, for a request that is not supertest's. */
async function cookieOf({ caller }: Person): Promise<string> {
  let cookie = '';
  await caller
    .get('/api/auth/me')
    .expect(200)
    .expect(() => undefined);
  for (const { name, value } of caller.jar.getCookies({
    ...{ domain: '127.0.0.1', path: '/', secure: false, script: false },
  })) {
    cookie += `${name}=${value}; `;
  }
  return cookie;
}
