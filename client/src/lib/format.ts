/*
 * Figures and dates as people say them. Dates are read in the circle's time zone, never the reader's:
 * an evening at 19:30 in the hall is at 19:30 on every phone.
 */

/** Whole minutes as a length: 112 is "1 h 52", 60 "1 h", 45 "45 min". */
export function lengthOf(minutes: number): string {
  const whole = Math.round(minutes);
  const hours = Math.floor(whole / 60);
  const rest = whole % 60;
  if (hours === 0) return `${rest} min`;
  return rest === 0 ? `${hours} h` : `${hours} h ${String(rest).padStart(2, '0')}`;
}

/** Minutes to the half, for short waits: 9.5 is "9½", 0.5 "½", 3 "3". */
export function halves(minutes: number): string {
  const doubled = Math.round(minutes * 2);
  const whole = Math.floor(doubled / 2);
  const half = doubled % 2 === 1 ? '½' : '';
  return whole === 0 && half ? half : `${whole}${half}`;
}

/** "9½ min" */
export const halfMinutes = (minutes: number): string => `${halves(minutes)} min`;

/** `1 peg`, `5 pegs`; the plural is given where it is not an s. */
export function count(number: number, one: string, many = `${one}s`): string {
  return `${number} ${number === 1 ? one : many}`;
}

/** "a, b and c" */
export function listOf(words: readonly string[]): string {
  if (words.length < 2) return words.join('');
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}

type When = Date | string | number;

function write(when: When, timeZone: string, options: Intl.DateTimeFormatOptions): string {
  return new Intl.DateTimeFormat('en-GB', { timeZone, ...options }).format(new Date(when));
}

/** "Thursday 14 January", with the year where it is not this one (of `now`). */
export function dayOf(when: When, timeZone: string, now: When = Date.now()): string {
  const year = (at: When) => write(at, timeZone, { year: 'numeric' });
  const day = write(when, timeZone, { weekday: 'long', day: 'numeric', month: 'long' }).replace(',', '');
  return year(when) === year(now) ? day : `${day} ${year(when)}`;
}

/** "14 Jan 2027" */
export const shortDayOf = (when: When, timeZone: string): string =>
  write(when, timeZone, { day: 'numeric', month: 'short', year: 'numeric' });

/** "19:30" */
export const timeOf = (when: When, timeZone: string): string =>
  write(when, timeZone, { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' });

/** "Thursday 14 January, 19:30" */
export const momentOf = (when: When, timeZone: string, now: When = Date.now()): string =>
  `${dayOf(when, timeZone, now)}, ${timeOf(when, timeZone)}`;

/** The reader's own IANA zone. */
export const ownTimeZone = (): string => Intl.DateTimeFormat().resolvedOptions().timeZone || 'UTC';

/** Every zone this browser knows, the reader's own among them. */
export function timeZones(): readonly string[] {
  const known = Intl.supportedValuesOf('timeZone');
  return [...new Set([...known, ownTimeZone(), 'UTC'])].sort();
}

/** A file's size for people: "830 bytes", "42 kB", "10.5 MB". */
export function bytesOf(bytes: number): string {
  if (bytes < 1000) return count(bytes, 'byte');
  if (bytes < 1_000_000) return `${Math.round(bytes / 1000)} kB`;
  return `${(bytes / 1_000_000).toFixed(1)} MB`;
}

/** "2,043" */
export const grouped = (number: number): string => number.toLocaleString('en-GB');
