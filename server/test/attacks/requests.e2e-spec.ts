import { startApp, type TestApp } from '../app';
import { buildSession, type Person } from '../build';
import { buildSender, type Sender } from './sender';

describe('attacks by how a request is made', () => {
  let test: TestApp;
  let host: Person;
  let home: string;
  let circle: Sender['circle'];
  let cookie: string;
  let send: Sender['send'];
  let sendJson: Sender['sendJson'];
  let raw: Sender['raw'];
  beforeAll(async () => {
    test = await startApp();
    ({ host, home, circle, cookie, send, sendJson, raw } = await buildSender(test));
  });
  afterAll(() => test.close());

  describe('CSRF: a page of another site sends', () => {
    const tune = { title: 'Forged', key: 'D', mode: 'major', tunings: [] };
    const made = async () => {
      const { body } = await host.caller.get(`${home}/tunes?search=Forged`).expect(200);
      return (body as { total: number }).total;
    };

    // What a form can send without asking first (Fetch standard, "CORS-safelisted request-header"), and the rest.
    it.each([
      ['text/plain', JSON.stringify(tune)],
      ['application/x-www-form-urlencoded', 'title=Forged&key=D'],
      [
        'multipart/form-data; boundary=x',
        '--x\r\nContent-Disposition: form-data; name="file"; filename="a.csv"\r\n\r\ntitle,key\nForged,D\r\n--x--\r\n',
      ],
      ['application/json', JSON.stringify(tune)],
      ['application/json+x', JSON.stringify(tune)],
      ['', JSON.stringify(tune)],
    ])('%s', async (type, body) => {
      for (const path of [`${home}/tunes`, `${home}/tunes/import`]) {
        for (const origin of [
          'https://elsewhere.example',
          'null',
          `${test.url}.elsewhere.example`,
          'http://127.0.0.1:1',
          test.env.PEGWELL_URL.replace('http:', 'https:'),
        ]) {
          const answer = await send(path, {
            method: 'POST',
            body,
            headers: { origin, ...(type && { 'content-type': type }) },
          });
          expect([origin, answer.status]).toEqual([origin, 403]);
        }
      }
      expect(await made()).toBe(0);
    });

    it('with any method that changes something', async () => {
      for (const method of ['PUT', 'PATCH', 'DELETE']) {
        const answer = await send(`${home}/members/${host.id}`, {
          method,
          headers: { origin: 'https://elsewhere.example' },
        });
        expect([method, answer.status]).toEqual([method, 403]);
      }
    });

    it('and asks beforehand: nothing is allowed to it, nor may it read', async () => {
      const asked = await send(home, {
        method: 'OPTIONS',
        headers: { origin: 'https://elsewhere.example', 'access-control-request-method': 'DELETE' },
      });
      const read = await send(home, { headers: { origin: 'https://elsewhere.example' } });
      for (const answer of [asked, read])
        expect(answer.headers.get('access-control-allow-origin')).toBeNull();
    });

    it('is not what our own page does, which may', async () => {
      const answer = await sendJson(`${home}/tunes`, JSON.stringify({ ...tune, title: 'Ours' }), {
        origin: test.env.PEGWELL_URL,
      });
      expect(answer.status).toBe(201);
    });
  });

  describe('an address', () => {
    it('open redirect: nothing here sends anybody elsewhere', async () => {
      for (const path of [
        '//elsewhere.example',
        '//elsewhere.example/%2f..',
        '/%2f%2felsewhere.example',
        '/\\elsewhere.example',
        '/api//elsewhere.example',
        '/?next=https://elsewhere.example',
        '/sign-in?next=//elsewhere.example',
        '/api/auth/me?redirect=https://elsewhere.example',
      ]) {
        const answer = await raw(`GET ${path} HTTP/1.1\r\nHost: localhost\r\nConnection: close\r\n\r\n`);
        expect(answer).toMatch(/^HTTP\/1\.1 [245]/);
        expect(answer).not.toMatch(/^location:/im);
      }
    });

    it('path traversal: no file outside the pages', async () => {
      for (const path of [
        '/../package.json',
        '/..%2f..%2fpackage.json',
        '/assets/../../../package.json',
        '/assets/..%5c..%5cpackage.json',
        '/%2e%2e/%2e%2e/etc/passwd',
        '/assets/%00',
        '/.env',
        '/.git/config',
        '/api/../package.json',
      ]) {
        const answer = await raw(`GET ${path} HTTP/1.1\r\nHost: localhost\r\nConnection: close\r\n\r\n`);
        expect(answer).not.toMatch(/"workspaces"|root:x:|\[core\]/);
        expect(answer).toMatch(/^HTTP\/1\.1 [24]/);
      }
    });

    it('of another host: what is printed and scanned names this site (host-header poisoning)', async () => {
      const { id } = await buildSession(host, circle.id);
      const answer = await raw(
        `GET /api/sessions/${id}/live HTTP/1.1\r\nHost: elsewhere.example\r\nX-Forwarded-Host: elsewhere.example\r\nX-Forwarded-Proto: https\r\nCookie: ${cookie}\r\nConnection: close\r\n\r\n`,
      );
      expect(answer).toContain(`${test.env.PEGWELL_URL}/f/`);
      expect(answer).not.toContain('elsewhere.example');
    });
  });

  describe('the wire', () => {
    it.each([
      ['two lengths', 'Content-Length: 5\r\nContent-Length: 6'],
      [
        'a length and chunks (RFC 9112 section 6.1, request smuggling)',
        'Content-Length: 5\r\nTransfer-Encoding: chunked',
      ],
      ['chunks that are none', 'Transfer-Encoding: xchunked'],
      ['a header that ends nowhere', `X: ${'x'.repeat(20_000)}`],
    ])('%s', async (_, lines) => {
      const answer = await raw(
        `POST /api/auth/login HTTP/1.1\r\nHost: localhost\r\nContent-Type: application/json\r\n${lines}\r\n\r\n0\r\n\r\n`,
      );
      expect(answer).toMatch(/^HTTP\/1\.1 4/);
      expect((await send('/api/health', {})).status).toBe(200);
    });

    it('TRACE: says nothing back', async () => {
      const answer = await raw(
        `TRACE /api/health HTTP/1.1\r\nHost: localhost\r\nCookie: ${cookie}\r\nConnection: close\r\n\r\n`,
      );
      expect(answer).toMatch(/^HTTP\/1\.1 4/);
      expect(answer).not.toContain(cookie);
    });

    it('a request id of the caller’s: the log has its own', async () => {
      const answer = await send('/api/health', { headers: { 'x-request-id': 'forged' } });
      expect(answer.headers.get('x-request-id')).toMatch(/^[0-9a-f-]{36}$/);
    });
  });

  describe('what an answer leaves behind', () => {
    it('cache of private answers: none may be kept', async () => {
      const { id, code } = await buildSession(host, circle.id);
      const paths = [
        '/api/auth/me',
        '/api/auth/me/data',
        '/api/auth/sign-ins',
        home,
        `${home}/members`,
        `${home}/tunes`,
        `${home}/tunes/export?format=csv`,
        `${home}/history`,
        `/api/sessions/${id}`,
        `/api/sessions/${id}/sheet.pdf`,
        `/api/sessions/${id}/calendar.ics`,
        `/api/sessions/${id}/racks`,
        '/api/circles/nothing',
      ];
      for (const path of paths) {
        expect([path, (await send(path, {})).headers.get('cache-control')]).toEqual([path, 'no-store']);
      }
      // What a phone follows is asked again each time, by its tag.
      expect((await send(`/api/follow/${code}`, {})).headers.get('cache-control')).toBe('no-cache');
    });

    it('clickjacking: no page may be framed, and none runs a script of its own', async () => {
      const { headers } = await send('/', {});
      const policy = headers.get('content-security-policy') ?? '';
      expect(policy).toContain("frame-ancestors 'none'");
      expect(policy).toMatch(/script-src 'self'(;|$)/);
      expect(policy).toContain("object-src 'none'");
      expect(policy).toContain("base-uri 'none'");
      expect(headers.get('x-frame-options')).toBe('DENY');
      expect(headers.get('x-powered-by')).toBeNull();
    });

    it('answers of the API have nosniff alone', async () => {
      const { headers } = await send('/api/health', {});
      expect(headers.get('x-content-type-options')).toBe('nosniff');
      expect(headers.get('content-security-policy')).toBeNull();
    });
  });
});
