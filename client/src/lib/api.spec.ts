import { afterEach, describe, expect, it, vi } from 'vitest';
import { api, send, urlOf } from './api';
import { ProblemError } from './problem';

const answer = (status: number, body: unknown) =>
  vi.stubGlobal(
    'fetch',
    vi.fn(() => Promise.resolve(new Response(body === undefined ? null : JSON.stringify(body), { status }))),
  );

const refused = async (asked: Promise<unknown>): Promise<ProblemError> => {
  const error: unknown = await asked.then(
    () => null,
    (reason: unknown) => reason,
  );
  if (!(error instanceof ProblemError)) throw new Error('It was not refused.');
  return error;
};

afterEach(() => vi.unstubAllGlobals());

describe('the way to the API', () => {
  it('leaves out what was not asked for and encodes what was', () => {
    expect(urlOf('/tunes', { search: 'Soldier’s Joy & co', key: '', kind: undefined, page: 2 })).toBe(
      '/api/tunes?search=Soldier%E2%80%99s%20Joy%20%26%20co&page=2',
    );
  });

  it('sends JSON with the cookie of this site and reads JSON', async () => {
    answer(201, { id: 'x' });
    await expect(api.post('/circles', { name: 'Heron Weir' })).resolves.toEqual({ id: 'x' });
    const [url, init] = vi.mocked(fetch).mock.calls[0]!;
    expect(url).toBe('/api/circles');
    expect(init).toMatchObject({
      method: 'POST',
      credentials: 'same-origin',
      body: '{"name":"Heron Weir"}',
      headers: { 'content-type': 'application/json' },
    });
  });

  it('lets a form name its own boundary', async () => {
    answer(200, {});
    await api.post('/import', new FormData());
    expect(vi.mocked(fetch).mock.calls[0]![1]?.headers).not.toHaveProperty('content-type');
  });

  it('gives nothing for 204', async () => {
    answer(204, undefined);
    await expect(api.delete('/x')).resolves.toBeUndefined();
  });

  // RFC 9457, section 3: detail is the human-readable explanation; `errors` is our extension member.
  it('turns a problem document into an error with all its issues', async () => {
    answer(400, {
      status: 400,
      code: 'not-valid',
      title: 'Not valid',
      detail: 'Two things are wrong.',
      errors: [
        { path: 'title', message: 'A title is missing.' },
        { path: ['sets', 0, 'title'], message: 'A name is missing.' },
      ],
    });
    const error = await refused(api.get('/x'));
    expect(error).toMatchObject({ status: 400, code: 'not-valid', detail: 'Two things are wrong.' });
    expect(error.errors.map(({ path }) => path)).toEqual(['title', 'sets.0.title']);
  });

  it('keeps the state that a conflict carries', async () => {
    answer(409, { status: 409, code: 'changed', detail: 'Changed meanwhile.', current: { version: 7 } });
    const error = await refused(api.put('/x', {}));
    expect(error.body).toMatchObject({ current: { version: 7 } });
  });

  it('has a sentence of its own for an answer that is no problem document', async () => {
    vi.stubGlobal(
      'fetch',
      vi.fn(() => Promise.resolve(new Response('<html>bad gateway</html>', { status: 502 }))),
    );
    const error = await refused(api.get('/x'));
    expect(error).toMatchObject({ status: 502, code: 'http-502' });
    expect(error.detail).toMatch(/try again/i);
  });

  it('says that the server cannot be reached', async () => {
    vi.stubGlobal(
      'fetch',
      vi.fn(() => Promise.reject(new TypeError('Failed to fetch'))),
    );
    expect(await refused(api.get('/x'))).toMatchObject({ status: 0, code: 'offline' });
  });

  it('gives the raw answer to those who ask for it', async () => {
    answer(304, undefined);
    expect((await send('GET', '/follow/ABCD')).status).toBe(304);
  });
});
