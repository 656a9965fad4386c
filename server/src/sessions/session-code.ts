import { randomInt } from 'node:crypto';

/** Digits and capitals of which no two are mistaken for each other: no 0 and O, no 1, I and L. */
export const CODE_LETTERS = '23456789ABCDEFGHJKMNPQRSTUVWXYZ';
export const CODE_LENGTH = 8;

/** 31 to the 8th is 8.5e11: with a thousand evenings under way, one try in a billion hits one. */
export function makeCode(): string {
  return Array.from({ length: CODE_LENGTH }, () => CODE_LETTERS[randomInt(CODE_LETTERS.length)]).join('');
}

/** As typed by a person: any case, with spaces or hyphens. */
export function normalCode(typed: string): string {
  return typed.toUpperCase().replace(/[\s-]/g, '');
}

const HOUR_MS = 3_600_000;
/** A code stops working this long after the end of the evening. */
const AFTER_END_MS = 24 * HOUR_MS;
/** No evening takes longer; one that nobody finished is taken to have ended then. */
const LONGEST_EVENING_MS = 12 * HOUR_MS;

/**
 * When the code stops working, in milliseconds since 1970. An evening without a recorded end is counted from the
 * latest of its start, the giving of the code, and the last step of the console: one that is planned in
 * hindsight, or runs long, is not shut in the middle.
 */
export function codeEnds(
  session: { readonly finishedAt: Date | null; readonly startsAt: Date; readonly codeGivenAt: Date },
  lastStepAt: Date | null,
): number {
  if (session.finishedAt) return session.finishedAt.getTime() + AFTER_END_MS;
  const { startsAt, codeGivenAt } = session;
  const latest = Math.max(startsAt.getTime(), codeGivenAt.getTime(), lastStepAt?.getTime() ?? 0);
  return latest + LONGEST_EVENING_MS + AFTER_END_MS;
}
