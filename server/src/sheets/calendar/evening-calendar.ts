import { scoreEvening } from '@pegwell/shared/session/score';
import { eveningMinutes } from '@pegwell/shared/session/minutes';
import { scoredEvening, type StoredEvening } from '../../sessions/evening';
import { contentLines, instant, text, type Property } from './content-lines';

/** An evening with little on it yet is still an evening. */
const SHORTEST_MINUTES = 60;
/** The length is an estimate; calendars look better in whole fives. */
const ROUNDED_TO_MINUTES = 5;

/**
 * A calendar file with one event (RFC 5545, sections 3.4, 3.6 and 3.6.1), in UTC, so that it needs no table of
 * time zones. It is the same event however often it is fetched: its UID stays, its SEQUENCE counts revisions.
 * @param siteUrl without a slash at its end
 * @param now when the file is made
 */
export function eveningCalendar(stored: StoredEvening, siteUrl: string, now: Date): string {
  const { session } = stored;
  const follow = `${siteUrl}/f/${session.code}`;
  const description = [session.notes, `Follow along: ${follow}`].filter(Boolean).join('\n\n');
  const properties: readonly Property[] = [
    { name: 'BEGIN', value: 'VCALENDAR' },
    { name: 'VERSION', value: '2.0' },
    { name: 'PRODID', value: '-//Pegwell//Pegwell//EN' },
    { name: 'BEGIN', value: 'VEVENT' },
    text('UID', session.id),
    instant('DTSTAMP', now),
    { name: 'SEQUENCE', value: String(session.calendarSequence) },
    instant('DTSTART', session.startsAt),
    instant('DTEND', endOf(stored)),
    text('SUMMARY', session.title),
    ...(session.place ? [text('LOCATION', session.place)] : []),
    text('DESCRIPTION', description),
    { name: 'URL', value: follow },
    { name: 'END', value: 'VEVENT' },
    { name: 'END', value: 'VCALENDAR' },
  ];
  return contentLines(properties);
}

/** By the whole plan, also while the evening is under way. */
function endOf(stored: StoredEvening): Date {
  const planned = { ...stored, session: { ...stored.session, status: 'planned' as const, progress: null } };
  const { places } = scoreEvening(scoredEvening(planned));
  const minutes = eveningMinutes(
    stored.sets.map(({ entries }) => entries),
    places,
  );
  const rounded = Math.ceil(minutes / ROUNDED_TO_MINUTES) * ROUNDED_TO_MINUTES;
  return new Date(stored.session.startsAt.getTime() + Math.max(SHORTEST_MINUTES, rounded) * 60_000);
}
