import { ASSUMED_BREAK_MINUTES, stopMinutes } from '@pegwell/shared/session/minutes';
import type { EveningEntry, StoredEvening, Walk } from '../sessions/evening';

/** When a tune was called, when the room was in tune, and when it was over. */
export interface DemoPlay {
  readonly entry: EveningEntry;
  readonly calledAt: Date;
  readonly playingAt: Date;
  readonly endedAt: Date;
}

/** Minutes that tunes of an easy evening take, one after the other and round again. */
const TUNE_MINUTES = [5.5, 4, 6, 5, 4.5, 7, 5];
/** People come in, and the first tune is called when the talk dies down. */
const LATE_MINUTES = 8;

/** A past as it could have been: every entry but the last, one after the other, with stops and a break. */
export function playedBefore(stored: StoredEvening, { room }: Walk): readonly DemoPlay[] {
  let minutes = LATE_MINUTES;
  const at = () => new Date(stored.session.startsAt.getTime() + Math.round(minutes * 60) * 1000);
  return stored.entries.slice(0, -1).flatMap((entry, index) => {
    const place = room.places[index];
    if (!place) return [];
    if (index > 0) minutes += place.offClock ? ASSUMED_BREAK_MINUTES : 0.5;
    const calledAt = at();
    minutes += stopMinutes(place);
    const playingAt = at();
    minutes += TUNE_MINUTES[index % TUNE_MINUTES.length] ?? 5;
    return [{ entry, calledAt, playingAt, endedAt: at() }];
  });
}
