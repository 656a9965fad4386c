import { randomUUID } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import type { Params } from 'nestjs-pino';
import type { Env } from './env';

/** One line a request with an id; never a cookie, a password, or a query (codes and addresses stand there). */
export function logging(env: Env): Params {
  return {
    pinoHttp: {
      level: env.PEGWELL_LOG,
      genReqId: () => randomUUID(),
      autoLogging: true,
      serializers: {
        req: (request: IncomingMessage & { id: string }) => ({
          id: request.id,
          method: request.method,
          path: pathWithoutCode(request.url ?? ''),
        }),
        res: (response: { statusCode: number }) => ({ status: response.statusCode }),
      },
    },
  };
}

function pathWithoutCode(url: string): string {
  return (url.split('?')[0] ?? '').replace(/^(\/api\/follow|\/f)\/[^/]+/, '$1/…');
}
