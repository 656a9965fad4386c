import { brotliCompressSync, constants, deflateSync, gzipSync } from 'node:zlib';
import { startApp, type TestApp } from '../app';
import { buildSession, type Person } from '../build';
import { buildSender, type Sender } from './sender';

/** Brotli's best takes a minute for what its first does in a tenth of a second. */
const quickBrotli = (bytes: Buffer) =>
  brotliCompressSync(bytes, { params: { [constants.BROTLI_PARAM_QUALITY]: 1 } });

describe('attacks by what a request says', () => {
  let test: TestApp;
  let host: Person;
  let home: string;
  let circle: Sender['circle'];
  let send: Sender['send'];
  let sendJson: Sender['sendJson'];
  beforeAll(async () => {
    test = await startApp();
    ({ host, home, circle, send, sendJson } = await buildSender(test));
  });
  afterAll(() => test.close());

  describe('a body', () => {
    it.each([
      ['__proto__ at the top', '{"name":"x","__proto__":{"role":"host"}}'],
      ['__proto__ further down', '{"name":{"__proto__":{"polluted":1}}}'],
      ['constructor.prototype', '{"name":"x","constructor":{"prototype":{"polluted":1}}}'],
      ['a depth without end', `{"name":${'['.repeat(400_000)}${']'.repeat(400_000)}}`],
    ])('with %s', async (_, body) => {
      expect((await sendJson('/api/circles', body)).status).toBe(400);
      // The server under attack is this very process.
      expect(({} as Record<string, unknown>)['polluted']).toBeUndefined();
      expect(({} as Record<string, unknown>)['role']).toBeUndefined();
    });

    it('in a form, with __proto__ for a name', async () => {
      const form = new FormData();
      form.append('file', new Blob(['title,key\nForm Tune,D\n']), 'a.csv');
      form.append('__proto__[polluted]', '1');
      expect((await send(`${home}/tunes/import`, { method: 'POST', body: form })).status).toBeLessThan(500);
      expect(({} as Record<string, unknown>)['polluted']).toBeUndefined();
    });

    it.each([
      ['gzip', gzipSync],
      ['deflate', deflateSync],
      ['br', quickBrotli],
    ] as const)('compressed bomb: 100 MB in a few kB of %s', async (encoding, pack) => {
      const body = pack(Buffer.alloc(100_000_000, ' '));
      expect(body.length).toBeLessThan(200_000);
      const before = process.memoryUsage().rss;
      const headers = { 'content-type': 'application/json', 'content-encoding': encoding };
      const answer = await send('/api/circles', { method: 'POST', body: new Uint8Array(body), headers });
      expect(answer.status).toBe(413);
      // It is given up at a megabyte, not unpacked first.
      expect(process.memoryUsage().rss - before).toBeLessThan(60_000_000);
    });

    it('in another alphabet than UTF-8', async () => {
      for (const charset of ['utf-7', 'utf-16', 'shift_jis']) {
        const answer = await sendJson('/api/circles', '{"name":"x"}', {
          'content-type': `application/json; charset=${charset}`,
        });
        expect([charset, answer.status]).toEqual([charset, 415]);
      }
    });

    it('of a thousand parts, or with a path for its file’s name', async () => {
      const many = new FormData();
      for (let part = 0; part < 1_000; part++) many.append(`field${part}`, 'x');
      expect((await send(`${home}/tunes/import`, { method: 'POST', body: many })).status).toBe(400);
      const path = new FormData();
      path.append('file', new Blob(['title,key\nPath Tune,D\n']), '../../../etc/cron.d/a.csv');
      expect((await send(`${home}/tunes/import`, { method: 'POST', body: path })).status).toBe(200);
    });
  });

  describe('SQL in a search', () => {
    const NASTY = [
      "'; drop table tunes; --",
      "' or '1'='1",
      '" or ""="',
      '\\',
      "\\'; --",
      '%',
      '_',
      '%%%%',
      "x' union select password_hash from accounts --",
      '$1',
      '1; select pg_sleep(5)',
      '/*',
      '\u0000',
    ];

    it('in every field of every list', async () => {
      const document = (await host.caller.get('/api/openapi.json').expect(200)).body as {
        paths: Record<string, { get?: { parameters?: { name: string; in: string }[] } }>;
      };
      const { id } = await buildSession(host, circle.id);
      let asked = 0;
      for (const [path, { get }] of Object.entries(document.paths)) {
        const address = path
          .replace('{circleId}', circle.id)
          .replace('{id}', id)
          .replace(/\{\w+\}/g, id);
        for (const { name } of (get?.parameters ?? []).filter((each) => each.in === 'query')) {
          for (const value of NASTY) {
            const begun = performance.now();
            const answer = await send(`${address}?${name}=${encodeURIComponent(value)}`, {});
            expect([path, name, value, answer.status < 500]).toEqual([path, name, value, true]);
            expect(await answer.text()).not.toMatch(/\$2[aby]\$|syntax error/);
            expect(performance.now() - begun).toBeLessThan(4_000);
            asked++;
          }
        }
      }
      expect(asked).toBeGreaterThan(200);
      await host.caller.get(`${home}/tunes`).expect(200);
    });

    it('wildcards find themselves and nothing else', async () => {
      await host.caller
        .post(`${home}/tunes`)
        .send({ title: 'Fifty % Odd_ly', key: 'D', mode: 'major', tunings: [] })
        .expect(201);
      for (const [search, total] of [
        ['%', 1],
        ['_', 1],
        ['d_l', 1],
        ['f%y', 0],
      ] as const) {
        const answer = await host.caller.get(`${home}/tunes`).query({ search }).expect(200);
        expect([search, (answer.body as { total: number }).total]).toEqual([search, total]);
      }
    });
  });

  describe('words that become code somewhere', () => {
    it('CRLF in a name: never in a header', async () => {
      const name = 'Ash\r\nSet-Cookie: pegwell=stolen';
      expect((await sendJson('/api/circles', JSON.stringify({ name }))).status).toBe(400);
      const odd = `Ash "Ford"; filename=evil.exe; é 🎻 %0d%0aX: y`;
      const circle = (await (await sendJson('/api/circles', JSON.stringify({ name: odd }))).json()) as {
        id: string;
      };
      const answer = await send(`/api/circles/${circle.id}/tunes/export?format=csv`, {});
      expect(answer.headers.get('content-disposition')).toMatch(
        /^attachment; filename="[^"\r\n%]*"; filename\*=UTF-8''[\w!#$&+.^`|~%-]+$/,
      );
      expect(answer.headers.get('x')).toBeNull();
    });

    it('a script for a title: told as JSON, which no browser takes for a page', async () => {
      const answer = await sendJson(
        `${home}/tunes`,
        JSON.stringify({ title: '<script>alert(1)</script>', key: 'D', mode: 'major', tunings: [] }),
      );
      expect(answer.headers.get('content-type')).toMatch(/^application\/json/);
      expect(answer.headers.get('x-content-type-options')).toBe('nosniff');
      const refused = await send('/api/<script>alert(1)</script>', {});
      expect(refused.headers.get('content-type')).toMatch(/^application\/problem\+json/);
      expect(await refused.text()).not.toContain('<script>');
    });

    it('a formula for a title: a spreadsheet shows it', async () => {
      await sendJson(
        `${home}/tunes`,
        JSON.stringify({ title: '=HYPERLINK("http://x")', key: 'D', mode: 'major', tunings: [] }),
      );
      const text = await (await send(`${home}/tunes/export?format=csv`, {})).text();
      expect(text).toContain(`'=HYPERLINK`);
    });

    it('texts that make a slow pattern crawl', async () => {
      const slow = [
        ['/api/auth/login', { email: `${'a.'.repeat(126)}@`, password: 'x' }],
        [
          '/api/auth/register',
          { email: `${'a'.repeat(200)}@${'a-'.repeat(25)}`, password: 'x'.repeat(12), displayName: 'x' },
        ],
        ['/api/circles', { name: `${' '.repeat(119)}\u0000` }],
        [`${home}/tunes`, { title: `${'\u0301'.repeat(199)}x`, key: 'D', mode: 'major', tunings: [] }],
        [
          `${home}/tunes`,
          {
            title: 'x',
            key: 'D',
            mode: 'major',
            tunings: [{ kind: 'fiddle', accepted: [{ tuning: `${'A#'.repeat(39)}!` }] }],
          },
        ],
      ] as const;
      for (const [path, body] of slow) {
        const begun = performance.now();
        expect((await sendJson(path, JSON.stringify(body))).status).toBeLessThan(500);
        expect(performance.now() - begun).toBeLessThan(1_500);
      }
    });
  });
});
