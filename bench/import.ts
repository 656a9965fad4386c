// What importing costs, over HTTP at a built server (`npm run bench:import [runs]`). Needs a cluster to make a database
// on, as the tests do: PEGWELL_TEST_DATABASE_URL.
import { readFileSync } from 'node:fs';
import { freshDatabase, startSite } from '../e2e/site';
import { at, row, short } from './figures';
import { asAbc, asCsv, libraryRows } from './library';

const RUNS = Number(process.argv[2] ?? 3);
const PREVIEWED = 5_000;
const LIBRARY = 10_000;

interface Report {
  readonly created: number;
  readonly updated: number;
  readonly unchanged: number;
  readonly importId?: string;
}

async function main(): Promise<void> {
  const database = await freshDatabase();
  const site = await startSite(database.url);
  try {
    await measure(site.url);
  } finally {
    await site.stop();
    await database.drop();
  }
}

async function measure(url: string): Promise<void> {
  const ask = asker(url);
  await ask.json('/api/auth/register', {
    ...{ email: 'bench@example.org', password: 'crooked tunes at dusk', displayName: 'Bench' },
  });
  console.log(row(`${RUNS} runs, milliseconds`, "server's work", 'on the clock', 'worst', '/api/health p95'));
  console.log(row('---', '--:', '--:', '--:', '--:'));
  const table = asCsv(libraryRows(PREVIEWED, 1));
  const tunes = asAbc(libraryRows(PREVIEWED, 1));
  const rows = libraryRows(LIBRARY, 2);
  const large = asCsv(rows);
  const slower = asCsv(
    rows.map((cells, at) => cells.map((cell, column) => (at > 0 && column === 3 ? `slow ${cell}` : cell))),
  );
  const times = new Map<string, { ms: number[]; work: number[]; waits: number[] }>();
  let isWatched = true;
  const time = async (
    what: string,
    work: () => Promise<Report>,
    expected: Partial<Report>,
  ): Promise<Report> => {
    const beside = isWatched ? watch(url) : null;
    const before = workOfServer();
    const begun = performance.now();
    const report = await work();
    const ms = performance.now() - begun;
    const entry = times.get(what) ?? { ms: [], work: [], waits: [] };
    if (beside) entry.waits.push(...(await beside.end()));
    else {
      entry.ms.push(ms);
      entry.work.push(workOfServer() - before);
    }
    times.set(what, entry);
    for (const [field, count] of Object.entries(expected)) {
      if (report[field as keyof Report] !== count) throw new Error(`${what}: ${JSON.stringify(expected)}`);
    }
    return report;
  };
  // Watching is work too: the first run is for that alone.
  for (let run = 0; run <= RUNS; run++) {
    isWatched = run === 0;
    const empty = await ask.circle();
    await time('preview of 5,000 tunes, CSV, empty library', () => ask.send(empty, table, 'csv', true), {
      created: PREVIEWED,
    });
    await time(
      'preview of 5,000 tunes, ABC with music, empty library',
      () => ask.send(empty, tunes, 'abc', true),
      {
        created: PREVIEWED,
      },
    );
    const { importId = '' } = await time('import of 5,000 tunes', () => ask.send(empty, table, 'csv'), {
      created: PREVIEWED,
    });
    await time('undoing it', () => ask.undo(empty, importId), {});
    const full = await ask.circle();
    await time('import of 10,000 tunes', () => ask.send(full, large, 'csv'), { created: LIBRARY });
    await time('preview of 5,000 others beside 10,000', () => ask.send(full, table, 'csv', true), {});
    await time('the 10,000 again, unchanged', () => ask.send(full, large, 'csv'), { unchanged: LIBRARY });
    await time('the 10,000 again, all changed', () => ask.send(full, slower, 'csv'), { updated: LIBRARY });
  }
  for (const [what, { ms, work, waits }] of times) {
    console.log(
      row(what, short(at(work, 0.5)), short(at(ms, 0.5)), short(Math.max(...ms)), short(at(waits, 0.95))),
    );
  }
}

/** Milliseconds of the processor that the server has used, its threads included (proc(5): ticks of 10 ms). */
function workOfServer(): number {
  const children = readFileSync(`/proc/self/task/${process.pid}/children`, 'utf8').trim().split(' ');
  const child = children.find((id) => readFileSync(`/proc/${id}/cmdline`, 'utf8').includes('main.js')) ?? '';
  const [user, system] = readFileSync(`/proc/${child}/stat`, 'utf8').split(') ')[1]!.split(' ').slice(11, 13);
  return (Number(user) + Number(system)) * 10;
}

/** Asks for the server's health every 20 ms, and keeps how long each answer took. */
function watch(url: string): { end: () => Promise<number[]> } {
  const waits: number[] = [];
  const stop = new AbortController();
  const watching = (async () => {
    while (!stop.signal.aborted) {
      const begun = performance.now();
      await fetch(`${url}/api/health`);
      waits.push(performance.now() - begun);
      await new Promise((resolve) => setTimeout(resolve, 20));
    }
  })();
  return {
    end: async () => {
      stop.abort();
      await watching;
      return waits;
    },
  };
}

function asker(url: string) {
  let cookie = '';
  const post = async (
    path: string,
    body: BodyInit,
    headers: Record<string, string> = {},
  ): Promise<unknown> => {
    const answer = await fetch(url + path, { method: 'POST', body, headers: { ...headers, cookie } });
    const set = answer.headers.getSetCookie().map((line) => line.split(';')[0]);
    if (set.length > 0) cookie = set.join('; ');
    if (!answer.ok) throw new Error(`${path} answered ${answer.status}: ${await answer.text()}`);
    return answer.json();
  };
  const json = (path: string, body: object) =>
    post(path, JSON.stringify(body), { 'content-type': 'application/json' });
  return {
    json,
    circle: async (): Promise<string> =>
      ((await json('/api/circles', { name: 'Bench' })) as { id: string }).id,
    send: async (circle: string, file: string, format: string, dryRun = false): Promise<Report> => {
      const body = new FormData();
      body.append('file', new Blob([file]), `tunes.${format}`);
      return (await post(`/api/circles/${circle}/tunes/import?dryRun=${dryRun}`, body)) as Report;
    },
    undo: async (circle: string, importId: string): Promise<Report> =>
      (await post(`/api/circles/${circle}/tunes/imports/${importId}/undo`, '')) as Report,
  };
}

void main();
