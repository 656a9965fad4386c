import fc from 'fast-check';
import { broken, nasty, RAW_BODIES } from './broken';
import { expendable, knownGood } from './known-good';
import { CALLERS, type CallerName, type Recipe } from './recipe';
import { valuesOf, type Hints, type Schema } from './from-schema';

interface Operation {
  readonly parameters?: readonly { readonly name: string; readonly in: string; readonly schema: Schema }[];
  readonly requestBody?: { readonly content: Readonly<Record<string, { readonly schema: Schema }>> };
}

export interface OpenApi {
  readonly paths: Readonly<Record<string, Readonly<Record<string, Operation>>>>;
  readonly components: { readonly schemas: Readonly<Record<string, Schema>> };
}

const id = (kind: string) => fc.nat(5).map((index) => `@${kind}:${index}`);

const HINTS: Hints = {
  kind: fc.constantFrom('fiddle', 'fiddle', 'banjo', 'guitar', 'dulcimer', 'mandolin', 'kazoo'),
  tuning: fc.constantFrom(
    'GDAE',
    'AEAE',
    'ADAE',
    'DDAD',
    'gDGBD',
    'EADGBE',
    'any',
    'GDAE capo 2',
    'AEA',
    'H',
  ),
  key: fc.constantFrom('A', 'D', 'G', 'C', 'Bb', 'F#'),
  rhythm: fc.constantFrom('reel', 'waltz', 'air', 'jig', ''),
  email: fc.constantFrom('@email:0', '@email:1', '@email:3', 'nobody@example.org', 'not an address'),
  password: fc.constantFrom(
    'seven crooked tunes',
    'another crooked tune',
    'short',
    'x'.repeat(72),
    'x'.repeat(73),
  ),
  timeZone: fc.constantFrom('UTC', 'Europe/Berlin', 'America/New_York', 'Mars/Olympus', '+02:00'),
  startsAt: fc.constantFrom(
    '2027-01-14T19:30',
    '2027-03-28T02:30',
    '2027-02-31T00:00',
    '9999-12-31T23:59Z',
    '0001-01-01T00:00',
  ),
  version: fc.constantFrom(0, 1, 2, 3),
  limitMs: fc.integer({ min: 1, max: 300 }),
  id: fc.oneof(id('entry'), id('set'), fc.constantFrom('a', 'b', 'c')),
  tuneId: id('tune'),
  entryId: id('entry'),
  settingId: fc.uuid(),
  sets: fc.oneof(id('entry'), fc.constantFrom('a', 'b', 'c')),
  medleys: fc.oneof(id('entry'), fc.constantFrom('a', 'b', 'c')),
  befores: fc.oneof(id('entry'), fc.constantFrom('a', 'b', 'c')),
};

const PATH_IDS: Readonly<Record<string, string>> = {
  circleId: 'circle',
  id: 'session',
  tuneId: 'tune',
  accountId: 'account',
  rackId: 'rack',
  importId: 'import',
  code: 'code',
};

const ODD_HEADERS: readonly Readonly<Record<string, string>>[] = [
  { 'content-type': 'text/plain' },
  { 'content-type': 'application/x-www-form-urlencoded' },
  { 'content-type': 'application/json; charset=utf-7' },
  { 'content-type': 'multipart/form-data' },
  { 'content-type': 'multipart/form-data; boundary=x' },
  { 'content-encoding': 'gzip' },
  { 'content-encoding': 'snappy' },
  { cookie: 'pegwell=eyJhbGciOiJub25lIn0.e30.' },
  { cookie: 'pegwell=%' },
  { origin: 'null' },
  { 'if-none-match': 'W/"' },
  { 'x-forwarded-for': "'; drop table tunes; --" },
  { accept: 'application/*;q=2' },
  { 'accept-encoding': 'br;q=9, *;q=0' },
  { range: 'bytes=5-1' },
];

const FILES = fc.oneof(
  fc.constantFrom(
    'title,key\nSlack Tide,D\n',
    'X:1\nT:Slack Tide\nK:D\n',
    'title;fiddle\n"open',
    '\ufeff',
    'X:1',
    '"'.repeat(5_000),
  ),
  fc.string({ unit: 'binary', maxLength: 300 }),
  fc
    .array(fc.constantFrom('X:', 'T:', 'K:', '\n', ',', '"', '%%pegwell-tuning fiddle AEAE', 'A', ';'), {
      maxLength: 60,
    })
    .map((parts) => parts.join('')),
);

