import type { Place } from './evening';

/** Minutes a tune is played until the circle's record says otherwise; shown as assumed. Common practice. */
export const ASSUMED_TUNE_MINUTES = 5;
/** Minutes of a break between two sets, shown as assumed. */
export const ASSUMED_BREAK_MINUTES = 15;

/**
 * Minutes a stop takes: one, and half a minute for each peg of the busiest player. No figure is
 * published; an assumption until a circle's own evenings say better.
 * @returns 0 where nobody turns a peg
 * @example a stop where the fiddles turn two pegs and the banjos one: 2
 */
export function stopMinutes(place: Place): number {
  const busiest = Math.max(0, ...place.kinds.map((move) => move.pegChanges));
  return busiest === 0 ? 0 : 1 + busiest / 2;
}

/** Minutes of tuning on the clock. */
export function tuningMinutes(places: readonly Place[]): number {
  return places.reduce((sum, place) => sum + (place.offClock ? 0 : stopMinutes(place)), 0);
}

/** Minutes from the first tune to the last: tunes, stops on the clock, and a break between two sets. */
export function eveningMinutes(
  sets: readonly (readonly { readonly minutes: number }[])[],
  places: readonly Place[],
): number {
  const played = sets.filter((set) => set.length > 0);
  const tunes = played.flat().reduce((sum, entry) => sum + entry.minutes, 0);
  return tunes + tuningMinutes(places) + Math.max(0, played.length - 1) * ASSUMED_BREAK_MINUTES;
}
