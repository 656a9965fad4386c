import fc from 'fast-check';
import { broken } from './broken';
import type { CallerName, Recipe } from './recipe';

const LABELS = ['a', 'b', 'c', 'd', 'e'];
const ENTRIES = [0, 1, 2, 3, 4, 5].map((index) => `@entry:${index}`);
const TUNES = [0, 1, 2, 3, 4, 5].map((index) => `@tune:${index}`);

const shuffled = (all: readonly string[]) =>
  fc.shuffledSubarray([...all], { minLength: all.length, maxLength: all.length });
const inTwoSets = (all: readonly string[]) =>
  fc.tuple(shuffled(all), fc.nat(all.length)).map(([order, cut]) => [order.slice(0, cut), order.slice(cut)]);
const version = fc.constantFrom(2, 2, 2, 3);
const goal = fc.constantFrom('pegs', 'stops');

const PASSWORD = 'seven crooked tunes';
const instruments = fc.constantFrom([{ arrives: 'free' }, {}], [{ arrives: 'tuned', tuning: 'AEAE' }]);
const rack = { player: fc.constant('Mara'), kind: fc.constant('fiddle'), instruments };
const newAddress = fc.uuid().map((name) => `${name}@example.org`);

const stateless = fc.record(
  {
    chairs: fc.constantFrom(
      [{ kind: 'fiddle', count: 2 }],
      [
        { kind: 'fiddle', count: 1 },
        { kind: 'banjo', count: 3 },
      ],
    ),
    openings: fc.constantFrom({}, { fiddle: null }, { fiddle: 'AEAE capo 2' }),
    goal,
    tunes: fc
      .array(fc.constantFrom('GDAE', 'AEAE', 'ADAE', 'any'), { minLength: 5, maxLength: 5 })
      .map((tunings) =>
        tunings.map((tuning, index) => ({
          ...{ id: LABELS[index], key: 'D', mode: 'major', rhythm: index % 2 ? 'waltz' : 'reel' },
          tunings: [{ kind: 'fiddle', accepted: [{ tuning }] }],
        })),
      ),
    sets: inTwoSets(LABELS),
    medleys: fc.constantFrom(
      [],
      [['a', 'b']],
      [
        ['a', 'b'],
        ['c', 'a'],
      ],
    ),
    befores: fc.constantFrom(
      [],
      [['e', 'a']],
      [
        ['e', 'a'],
        ['a', 'e'],
      ],
    ),
  },
  { requiredKeys: ['chairs', 'openings', 'tunes', 'sets'] },
);

/** Bodies that hang together, which chance does not find: every tune stands once, every rule names what is there. */
const BODIES: Readonly<Record<string, fc.Arbitrary<unknown>>> = {
  'post /api/auth/register': fc.record({
    email: newAddress,
    password: fc.constant(PASSWORD),
    displayName: fc.constant('Ada'),
  }),
  'post /api/auth/login': fc.constant({ email: '@email:0', password: PASSWORD }),
  'post /api/auth/forgot': fc.record({ email: newAddress }),
  'post /api/auth/password': fc.constant({ current: PASSWORD, password: 'another crooked tune' }),
  'post /api/auth/email': fc.record({ email: newAddress, current: fc.constant(PASSWORD) }),
  'post /api/auth/me/delete': fc.constant({ current: PASSWORD }),
  'post /api/circles/@circle:0/sessions': fc.record(
    { title: fc.constant('An evening'), startsAt: fc.constant('2027-01-14T19:30'), goal },
    { requiredKeys: ['title', 'startsAt'] },
  ),
  'patch /api/sessions/@session:0': fc.record({ title: fc.constant('Another'), goal }, { requiredKeys: [] }),
  'patch /api/circles/@circle:0/tunes/@tune:0': fc.record({
    key: fc.constantFrom('A', 'D'),
    rhythm: fc.constantFrom('reel', null),
  }),
  'post /api/sessions/@session:0/racks': fc.record(rack),
  'post /api/score': stateless,
  'post /api/suggest': stateless,
  'put /api/sessions/@session:0/board': fc.record({
    version,
    sets: inTwoSets(TUNES).map((sets) => sets.map((ids) => ({ entries: ids.map((tuneId) => ({ tuneId })) }))),
  }),
  'post /api/sessions/@session:0/suggestion': fc.record({ goal }, { requiredKeys: [] }),
  'post /api/sessions/@session:0/suggestion/accept': fc.record({ version, sets: inTwoSets(ENTRIES) }),
  'post /api/sessions/@session:0/suggestion/held-back': fc.record({ sets: inTwoSets(ENTRIES), goal }),
  'post /api/sessions/@session:0/explanation': fc.record({ sets: inTwoSets(ENTRIES) }, { requiredKeys: [] }),
  'put /api/sessions/@session:0/racks/@rack:0': fc.record({ version: fc.constantFrom(0, 1), ...rack }),
  'post /api/sessions/@session:0/live': fc.record({
    action: fc.constantFrom('start', 'next', 'back', 'retuned'),
  }),
};

/** Requests with these bodies, and with one thing wrong in them. */
export const knownGood: readonly { readonly path: string; readonly recipes: fc.Arbitrary<Recipe> }[] =
  Object.entries(BODIES).map(([name, bodies]) => {
    const [method = '', path = ''] = name.split(' ');
    const recipes = fc.record<Recipe>({
      operation: fc.constant(operationOf(name)),
      method: fc.constant(method.toUpperCase()),
      path: fc.constant(path),
      caller: fc.constant(expendable(path) ?? 'host'),
      query: fc.constant([]),
      headers: fc.constant({}),
      body: fc.oneof(bodies, broken(bodies)).map((json) => ({ json })),
    });
    return { path, recipes };
  });

/** Signing out and going away is for those who are not needed any more; null where it is for anybody. */
export function expendable(path: string): CallerName | null {
  if (path.endsWith('/membership')) return 'player';
  return /\/auth\/(logout|me\/delete|password|email|sign-ins)/.test(path) ? 'elsewhere' : null;
}

/** As the document writes it. */
function operationOf(name: string): string {
  const parts = { circle: 'circleId', session: 'id', rack: 'rackId', tune: 'tuneId' };
  return name.replace(/@(circle|session|rack|tune):0/g, (_, kind: keyof typeof parts) => `{${parts[kind]}}`);
}