/** Drawing a sheet and hashing a password take their time whatever was sent. */
const SLOW = /\.pdf$|\/auth\/(register|login|password|email|reset|me\/delete)$/;

/** Requests to every route of the document: right ones, ones with one thing wrong, and ones with nothing right. */
export function recipesOf(document: OpenApi): fc.Arbitrary<Recipe> {
  const { schemas } = document.components;
  const all = Object.entries(document.paths).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, operation]) => ({
      arbitrary: recipeOf(path, method, operation, schemas),
      weight: weightOf(path),
    })),
  );
  return fc.oneof(
    ...all,
    ...knownGood.map(({ path, recipes }) => ({ arbitrary: recipes, weight: weightOf(path) })),
  );
}

function recipeOf(
  path: string,
  method: string,
  operation: Operation,
  schemas: OpenApi['components']['schemas'],
) {
  const query = (operation.parameters ?? []).filter((each) => each.in === 'query');
  const queries = fc
    .record(
      Object.fromEntries(
        query.map(({ name, schema }) => [
          name,
          fc.oneof(
            { arbitrary: valuesOf(schema, schemas, HINTS, name), weight: 5 },
            { arbitrary: nasty, weight: 1 },
          ),
        ]),
      ),
      { requiredKeys: [] },
    )
    .chain((given) =>
      fc.subarray(Object.entries(given), { maxLength: Math.min(3, Object.keys(given).length) }),
    )
    .map((given) =>
      given.map(
        ([name, value]) => [name, typeof value === 'string' ? value : JSON.stringify(value)] as const,
      ),
    );
  const odd = fc.oneof(
    { arbitrary: fc.constant({}), weight: 9 },
    { arbitrary: fc.constantFrom(...ODD_HEADERS), weight: 1 },
  );
  return fc.record<Recipe>({
    operation: fc.constant(`${method} ${path}`),
    method: fc.constant(method.toUpperCase()),
    path: pathOf(path),
    caller: callerFor(path),
    query: queries,
    headers: odd,
    body: bodyOf(operation, schemas),
  });
}

function weightOf(path: string): number {
  return SLOW.test(path) ? 2 : 8;
}

function callerFor(path: string): fc.Arbitrary<CallerName> {
  const only = expendable(path);
  if (only) return fc.constant(only);
  return fc.oneof(
    { arbitrary: fc.constant<CallerName>('host'), weight: 12 },
    { arbitrary: fc.constantFrom(...CALLERS), weight: 4 },
  );
}

function pathOf(path: string): fc.Arbitrary<string> {
  const parts = path.split(/(\{\w+\})/).map((part) => {
    const name = /^\{(\w+)\}$/.exec(part)?.[1];
    if (name === undefined) return fc.constant(part);
    return fc.oneof(
      { arbitrary: id(path.includes('/sign-ins/') ? 'signin' : (PATH_IDS[name] ?? 'circle')), weight: 12 },
      {
        arbitrary: fc.constantFrom(
          'not-an-id',
          '%00',
          '%E0%A4%A',
          '..%2f..',
          "'",
          '%F0%9F%8E%BB',
          'x'.repeat(3_000),
        ),
        weight: 1,
      },
      { arbitrary: fc.uuid(), weight: 1 },
    );
  });
  return fc.tuple(...parts).map((made) => made.join(''));
}

function bodyOf(
  operation: Operation,
  schemas: OpenApi['components']['schemas'],
): fc.Arbitrary<Recipe['body']> {
  const content = operation.requestBody?.content;
  if (!content)
    return fc.oneof(
      { arbitrary: fc.constant(null), weight: 9 },
      { arbitrary: fc.constant({ json: {} }), weight: 1 },
    );
  if (content['multipart/form-data']) {
    return fc.record({
      file: FILES,
      name: fc.constantFrom('a.csv', 'a.abc', 'A.ABC', 'a.zip', '../a.csv', ''),
    });
  }
  const schema = content['application/json']?.schema ?? {};
  const values = valuesOf(schema, schemas, HINTS);
  return fc.oneof(
    { arbitrary: values.map((json) => ({ json })), weight: 6 },
    { arbitrary: broken(values).map((json) => ({ json })), weight: 5 },
    { arbitrary: fc.constantFrom(...RAW_BODIES).map((raw) => ({ raw })), weight: 1 },
  );
}
