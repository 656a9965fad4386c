import { randomUUID } from 'node:crypto';
import { Catch, HttpException, Logger, type ArgumentsHost, type ExceptionFilter } from '@nestjs/common';
import type { Response } from 'express';
import type { ProblemCode } from '@pegwell/shared/contract/errors';
import { ProblemException } from './problem';
import { TooManyException } from './too-many';

/** What Nest and Express throw of their own, in our list of codes. */
const codeOfStatus: Partial<Record<number, ProblemCode>> = {
  400: 'not-valid',
  401: 'not-signed-in',
  403: 'not-allowed',
  404: 'not-found',
  413: 'too-large',
  415: 'wrong-media-type',
  429: 'too-many',
};

/** PostgreSQL's and Node's ways of saying that the database cannot be reached. */
const AWAY = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'ENOTFOUND',
  'ETIMEDOUT',
  '57P01',
  '57P02',
  '57P03',
  '08006',
  '08001',
]);
const AWAY_WORDS = /timeout exceeded when trying to connect|Connection terminated/;

/** Turns anything thrown into a problem document; what nobody expected becomes a plain 500, found in the log. */
@Catch()
export class ProblemFilter implements ExceptionFilter {
  private readonly logger = new Logger('Problem');

  catch(thrown: unknown, host: ArgumentsHost): void {
    const response = host.switchToHttp().getResponse<Response>();
    // The answer is on its way (a stream broke): nothing sensible can be added to it.
    if (response.headersSent) {
      response.destroy();
      return;
    }
    // Whoever asked has gone, and the work was called off for that: there is nobody to tell, and no fault.
    if (response.closed && isAbort(thrown)) return;
    const problem = toProblem(thrown);
    if (problem.code === 'internal') {
      const instance = `urn:uuid:${randomUUID()}`;
      this.logger.error({ instance, err: thrown });
      send(response, { ...problem.problem, instance });
      return;
    }
    if (problem instanceof TooManyException) response.set('Retry-After', String(problem.retryAfter));
    send(response, problem.problem);
  }
}

function send(response: Response, body: ProblemException['problem']): void {
  response.status(body.status).type('application/problem+json').send(JSON.stringify(body));
}

function toProblem(thrown: unknown): ProblemException {
  if (thrown instanceof ProblemException) return thrown;
  if (isAway(thrown)) return new ProblemException('unavailable');
  if (thrown instanceof HttpException) {
    const code = codeOfStatus[thrown.getStatus()];
    if (code === 'not-found')
      return new ProblemException(code, 'There is nothing here, or it is not yours to see.');
    if (code) return new ProblemException(code, thrown.message);
  }
  return new ProblemException(
    'internal',
    'Something went wrong on our side. Nothing that was saved is lost.',
  );
}

/** What an AbortSignal throws: a DOMException, which is not an Error of every realm. */
function isAbort(thrown: unknown): boolean {
  return typeof thrown === 'object' && thrown !== null && 'name' in thrown && thrown.name === 'AbortError';
}

function isAway(thrown: unknown): boolean {
  for (let error = thrown, depth = 0; error instanceof Error && depth < 5; error = error.cause, depth++) {
    const code = (error as { code?: unknown }).code;
    if (typeof code === 'string' && AWAY.has(code)) return true;
    if (AWAY_WORDS.test(error.message)) return true;
  }
  return false;
}
