import { Controller, Get, RequestMethod } from '@nestjs/common';
import { METHOD_METADATA, PATH_METADATA } from '@nestjs/common/constants';
import { MetadataScanner, ModulesContainer, Reflector } from '@nestjs/core';
import type { Circle } from '@pegwell/shared/contract/circles';
import { may } from '@pegwell/shared/policy';
import { ACCESS, type Access } from '../src/common/access';
import { startApp, type TestApp } from './app';
import { buildAccount, buildCircle, buildMember, buildSession, type Person } from './build';

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

const undeclared = (routes: readonly Route[]) => routes.filter(({ access }) => access === undefined);

describe('every route', () => {
  let test: TestApp;
  let routes: Route[];
  let circle: Circle;
  let sessionId: string;
  let people: { nobody: null; host: Person; cohost: Person; player: Person; elsewhere: Person };

  beforeAll(async () => {
    test = await startApp();
    routes = routesOf(controllersOf(test));
    const built = await buildCircle(test);
    circle = built.circle;
    people = {
      nobody: null,
      host: built.host,
      cohost: await buildMember(test, circle, built.host, 'cohost'),
      player: await buildMember(test, circle, built.host, 'player'),
      elsewhere: await buildAccount(test, 'From elsewhere'),
    };
    sessionId = (await buildSession(built.host, circle.id)).id;
  });
  afterAll(() => test.close());

  /** Asks with nothing in the body: whoever may call it is told what is missing, nobody else hears more than no. */
  async function ask(route: Route, person: Person | null): Promise<number> {
    const path = route.path
      .replace(':circleId', circle.id)
      .replace(
        ':id',
        route.path.startsWith('/api/sessions/') ? sessionId : '7b0c3a52-5f9d-4b7e-9f0a-2f6c1e1d0a77',
      )
      .replace(/:\w+/g, '7b0c3a52-5f9d-4b7e-9f0a-2f6c1e1d0a77');
    const caller = person?.caller ?? test.caller();
    return (await caller[route.method](path)).status;
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

  it('answers 401 to nobody where it is not for anyone', async () => {
    for (const route of routes.filter(({ access }) => access?.who !== 'anyone')) {
      expect([route.name, await ask(route, null)]).toEqual([route.name, 401]);
    }
  });

  it('answers 404 to members of other circles, as if nothing were there', async () => {
    for (const route of routes.filter(({ access }) => access?.who === 'member')) {
      expect([route.name, await ask(route, people.elsewhere)]).toEqual([route.name, 404]);
    }
  });

  it('answers 403 to a role without the right, and lets the others in', async () => {
    // Removing goes last, or nothing is left to ask about.
    const ordered = [...routes].sort((a, b) => Number(a.method === 'delete') - Number(b.method === 'delete'));
    for (const role of ['player', 'cohost', 'host'] as const) {
      for (const route of ordered) {
        if (route.access?.who !== 'member') continue;
        const allowed = may(role, route.access.action);
        if (allowed && route.method === 'delete') continue;
        const status = await ask(route, people[role]);
        expect([role, route.name, status === 403]).toEqual([role, route.name, !allowed]);
        expect([role, route.name, status < 500]).toEqual([role, route.name, true]);
      }
    }
  });

  it('answers 404 for a malformed id, to members too', async () => {
    await people.host.caller.get('/api/circles/not-an-id').expect(404);
    await people.host.caller.get('/api/sessions/not-an-id').expect(404);
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
