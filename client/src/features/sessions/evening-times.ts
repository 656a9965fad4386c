import type { SessionSummary } from '@pegwell/shared/contract/sessions';

/** How long after its start an evening that nobody finished still counts as coming: 12 hours, in ms. */
const STILL_TONIGHT = 12 * 60 * 60 * 1000;

interface EveningsInTime {
  /** The next one first; what is live stands before all others. */
  readonly coming: readonly SessionSummary[];
  /** The last one first. */
  readonly past: readonly SessionSummary[];
}

/** @param now milliseconds since 1970 */
export function inTime(evenings: readonly SessionSummary[], now: number): EveningsInTime {
  const isComing = ({ status, startsAt }: SessionSummary) =>
    status === 'live' || (status === 'planned' && Date.parse(startsAt) + STILL_TONIGHT > now);
  const live = (evening: SessionSummary) => (evening.status === 'live' ? 0 : 1);
  return {
    coming: evenings
      .filter(isComing)
      .sort((a, b) => live(a) - live(b) || Date.parse(a.startsAt) - Date.parse(b.startsAt)),
    past: evenings
      .filter((evening) => !isComing(evening))
      .sort((a, b) => Date.parse(b.startsAt) - Date.parse(a.startsAt)),
  };
}
