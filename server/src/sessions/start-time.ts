import { DateTime } from 'luxon';

export interface StartTime {
  /** `2027-01-14T19:30`, in the zone. */
  readonly localStart: string;
  readonly startsAt: Date;
}

/**
 * When an evening begins: `text` has an offset, or is local time in `timeZone` (IANA). A local time that
 * does not exist (clocks go forward) is moved on by the gap; one that exists twice is the first.
 * @returns null for a date that is none, as 30 February
 */
export function startTime(text: string, timeZone: string): StartTime | null {
  const time = DateTime.fromISO(text, { zone: timeZone, setZone: false });
  if (!time.isValid) return null;
  return { localStart: time.toFormat("yyyy-MM-dd'T'HH:mm"), startsAt: time.toJSDate() };
}
