import type { Response } from 'express';

/** Days until a sign-in that is not used ends. */
export const SIGN_IN_DAYS = 30;

/** `__Host-` binds the cookie to this host over HTTPS; a browser refuses that name without it. */
export function cookieName(siteUrl: string): string {
  return siteUrl.startsWith('https:') ? '__Host-pegwell' : 'pegwell';
}

export function setSignInCookie(response: Response, siteUrl: string, token: string): void {
  response.cookie(cookieName(siteUrl), token, { ...options(siteUrl), maxAge: SIGN_IN_DAYS * 86_400_000 });
}

export function clearSignInCookie(response: Response, siteUrl: string): void {
  response.clearCookie(cookieName(siteUrl), options(siteUrl));
}

function options(siteUrl: string) {
  return { httpOnly: true, sameSite: 'lax', secure: siteUrl.startsWith('https:'), path: '/' } as const;
}
