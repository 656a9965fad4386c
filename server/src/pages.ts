import { existsSync } from 'node:fs';
import { join } from 'node:path';
import type { NestExpressApplication } from '@nestjs/platform-express';
import express, { type NextFunction, type Request, type Response } from 'express';

/** The built pages, beside the server in a checkout and in a release. */
const PAGES = join(__dirname, '../../client/dist');

/**
 * Serves the built pages, when there are any, from the same process as the API: files with a hash in
 * their name for a year, everything else afresh, and every address that is no file as the application.
 */
export function servePages(app: NestExpressApplication): void {
  const index = join(PAGES, 'index.html');
  if (!existsSync(index)) return;
  app.use(
    '/assets',
    express.static(join(PAGES, 'assets'), { immutable: true, redirect: false, maxAge: '365d' }),
    notThere,
  );
  // A folder's address is no file either: nothing here sends anybody on to another address.
  const files = express.static(PAGES, { index: false, redirect: false, maxAge: 0 });
  app.use((request: Request, response: Response, next: NextFunction) => {
    // The API is never a file: phones that poll do not make the disk look for one.
    if (isApi(request)) next();
    else files(request, response, next);
  });
  app.use((request: Request, response: Response, next: NextFunction) => {
    if ((request.method !== 'GET' && request.method !== 'HEAD') || isApi(request)) return next();
    response.set('Cache-Control', 'no-cache').sendFile(index);
  });
}

const isApi = ({ path }: Request): boolean => path === '/api' || path.startsWith('/api/');

/** A file of an older build: the browser should ask for the page again, not be given it as a script. */
function notThere(_request: Request, response: Response): void {
  response.status(404).type('text/plain').send('Not here.');
}
