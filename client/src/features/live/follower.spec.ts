import type { Follow } from '@pegwell/shared/contract/live';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { Follower, type Heard } from './follower';
import { follow } from './follow-fixtures';

/** A server of one evening that tags its answers, and can fall silent. */
function serve() {
  const server = {
    answer: follow() as Follow | null,
    reachable: true,
    asked: [] as { kind: string | null; tag: string | null; at: number }[],
  };
  vi.stubGlobal('fetch', (path: string, init: RequestInit = {}) => {
    const kind = new URL(path, 'http://pegwell.test').searchParams.get('kind');
    const tag = new Headers(init.headers).get('if-none-match');
    server.asked.push({ kind, tag, at: Date.now() });
    if (!server.reachable) return Promise.reject(new TypeError('no network'));
    if (!server.answer) {
      const body = JSON.stringify({ status: 404, code: 'not-found', detail: 'No evening has this code.' });
      return Promise.resolve(new Response(body, { status: 404 }));
    }
    const etag = `"${server.answer.version}-${kind}"`;
    if (tag === etag) return Promise.resolve(new Response(null, { status: 304, headers: { etag } }));
    const body = JSON.stringify({ ...server.answer, kind });
    return Promise.resolve(new Response(body, { status: 200, headers: { etag } }));
  });
  return server;
}

const look = (state: 'visible' | 'hidden') => {
  Object.defineProperty(document, 'visibilityState', { value: state, configurable: true });
  document.dispatchEvent(new Event('visibilitychange'));
};

describe('following an evening', () => {
  let server: ReturnType<typeof serve>;
  let heard: Heard[];
  let running: Follower[];

  beforeEach(() => {
    vi.useFakeTimers({ now: 1_800_000_000_000 });
    server = serve();
    heard = [];
    running = [];
  });
  afterEach(() => {
    for (const follower of running) follower.stop();
    look('visible');
    vi.useRealTimers();
  });

  async function start(kinds: readonly string[] | 'room' = ['fiddle']) {
    const follower = new Follower('QGQE34ES', kinds, (news) => heard.push(news));
    running.push(follower);
    follower.start();
    await pass(0);
    return follower;
  }
  const pass = (ms: number) => vi.advanceTimersByTimeAsync(ms);
  const last = () => heard.at(-1)!;
  /** ms between the questions, from the first. */
  const gaps = () => server.asked.slice(1).map(({ at }, index) => at - server.asked[index]!.at);

  it('asks every two seconds, and after the first answer only for what changed', async () => {
    await start();
    await pass(6_000);
    expect(gaps()).toEqual([2_000, 2_000, 2_000]);
    expect(server.asked.map(({ tag }) => tag)).toEqual([null, '"1-fiddle"', '"1-fiddle"', '"1-fiddle"']);
    expect(last()).toMatchObject({ problem: null, heardAt: Date.now(), follows: [{ version: 1 }] });
    server.answer = follow({ version: 2, retuneIn: 4 });
    await pass(2_000);
    expect(last().follows[0]).toMatchObject({ version: 2, retuneIn: 4 });
  });

  it('asks seldom while nobody looks, and at once when somebody does', async () => {
    await start();
    look('hidden');
    await pass(32_000);
    expect(gaps()).toEqual([2_000, 15_000, 15_000]);
    look('visible');
    await pass(0);
    expect(gaps()).toEqual([2_000, 15_000, 15_000, 0]);
  });

  it('asks ever slower while there is no answer, and keeps the last one with its time', async () => {
    await start();
    const heardAt = Date.now();
    server.reachable = false;
    await pass(62_000);
    expect(gaps()).toEqual([2_000, 2_000, 4_000, 8_000, 15_000, 15_000, 15_000]);
    expect(last()).toMatchObject({ heardAt, follows: [{ version: 1 }], problem: { code: 'offline' } });
    server.reachable = true;
    window.dispatchEvent(new Event('online'));
    await pass(0);
    expect(last()).toMatchObject({ heardAt: Date.now(), problem: null });
  });

  it('does not wait forever for an answer that does not come', async () => {
    vi.stubGlobal('fetch', (_: string, { signal }: RequestInit) => {
      return new Promise((_resolve, reject) => {
        signal?.addEventListener('abort', () => reject(new DOMException('', 'AbortError')));
      });
    });
    await start();
    await pass(7_900);
    expect(heard).toEqual([]);
    await pass(200);
    expect(last()).toMatchObject({ heardAt: null, problem: { code: 'offline' } });
  });

  it('begins with what the device kept, for this evening only', async () => {
    const first = await start();
    first.stop();
    server.reachable = false;
    const later = new Follower('QGQE34ES', ['fiddle'], () => undefined);
    expect(later.current()).toMatchObject({ follows: [{ version: 1 }], heardAt: Date.now() });
    expect(new Follower('22223333', ['fiddle'], () => undefined).current().follows).toEqual([]);
  });

  it('does not show an older answer after a newer one, unless it stays so', async () => {
    server.answer = follow({ version: 5 });
    await start();
    server.answer = follow({ version: 4 });
    await pass(4_000);
    expect(last().follows[0]?.version).toBe(5);
    await pass(2_000);
    expect(last().follows[0]?.version).toBe(4);
  });

  it('says that a code is not known, and asks again half a minute later', async () => {
    server.answer = null;
    await start();
    expect(last()).toMatchObject({
      follows: [],
      problem: { status: 404, detail: 'No evening has this code.' },
    });
    await pass(30_000);
    expect(gaps()).toEqual([30_000]);
  });

  it('asks seldom once the evening is over', async () => {
    server.answer = follow({ status: 'finished', now: null, next: null, later: [] });
    await start();
    await pass(15_000);
    expect(gaps()).toEqual([15_000]);
  });

  it('follows all kinds of the room, whichever they are by then', async () => {
    await start('room');
    expect(last().follows.map(({ kind }) => kind)).toEqual(['fiddle', 'banjo']);
    server.answer = follow({ version: 2, kinds: ['banjo', 'guitar'] });
    await pass(2_000);
    expect(last().follows.map(({ kind, version }) => [kind, version])).toEqual([
      ['banjo', 2],
      ['guitar', 2],
    ]);
  });

  it('stops', async () => {
    const follower = await start();
    follower.stop();
    look('visible');
    await pass(60_000);
    expect(server.asked).toHaveLength(1);
  });
});
