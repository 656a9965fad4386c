import { turns, capoWords } from '@pegwell/shared/music/words';
import type { Chair, KindMove, Place } from '@pegwell/shared/session/evening';
import type { LanesSet } from './lanes-layout';

const plural = (number: number, word: string) => `${number} ${word}${number === 1 ? '' : 's'}`;

/** `5 fiddles`, `Banjo` for one. */
export function groupName({ kind, count }: Chair): string {
  return count > 1 ? `${count} ${kind.plural.toLowerCase()}` : kind.name;
}

function moveSentence(chair: Chair, move: KindMove): string {
  if (!move.from || !move.to) return '';
  const spoken = turns(chair.kind, move.from.pitches, move.to.pitches).map((turn) => turn.spoken);
  const capo = capoWords(move.from.capo, move.to.capo);
  const what = [...spoken, ...(capo ? [capo] : [])];
  if (what.length === 0) return '';
  return `${groupName(chair)}: ${what.join('; ')}.`;
}

/**
 * The lanes for somebody who does not see them: a sentence per place where anything is turned or a capo
 * moves, in playing order.
 */
export function lanesSentences(
  chairs: readonly Chair[],
  sets: readonly LanesSet[],
  places: readonly Place[],
): readonly string[] {
  const tunes = sets.flatMap((set) => set.entries);
  return places.flatMap((place) => {
    const moves = chairs.flatMap((chair) => {
      const move = place.kinds.find(({ kind }) => kind === chair.kind.id);
      return move ? [moveSentence(chair, move)].filter(Boolean) : [];
    });
    if (moves.length === 0) return [];
    const number = tunes.findIndex(({ id }) => id === place.before) + 1;
    const where = `Before ${number}, ${tunes[number - 1]?.title ?? 'the next tune'}`;
    const price = place.pegChanges
      ? ` ${plural(place.pegChanges, 'peg change')}${place.offClock ? ', off the clock' : ''}.`
      : '';
    return [`${where}: ${moves.join(' ')}${price}`];
  });
}

/** One line over the whole picture. */
export function lanesSummary(places: readonly Place[]): string {
  const pegs = places.reduce((sum, place) => sum + place.pegChanges, 0);
  const stops = places.filter((place) => !place.offClock && place.pegChanges > 0).length;
  if (pegs === 0) return `${plural(places.length, 'tune')}, nothing to turn.`;
  return `${plural(places.length, 'tune')}, ${plural(pegs, 'peg change')}, ${plural(stops, 'stop')}.`;
}
