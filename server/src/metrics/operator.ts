import { createHash, timingSafeEqual } from 'node:crypto';
import type { Request } from 'express';

const LOOPBACK = /^(127\.|::1$|::ffff:127\.)/;
/** What a proxy on this machine adds: behind one, everybody comes from loopback. */
const FORWARDED = ['x-forwarded-for', 'x-forwarded-host', 'x-real-ip', 'forwarded', 'via'];

/**
 * Whether a request comes from whoever runs the server: with the token, where one is set; else from this very
 * machine, and through no proxy.
 */
export function isOperator(request: Request, token: string | undefined): boolean {
  if (token !== undefined) {
    const given = /^Bearer (.+)$/.exec(request.headers.authorization ?? '')?.[1];
    return given !== undefined && timingSafeEqual(digest(given), digest(token));
  }
  return (
    LOOPBACK.test(request.socket.remoteAddress ?? '') &&
    FORWARDED.every((header) => request.headers[header] === undefined)
  );
}

function digest(text: string): Buffer {
  return createHash('sha256').update(text).digest();
}
