import type { Evening } from '@pegwell/shared/session/evening';
import { placesOf } from '@pegwell/shared/session/running-order';

/** Where two of a rhythm that should be kept apart follow each other, by the second's id. */
export function spacedPairs(evening: Evening): ReadonlySet<string> {
  return new Set(placesOf(evening).flatMap(({ tune, spacedPair }) => (spacedPair ? [tune.id] : [])));
}
