import { RequestMethod, type Type } from '@nestjs/common';
import { NestFactory } from '@nestjs/core';
import type { NestExpressApplication } from '@nestjs/platform-express';
import compression from 'compression';
import cookieParser from 'cookie-parser';
import { Logger } from 'nestjs-pino';
import { AppModule } from './app.module';
import { readBody } from './common/body';
import { answerHeaders, pageHeaders } from './common/headers';
import { ownOrigin } from './common/origin';
import type { Env } from './env';
import { Metrics } from './metrics/metrics';
import { serveOpenApi } from './openapi';
import { servePages } from './pages';

/** The whole server, not yet listening: what main.ts starts and the tests call over HTTP. */
export async function createApp(env: Env, controllers: Type[] = []): Promise<NestExpressApplication> {
  const app = await NestFactory.create<NestExpressApplication>(AppModule.with(env, controllers), {
    bodyParser: false,
    bufferLogs: true,
    abortOnError: false,
  });
  app.useLogger(app.get(Logger));
  app.set('trust proxy', env.PEGWELL_PROXIES.length > 0 ? env.PEGWELL_PROXIES : false);
  app.disable('x-powered-by');
  app.set('etag', false);
  app.use(pageHeaders(env));
  // A hall has poor signal: pages and answers go out compressed.
  app.use(compression());
  app.use(
    '/api',
    app.get(Metrics).measure,
    answerHeaders,
    ownOrigin(env.PEGWELL_URL),
    cookieParser(),
    readBody,
  );
  app.setGlobalPrefix('api', { exclude: [{ path: '/', method: RequestMethod.GET }] });
  serveOpenApi(app);
  servePages(app);
  app.enableShutdownHooks();
  return app;
}
