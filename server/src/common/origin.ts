import type { NextFunction, Request, Response } from 'express';
import { ProblemException } from './problem';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * A changing request whose Origin is another site's, or `null`, is refused; without an Origin it is a
 * program. The site's own address is PEGWELL_URL, never the Host header.
 */
export function ownOrigin(siteUrl: string) {
  const own = new URL(siteUrl).origin;
  return (request: Request, _response: Response, next: NextFunction): void => {
    const origin = request.headers.origin;
    if (SAFE.has(request.method) || origin === undefined || origin === own) {
      next();
      return;
    }
    next(new ProblemException('wrong-origin', `This page was not opened at ${own}, where Pegwell lives.`));
  };
}
