import type { Evening, EveningTune } from './evening';

/** The place before a tune, as far as the order alone decides it: no tuning has been chosen yet. */
export interface OrderPlace {
  readonly tune: EveningTune;
  /** Before the first tune, or in the break between two sets. */
  readonly offClock: boolean;
  /** The tunes on both sides follow each other in a medley (a break may cut them apart). */
  readonly inMedley: boolean;
  /** Neighbours inside a set that are both of a spaced rhythm. */
  readonly spacedPair: boolean;
  /** Neighbours inside a set, not inside a medley, with another tonic. */
  readonly keyChange: boolean;
}

/**
 * The places of an evening in playing order, one per tune. Empty sets count as none.
 * @throws RangeError where `sets` names an id that no tune has (a programmer's error).
 */
export function placesOf(evening: Evening): readonly OrderPlace[] {
  const tunes = new Map(evening.tunes.map((tune) => [tune.id, tune]));
  const placeOf = placing(evening);
  const places: OrderPlace[] = [];
  let before: EveningTune | null = null;
  for (const set of evening.sets) {
    for (const [index, id] of set.entries()) {
      const tune = tunes.get(id);
      if (tune === undefined) throw new RangeError(`No tune has the id ${id}`);
      places.push(placeOf(before, tune, index === 0));
      before = tune;
    }
  }
  return places;
}

/** Reckons the place between two tunes; the first tune of an evening has none before it. */
export function placing({
  medleys,
  spacedRhythms,
}: Pick<Evening, 'medleys' | 'spacedRhythms'>): (
  before: EveningTune | null,
  tune: EveningTune,
  offClock: boolean,
) => OrderPlace {
  const follows = medleyFollowers(medleys);
  const isSpaced = spacedIn(spacedRhythms);
  return (before, tune, offClock) => {
    const inMedley = before !== null && (follows.get(before.id)?.has(tune.id) ?? false);
    return {
      tune,
      offClock,
      inMedley,
      spacedPair: !offClock && before !== null && isSpaced(before) && isSpaced(tune),
      keyChange: !offClock && !inMedley && before !== null && before.tonic !== tune.tonic,
    };
  };
}

/** Whether a tune's rhythm is one of those to keep apart; compared without case. */
export function spacedIn(rhythms: readonly string[]): (tune: EveningTune) => boolean {
  const spaced = new Set(rhythms.map((rhythm) => rhythm.trim().toLowerCase()));
  const known = new Map<string, boolean>();
  return ({ rhythm }) => {
    if (rhythm === null) return false;
    let isSpaced = known.get(rhythm);
    if (isSpaced === undefined) known.set(rhythm, (isSpaced = spaced.has(rhythm.trim().toLowerCase())));
    return isSpaced;
  };
}

function medleyFollowers(medleys: Evening['medleys']): ReadonlyMap<string, ReadonlySet<string>> {
  const follows = new Map<string, Set<string>>();
  for (const medley of medleys) {
    medley.forEach((id, index) => {
      const next = medley[index + 1];
      if (next === undefined) return;
      const known = follows.get(id);
      if (known) known.add(next);
      else follows.set(id, new Set([next]));
    });
  }
  return follows;
}
