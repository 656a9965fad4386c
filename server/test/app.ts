import 'reflect-metadata';
import type { AddressInfo } from 'node:net';
import type { Type } from '@nestjs/common';
import type { NestExpressApplication } from '@nestjs/platform-express';
import supertest from 'supertest';
import { createApp } from '../src/app';
import { parseEnv, type Env } from '../src/env';
import { migratedDatabase, type TestDatabase } from './database';

export interface TestApp {
  readonly app: NestExpressApplication;
  readonly url: string;
  readonly env: Env;
  /** A caller with a cookie jar of its own, like a browser or a program. */
  caller(): Caller;
  close(): Promise<void>;
}

export type Caller = ReturnType<typeof supertest.agent>;

/** The real server on a free port, with a database of its own unless one is given. */
export async function startApp(
  given?: TestDatabase,
  controllers: Type[] = [],
  settings: Readonly<Record<string, string>> = {},
): Promise<TestApp> {
  const database = given ?? (await migratedDatabase());
  const env = parseEnv({
    NODE_ENV: 'test',
    DATABASE_URL: database.url,
    PEGWELL_LOG: process.env['PEGWELL_TEST_LOG'] ?? 'silent',
    PEGWELL_SECRET: 'a secret of the tests, long enough to be one',
    ...settings,
  });
  const app = await createApp(env, controllers);
  await app.listen(0, '127.0.0.1');
  const { port } = app.getHttpServer().address() as AddressInfo;
  const url = `http://127.0.0.1:${port}`;
  return {
    app,
    url,
    env,
    caller: () => supertest.agent(url),
    close: async () => {
      await app.close();
      if (!given) await database.drop();
    },
  };
}
