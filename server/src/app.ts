import { RequestMethod, type Type } from '@nestjs/common';
import { NestFactory } from '@nestjs/core';
import type { NestExpressApplication } from '@nestjs/platform-express';
import compression from 'compression';
import cookieParser from 'cookie-parser';
import type { NextFunction, Request, Response } from 'express';
import helmet from 'helmet';
import { Logger } from 'nestjs-pino';
import { AppModule } from './app.module';
import { readBody } from './common/body';
import { ownOrigin } from './common/origin';
import type { Env } from './env';
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
  app.use(helmet(headers(env)));
  // A hall has poor signal: pages and answers go out compressed.
  app.use(compression());
  app.use('/api', keepPrivate, ownOrigin(env.PEGWELL_URL), cookieParser(), readBody);
  app.setGlobalPrefix('api', { exclude: [{ path: '/', method: RequestMethod.GET }] });
  serveOpenApi(app);
  servePages(app);
  app.enableShutdownHooks();
  return app;
}

/** Answers are for whoever asked and for now; a route that knows better says so itself. */
function keepPrivate(_request: Request, response: Response, next: NextFunction): void {
  response.set('Cache-Control', 'no-store');
  next();
}

/** Nothing loads from another host, and no script stands in a page. Emotion writes its styles into the page. */
function headers(env: Env) {
  const https = env.PEGWELL_URL.startsWith('https:');
  return {
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'data:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
      },
    },
    strictTransportSecurity: https ? { maxAge: 31_536_000 } : false,
    referrerPolicy: { policy: 'same-origin' as const },
    crossOriginEmbedderPolicy: false,
  };
}
