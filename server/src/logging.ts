import { randomUUID } from 'node:crypto';
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { Params } from 'nestjs-pino';
import type { Env } from './env';

/** One line a request with an id; never a cookie, a password, or a query (codes and addresses stand there). */
export function logging(env: Env): Params {
  return {
    pinoHttp: {
      level: env.PEGWELL_LOG,
      // Made here, never taken from the request: whoever asks could write what they like into the log.
      genReqId: (_request: IncomingMessage, response: ServerResponse) => {
        const id = randomUUID();
        response.setHeader('X-Request-Id', id);
        return id;
      },
      autoLogging: true,
      serializers: {
        req: (request: IncomingMessage & { id: string }) => ({
          id: request.id,
          method: request.method,
          path: pathWithoutCode(request.url ?? ''),
        }),
        res: (response: { statusCode: number }) => ({ status: response.statusCode }),
        err: (error: Error & { readonly raw?: Error }) => errorWithoutValues(error),
      },
    },
  };
}

function pathWithoutCode(url: string): string {
  return (url.split('?')[0] ?? '').replace(/^(\/api\/follow|\/f)\/[^/]+/, '$1/…');
}

interface LoggedError {
  readonly type: string;
  readonly message: string;
  readonly code?: string;
  readonly stack: string;
  readonly cause?: LoggedError;
}

/** Errors can have causes that have causes; a ring of them ends here. */
const MOST_CAUSES = 5;

/**
 * An error as it may stand in a log. A failed query tells its values in its message, addresses, digests of
 * passwords and the text of mails among them: of it only the statement is kept, and of any error where it came from.
 */
export function errorWithoutValues(
  given: Partial<Error> & { readonly raw?: Error },
  depth = 0,
): LoggedError | undefined {
  const error = given.raw ?? given;
  if (typeof error !== 'object') return undefined;
  const { code, query } = error as { code?: unknown; query?: unknown };
  const frames = (error.stack ?? '').split('\n').filter((line) => line.startsWith('    at '));
  const cause = error.cause as Error | undefined;
  return {
    type: error.name ?? 'Error',
    message: typeof query === 'string' ? `Failed query: ${query}` : (error.message ?? ''),
    ...(typeof code === 'string' && { code }),
    stack: frames.join('\n'),
    ...(cause && depth < MOST_CAUSES && { cause: errorWithoutValues(cause, depth + 1) }),
  };
}
