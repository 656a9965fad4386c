import { standardPitches } from '../shared/src/music/instrument';
import { retune } from '../shared/src/music/retune';
import type { Evening, EveningTune } from '../shared/src/session/evening';

/**
 * Orders as a host makes them without help, for an evening without rules. Tunes that are alike to a habit stay
 * as they were listed.
 */
export const BY_HAND: readonly { readonly name: string; readonly order: (evening: Evening) => string[] }[] = [
  { name: 'as listed', order: ({ sets }) => sets.flat() },
  { name: 'by key', order: (evening) => sortedBy(evening, ({ tonic }) => `${tonic}`.padStart(2)) },
  { name: 'by tuning', order: (evening) => sortedBy(evening, (tune) => firstTunings(evening, tune)) },
  { name: 'nearest tuning next', order: nearestNext },
];

function sortedBy(evening: Evening, by: (tune: EveningTune) => string): string[] {
  const tunes = inOrder(evening).map((tune) => ({ id: tune.id, key: by(tune) }));
  return tunes.sort((a, b) => (a.key < b.key ? -1 : a.key > b.key ? 1 : 0)).map(({ id }) => id);
}

/** First choices, fiddle first: nothing is known of a kind that is silent. */
function firstTunings({ chairs }: Evening, { accepted }: EveningTune): string {
  return chairs.map(({ kind }) => chosen(accepted[kind.id])[0]?.join(' ') ?? '').join('; ');
}

/** From where everyone stands always the tune for which fewest pegs turn now. */
function nearestNext(evening: Evening): string[] {
  const { chairs, openings } = evening;
  let stands = chairs.map(({ kind }) => openings[kind.id]?.pitches ?? standardPitches(kind));
  const left = inOrder(evening);
  const order: string[] = [];
  while (left.length > 0) {
    const ways = left.map((tune) => chairs.map((chair, k) => nearest(chair, stands[k]!, tune)));
    const pegs = ways.map((way) => way.reduce((sum, kind) => sum + kind.pegs, 0));
    const next = pegs.indexOf(Math.min(...pegs));
    order.push(left.splice(next, 1)[0]!.id);
    stands = ways[next]!.map(({ pitches }) => pitches);
  }
  return order;
}

function nearest(
  { kind, count }: Evening['chairs'][number],
  from: readonly string[],
  { accepted }: EveningTune,
): { pitches: readonly string[]; pegs: number } {
  let best: { pitches: readonly string[]; pegs: number } | null = null;
  for (const pitches of chosen(accepted[kind.id])) {
    const pegs = count * retune(kind, from, pitches).pegChanges;
    if (best === null || pegs < best.pegs) best = { pitches, pegs };
  }
  return best ?? { pitches: from, pegs: 0 };
}

const chosen = (list: EveningTune['accepted'][string] | undefined): (readonly string[])[] =>
  list === undefined || list === 'any' ? [] : list.map(({ pitches }) => pitches);

const inOrder = ({ sets, tunes }: Evening): EveningTune[] =>
  sets.flat().map((id) => tunes.find((tune) => tune.id === id)!);
