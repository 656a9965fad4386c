import fc from 'fast-check';
import { startApp, type TestApp } from './app';
import type { Recipe } from './fuzz/recipe';
import { recipesOf, type OpenApi } from './fuzz/recipes';
import { send } from './fuzz/send';
import { buildPeople, buildWorld, type People } from './fuzz/world';

/** `npm run bench:fuzz` sends ten times as many, from another seed. */
const REQUESTS = Number(process.env['FUZZ_REQUESTS'] ?? 5_000);
const SEED = Number(process.env['FUZZ_SEED'] ?? 20_261_201);
/** A circle is worn out after this many: its evenings are gone, its hosts have left. */
const PER_WORLD = 250;
/** At once. */
const LANES = 2;

describe(`${REQUESTS} requests made from the OpenAPI document`, () => {
  let test: TestApp;
  let people: People;
  beforeAll(async () => {
    // Nobody takes the mail: that must not slow an answer either.
    test = await startApp(undefined, [], { PEGWELL_MAIL_URL: 'smtp://127.0.0.1:9' });
    people = await buildPeople(test);
    // Under test the threads that draw and solve read TypeScript as it is written, which takes them seconds.
    const { cookies, ids } = await buildWorld(test, people);
    const session = `${test.url}/api/sessions/${ids['session']?.[0] ?? ''}`;
    const headers = { cookie: cookies.host, 'content-type': 'application/json' };
    await fetch(`${session}/sheet.pdf`, { headers });
    await fetch(`${session}/suggestion`, { headers, method: 'POST', body: '{}' });
  });
  afterAll(() => test.close());

  it(
    'meet no fault of ours, are answered within two seconds, and reach what they are about',
    async () => {
      const document = (await test.caller().get('/api/openapi.json').expect(200)).body as OpenApi;
      const recipes = fc.sample(recipesOf(document), { seed: SEED, numRuns: REQUESTS });
      const faults: { readonly fault: string; readonly recipe: Recipe }[] = [];
      const reached = new Set<string>();
      const counts = new Map<number, number>();
      for (let from = 0; from < recipes.length; from += PER_WORLD) {
        const world = await buildWorld(test, people);
        const waiting = recipes.slice(from, from + PER_WORLD);
        const lane = async () => {
          for (let recipe = waiting.pop(); recipe; recipe = waiting.pop()) {
            const { status, fault } = await send(test.url, recipe, world);
            counts.set(status, (counts.get(status) ?? 0) + 1);
            if (fault !== null) faults.push({ fault, recipe });
            if (status < 400) reached.add(recipe.operation);
          }
        };
        await Promise.all(Array.from({ length: LANES }, lane));
      }
      if (process.env['FUZZ_REQUESTS'])
        process.stdout.write(`by status: ${JSON.stringify([...counts].sort())}\n`);
      expect(
        faults.slice(0, 10).map(({ fault, recipe }) => `${fault}\n${JSON.stringify(recipe).slice(0, 2_000)}`),
      ).toEqual([]);
      const all = Object.entries(document.paths).flatMap(([path, methods]) =>
        Object.keys(methods).map((method) => `${method} ${path}`),
      );
      // Nothing was learnt about a route that every request bounced off. A few are rare (a link wants its mail).
      const missed = all.filter((operation) => !reached.has(operation));
      expect({ missed, few: missed.length <= all.length / 10 }).toEqual({ missed, few: true });
    },
    60_000 + REQUESTS * 60,
  );
});
