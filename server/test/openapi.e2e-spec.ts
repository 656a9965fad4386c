import { startApp, type TestApp } from './app';

/** The routes on which outside programs rely, as the contract lists them. */
const CONTRACT = `
GET /api/health
POST /api/auth/register
POST /api/auth/login
POST /api/auth/logout
GET /api/auth/me
POST /api/circles
POST /api/circles/{circleId}/members
POST /api/circles/{circleId}/tunes
GET /api/circles/{circleId}/tunes
POST /api/circles/{circleId}/tunes/import
GET /api/circles/{circleId}/tunes/export
POST /api/circles/{circleId}/sessions
GET /api/sessions/{id}
PUT /api/sessions/{id}/board
POST /api/score
POST /api/suggest
POST /api/sessions/{id}/suggestion
POST /api/sessions/{id}/suggestion/accept
POST /api/sessions/{id}/live
GET /api/follow/{code}
GET /api/sessions/{id}/sheet.pdf
GET /api/sessions/{id}/calendar.ics
`
  .trim()
  .split('\n');

interface Operation {
  readonly responses: Record<string, { content?: Record<string, { schema?: unknown }> }>;
  readonly requestBody?: unknown;
  readonly parameters?: { name: string; in: string }[];
}

describe('GET /api/openapi.json', () => {
  let test: TestApp;
  let document: {
    openapi: string;
    paths: Record<string, Record<string, Operation>>;
    components: { schemas: Record<string, unknown> };
  };
  beforeAll(async () => {
    test = await startApp();
    const answer = await test.caller().get('/api/openapi.json').expect(200);
    document = answer.body as typeof document;
  });
  afterAll(() => test.close());

  const operations = () =>
    Object.entries(document.paths).flatMap(([path, methods]) =>
      Object.entries(methods).map(([method, operation]) => ({
        name: `${method.toUpperCase()} ${path}`,
        path,
        operation,
      })),
    );

  it('is an OpenAPI 3 document', () => {
    expect(document.openapi).toMatch(/^3\./);
  });

  it('describes every route of the contract', () => {
    const names = operations().map(({ name }) => name);
    expect(CONTRACT.filter((route) => !names.includes(route))).toEqual([]);
  });

  it('names every part of a path, and what comes back when it goes well and when it does not', () => {
    for (const { name, path, operation } of operations()) {
      const named = (operation.parameters ?? [])
        .filter((each) => each.in === 'path')
        .map((each) => `{${each.name}}`);
      expect([name, [...new Set(named)].sort()]).toEqual([name, (path.match(/\{\w+\}/g) ?? []).sort()]);
      const statuses = Object.keys(operation.responses);
      expect([name, statuses.some((status) => /^[23]/.test(status)), statuses.includes('default')]).toEqual([
        name,
        true,
        true,
      ]);
    }
  });

  it('describes the body of every route that takes one', () => {
    const bare = operations().filter(
      ({ name, operation }) => /^(POST|PUT|PATCH)/.test(name) && !operation.requestBody,
    );
    // Signing out, bringing a tune back, undoing an import, asking for another code or another mail take none.
    expect(
      bare.map(({ name }) => name).filter((name) => !/logout|restore|undo$|code$|again$/.test(name)),
    ).toEqual([]);
  });

  it('points only to schemas that are there', () => {
    const text = JSON.stringify(document);
    const wanted = [...text.matchAll(/"#\/components\/schemas\/([^"]+)"/g)].map((match) => match[1] ?? '');
    expect(wanted.length).toBeGreaterThan(20);
    expect([...new Set(wanted)].filter((name) => !(name in document.components.schemas))).toEqual([]);
  });
});
