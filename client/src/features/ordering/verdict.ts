import type { Goal } from '@pegwell/shared/session/evening';
import { tuningMinutes } from '@pegwell/shared/session/minutes';
import { difference } from '@pegwell/shared/session/score-words';
import { halfMinutes, listOf } from '../../lib/format';
import { moveOfKind } from '../../pictures/changing-kinds';
import type { Compared } from './compare';

/** What is better, and why, in two sentences; the second is empty where no kind turns less often. */
export function verdict(before: Compared, after: Compared, goal: Goal): readonly [what: string, why: string] {
  const saved = tuningMinutes(before.places) - tuningMinutes(after.places);
  const { words } = difference(after.score, before.score, goal);
  const what = `${words.charAt(0).toUpperCase()}${words.slice(1)}`;
  const minutes = saved > 0 ? `, about ${halfMinutes(saved)} less tuning` : '';

  const turns = ({ places }: Compared, kind: string): number =>
    places.filter((place) => (moveOfKind(place, kind)?.pegChanges ?? 0) > 0).length;
  const less = before.evening.chairs.flatMap(({ kind, count }) => {
    const [was, is] = [turns(before, kind.id), turns(after, kind.id)];
    if (is >= was) return [];
    const who = (count === 1 ? kind.name : kind.plural).toLowerCase();
    return [`the ${who} turn${count === 1 ? 's' : ''} pegs ${timesOf(is)} instead of ${was}`];
  });
  const why = less.length > 0 ? `Tunes in the same tuning follow each other: ${listOf(less)}.` : '';
  return [`${what}${minutes}.`, why];
}

const timesOf = (times: number): string =>
  times === 0 ? 'not at all' : times === 1 ? 'once' : `${times} times`;
