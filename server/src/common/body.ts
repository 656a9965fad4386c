import type { NextFunction, Request, Response } from 'express';
import { json } from 'express';
import { bodyShapeError } from './body-shape';
import { ProblemException } from './problem';

/** Bytes of a JSON body; a board of 300 entries is under 100 kB. */
const JSON_LIMIT = 1_000_000;

declare module 'express-serve-static-core' {
  interface Request {
    /** What was wrong with the body: thrown by the access guard, once it is known who asks. */
    bodyProblem?: ProblemException;
  }
}

const parse = json({ limit: JSON_LIMIT, strict: false });

/**
 * Reads JSON bodies, but tells what is wrong with them only after sign-in was checked: somebody who
 * is not signed in hears that, and nothing about what they sent.
 */
export function readBody(request: Request, response: Response, next: NextFunction): void {
  const type = request.headers['content-type']?.split(';')[0]?.trim().toLowerCase();
  const hasBody =
    Number(request.headers['content-length'] ?? 0) > 0 || 'transfer-encoding' in request.headers;
  if (!hasBody || type === 'multipart/form-data') {
    next();
    return;
  }
  if (type !== 'application/json' && !type?.endsWith('+json')) {
    request.bodyProblem = new ProblemException('wrong-media-type', 'Bodies here are application/json.');
    next();
    return;
  }
  // RFC 8259, section 8.1: nothing else than UTF-8.
  const charset = /;\s*charset\s*=\s*"?([^";\s]*)/i.exec(request.headers['content-type'] ?? '')?.[1];
  if (charset !== undefined && !/^utf-?8$/i.test(charset)) {
    request.bodyProblem = new ProblemException('wrong-media-type', 'JSON here is UTF-8.');
    next();
    return;
  }
  parse(request, response, (error: unknown) => {
    const shape = error === undefined ? bodyShapeError(request.body) : null;
    if (shape) request.bodyProblem = new ProblemException('not-valid', shape.message, { errors: [shape] });
    if (error !== undefined) request.bodyProblem = bodyProblem(error);
    next();
  });
}

function bodyProblem(error: unknown): ProblemException {
  const kind = (error as { type?: string }).type;
  if (kind === 'entity.too.large')
    return new ProblemException('too-large', 'This is more than a megabyte of JSON.');
  if (kind === 'charset.unsupported' || kind === 'encoding.unsupported') {
    return new ProblemException('wrong-media-type', 'JSON here is UTF-8.');
  }
  return new ProblemException('not-json');
}
