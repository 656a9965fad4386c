import type { FollowAnswer } from './api/follow';

/** The last answer for a kind, kept on the device through a lost signal and a closed page. */
export interface Kept extends FollowAnswer {
  /** Milliseconds since 1970, by this device's clock. */
  readonly heardAt: number;
}

const PREFIX = 'pegwell-follow';
const keyOf = (code: string, kind: string) => `${PREFIX} ${code} ${kind}`;

/** As the server reads it: capitals, without spaces and hyphens. */
export const normalCode = (typed: string): string => typed.toUpperCase().replace(/[\s-]/g, '');

export function readKept(code: string, kind: string): Kept | null {
  try {
    const text = localStorage.getItem(keyOf(code, kind));
    return text === null ? null : (JSON.parse(text) as Kept);
  } catch {
    // Closed storage, or something else under that name: then nothing is kept.
    return null;
  }
}

/** Keeps it, and forgets other evenings: a phone follows one at a time. */
export function keep(code: string, kind: string, kept: Kept): void {
  try {
    for (const key of Object.keys(localStorage)) {
      if (key.startsWith(`${PREFIX} `) && !key.startsWith(`${PREFIX} ${code} `)) localStorage.removeItem(key);
    }
    localStorage.setItem(keyOf(code, kind), JSON.stringify(kept));
  } catch {
    // Full or closed: the page still shows what it heard.
  }
}
