import type { NextFunction, Request, RequestHandler, Response } from 'express';
import helmet from 'helmet';
import type { Env } from '../env';

/** What no page here asks a browser for. The microphone is the tuner's. */
const WITHHELD = 'camera=(), geolocation=(), payment=(), usb=(), microphone=(self)';

/** Headers of pages and their files; answers of the API have their own few. */
export function pageHeaders(env: Env): RequestHandler {
  const protect = helmet(pageRules(env));
  return (request, response, next) => {
    if (request.path === '/api' || request.path.startsWith('/api/')) return next();
    response.set('Permissions-Policy', WITHHELD);
    protect(request, response, next);
  };
}

/**
 * Answers are for whoever asked and for now (a route that knows better says so itself), and what they say they
 * are. No more: a phone asks every two seconds, and what is no page needs no rules for pages.
 */
export function answerHeaders(_request: Request, response: Response, next: NextFunction): void {
  response.set({ 'Cache-Control': 'no-store', 'X-Content-Type-Options': 'nosniff' });
  next();
}

/** Nothing loads from another host, and no script stands in a page. Emotion writes its styles into the page. */
function pageRules(env: Env) {
  const https = env.PEGWELL_URL.startsWith('https:');
  return {
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
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
    xFrameOptions: { action: 'deny' as const },
    strictTransportSecurity: https ? { maxAge: 31_536_000 } : false,
    referrerPolicy: { policy: 'same-origin' as const },
    crossOriginEmbedderPolicy: false,
  };
}
