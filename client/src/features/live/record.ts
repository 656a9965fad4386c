import type { CirclePlay } from '@pegwell/shared/contract/live';

/** One evening of the record, its tunes in the order of playing. */
export interface PlayedEvening {
  readonly sessionId: string;
  readonly title: string;
  readonly startsAt: string;
  readonly timeZone: string;
  readonly plays: readonly CirclePlay[];
}

/** Plays that come newest first, evening by evening. */
export function byEvening(plays: readonly CirclePlay[]): readonly PlayedEvening[] {
  const evenings = new Map<string, CirclePlay[]>();
  for (const play of plays) evenings.set(play.sessionId, [play, ...(evenings.get(play.sessionId) ?? [])]);
  return [...evenings].flatMap(([sessionId, list]) => {
    const [first] = list;
    return first ? [{ sessionId, ...first.session, plays: list }] : [];
  });
}

/** ms the room took to be in tune; null where nothing was turned, or nobody said when it was. */
export function stopOf({ calledAt, playingAt }: CirclePlay): number | null {
  if (playingAt === null || playingAt === calledAt) return null;
  return Date.parse(playingAt) - Date.parse(calledAt);
}

/** ms a tune was played; null while it is, and where nobody said when it began. */
export function playedFor({ playingAt, endedAt }: CirclePlay): number | null {
  return playingAt === null || endedAt === null ? null : Date.parse(endedAt) - Date.parse(playingAt);
}

export interface Stops {
  readonly count: number;
  /** ms, over the stops whose end was said; null where there is none. */
  readonly average: number | null;
}

/** How often the room stopped to tune, and how long that took. */
export function stopsOf(plays: readonly CirclePlay[]): Stops {
  const lengths = plays.flatMap((play) => stopOf(play) ?? []);
  const unsaid = plays.filter(({ playingAt }) => playingAt === null).length;
  const sum = lengths.reduce((all, length) => all + length, 0);
  return { count: lengths.length + unsaid, average: lengths.length === 0 ? null : sum / lengths.length };
}

/** `40 s`, `2 min`, `2½ min`: as precise as it was measured with a thumb. */
export function shortLength(ms: number): string {
  const seconds = Math.round(ms / 1_000);
  if (seconds < 60) return `${seconds} s`;
  const halves = Math.round(seconds / 30);
  return `${Math.floor(halves / 2)}${halves % 2 === 1 ? '½' : ''} min`;
}
