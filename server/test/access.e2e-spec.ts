import { Controller, Get, RequestMethod } from '@nestjs/common';
import { METHOD_METADATA, PATH_METADATA } from '@nestjs/common/constants';
import { MetadataScanner, ModulesContainer, Reflector } from '@nestjs/core';
import type { Circle } from '@pegwell/shared/contract/circles';
import type { Session } from '@pegwell/shared/contract/sessions';
import { may } from '@pegwell/shared/policy';
import { ACCESS, type Access } from '../src/common/access';
import { startApp, type TestApp } from './app';
import { buildCircle, buildMember, buildSession, type Person } from './build';

interface Route {
  readonly name: string;
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  readonly path: string;
  readonly access: Access | undefined;
}

type ControllerClass = abstract new (...args: never[]) => object;

/** Every route of these controllers, found by what Nest itself reads. */
function routesOf(controllers: readonly ControllerClass[]): Route[] {
  return controllers.flatMap((controller) => {
    const prototype = controller.prototype as Record<string, (...args: never[]) => unknown>;
    const base = first(Reflect.getMetadata(PATH_METADATA, controller) as string | string[]);
    return new MetadataScanner().getAllMethodNames(prototype).flatMap((name): Route[] => {
      const handler = prototype[name];
      const path = handler && (Reflect.getMetadata(PATH_METADATA, handler) as string | string[] | undefined);
      if (!handler || path === undefined) return [];
      const method = RequestMethod[Reflect.getMetadata(METHOD_METADATA, handler) as number]?.toLowerCase();
      return [
        {
          name: `${controller.name}.${name}`,
          method: method as Route['method'],
          path: `/api/${base}/${first(path)}`.replace(/\/+/g, '/').replace(/\/$/, ''),
          access: new Reflector().get<Access | undefined>(ACCESS, handler),
        },
      ];
    });
  });
}

const first = (path: string | string[]) => [path].flat()[0] ?? '';

/** The controllers that the running server has. */
function controllersOf(test: TestApp): ControllerClass[] {
  const modules = [...test.app.get(ModulesContainer).values()];
  return modules.flatMap((each) =>
    [...each.controllers.values()].map(({ metatype }) => metatype as ControllerClass),
  );
}

const NOT_THERE = '7b0c3a52-5f9d-4b7e-9f0a-2f6c1e1d0a77';
/** What is asked later takes more away from whoever asks. */
const takesAway = ({ method, path }: Route) => (path.endsWith('/logout') ? 2 : method === 'delete' ? 1 : 0);
const undeclared = (routes: readonly Route[]) => routes.filter(({ access }) => access === undefined);

/** Everybody who may knock at a route. */
const CALLERS = ['nobody', 'code holder', 'player', 'cohost', 'host', 'elsewhere', 'removed'] as const;
type CallerName = (typeof CALLERS)[number];

/** What the policy table and the route's own declaration promise a caller. */
function promised({ access }: Route, caller: CallerName): 401 | 403 | 404 | 'let in' {
  if (!access || access.who === 'anyone') return 'let in';
  if (caller === 'nobody' || caller === 'code holder') return 401;
  if (access.who === 'account') return 'let in';
  // As if nothing were there.
  if (caller === 'elsewhere' || caller === 'removed') return 404;
  return may(caller, access.action) ? 'let in' : 403;
}

describe('every route', () => {
  let test: TestApp;
  let routes: Route[];
  let circle: Circle;
  let session: Session;
  let people: Record<Exclude<CallerName, 'nobody' | 'code holder'>, Person>;

  beforeAll(async () => {
    test = await startApp();
    routes = routesOf(controllersOf(test));
    const built = await buildCircle(test);
    circle = built.circle;
    people = {
      host: built.host,
      cohost: await buildMember(test, circle, built.host, 'cohost'),
      player: await buildMember(test, circle, built.host, 'player'),
      elsewhere: (await buildCircle(test)).host,
      removed: await buildMember(test, circle, built.host, 'cohost'),
    };
    await built.host.caller.delete(`/api/circles/${circle.id}/members/${people.removed.id}`).expect(204);
    session = await buildSession(built.host, circle.id);
  });
  afterAll(() => test.close());

  /** Asks with nothing in the body: whoever may call it is told what is missing, nobody else hears more than no. */
  async function ask(route: Route, name: CallerName): Promise<number> {
    const path = route.path
      .replace(':circleId', circle.id)
      .replace(':id', route.path.startsWith('/api/sessions/') ? session.id : NOT_THERE)
      .replace(/:\w+/g, NOT_THERE);
    if (name === 'nobody') return (await test.caller()[route.method](path)).status;
    if (name === 'code holder') {
      // Wherever a careless server might look for it.
      const { code } = session;
      const asked = test.caller()[route.method](`${path}?code=${code}`);
      return (await asked.set({ 'X-Code': code, Authorization: `Bearer ${code}`, Cookie: `code=${code}` }))
        .status;
    }
    return (await people[name].caller[route.method](path)).status;
  }

  it('finds the routes, those of the contract among them', () => {
    expect(routes.length).toBeGreaterThan(15);
    const names = routes.map(({ method, path }) => `${method} ${path}`);
    expect(names).toEqual(expect.arrayContaining(['post /api/auth/login', 'put /api/sessions/:id/board']));
  });

  it('declares who may call it', () => {
    expect(undeclared(routes).map(({ name }) => name)).toEqual([]);
  });

  it('has the circle or the session in its path when it is for members', () => {
    const wrong = routes.filter(
      ({ access, path }) =>
        access?.who === 'member' &&
        !path.startsWith(access.of === 'circle' ? '/api/circles/:circleId' : '/api/sessions/:id'),
    );
    expect(wrong).toEqual([]);
  });

  it.each(CALLERS)('keeps its promise to whoever is: %s', async (caller) => {
    // Signing out goes last, or nobody is left to ask.
    const ordered = [...routes].sort((a, b) => takesAway(a) - takesAway(b));
    for (const route of ordered) {
      const promise = promised(route, caller);
      // Whether hosts may remove what they may is for the tests of what is removed.
      if (promise === 'let in' && route.method === 'delete') continue;
      const status = await ask(route, caller);
      const met = promise === 'let in' ? ![401, 403].includes(status) && status < 500 : status === promise;
      expect([route.name, promise, status, met]).toEqual([route.name, promise, status, true]);
    }
  });

  it('lets whoever has the code follow', async () => {
    const { circle: ours, host } = await buildCircle(test);
    await test
      .caller()
      .get(`/api/follow/${(await buildSession(host, ours.id)).code}`)
      .expect(200);
  });

  it('answers 404 for a malformed id, to members too', async () => {
    const { host } = await buildCircle(test);
    await host.caller.get('/api/circles/not-an-id').expect(404);
    await host.caller.get('/api/sessions/not-an-id').expect(404);
  });
});

describe('a route that declares nothing', () => {
  @Controller('forgotten')
  class ForgottenController {
    @Get(':id')
    read(): string {
      return 'a secret';
    }
  }

  it('is found by the walk', () => {
    expect(undeclared(routesOf([ForgottenController])).map(({ name }) => name)).toEqual([
      'ForgottenController.read',
    ]);
  });

  it('is refused to a host too', async () => {
    const test = await startApp(undefined, [ForgottenController]);
    const { host } = await buildCircle(test);
    await host.caller.get('/api/forgotten/1').expect(403);
    await test.close();
  });
});
