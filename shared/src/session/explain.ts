import { showTuned } from '../music/tuning';
import { capoWords, retuneWords } from '../music/words';
import type { Chair, Evening, KindMove, Place, Scored } from './evening';
import type { Level } from './levels';
import { stopMinutes } from './minutes';
import { placesOf, type OrderPlace } from './running-order';

/** What a place adds to one level of the score, and why. */
export interface Reason {
  readonly level: Level;
  /** Over all places they add up to the score; 0 for pegs that cost no stop. */
  readonly count: number;
  /** A sentence. */
  readonly words: string;
}

export interface ExplainedPlace extends Pick<Place, 'before' | 'offClock' | 'pegChanges'> {
  /** In the order of the levels; empty where nothing happens. */
  readonly reasons: readonly Reason[];
}

/** How a tune is called: an open place by its key. */
export interface Called {
  readonly title: string;
  /** `A`, `Bb`: as it is spelled. */
  readonly key: string;
}

/**
 * Every place of an order, level by level: who turns what, why it counts as a stop, which neighbours should
 * not be, who plays in what they would rather not, which capo moves, where the key changes.
 *
 * @param scored the evening's own score
 * @param called by tune id
 */
export function explain(
  evening: Evening,
  { places }: Scored,
  called: (id: string) => Called,
): readonly ExplainedPlace[] {
  const order = placesOf(evening);
  return places.map((place, at) => {
    const { before, offClock, pegChanges } = place;
    const context: Context = {
      ...{ place, order: order[at]!, first: at === 0 },
      kinds: evening.chairs.flatMap((chair) => {
        const move = place.kinds.find(({ kind }) => kind === chair.kind.id);
        return move ? [{ chair, move }] : [];
      }),
      tune: called(before),
      previous: at === 0 ? null : called(order[at - 1]!.tune.id),
      rhythms: [order[at - 1]?.tune.rhythm ?? '', order[at]!.tune.rhythm ?? ''],
    };
    const reasons = [pegs, stop, rules, seconds, capos, keys, semitones].flatMap((each) => each(context));
    return { before, offClock, pegChanges, reasons };
  });
}

interface Context {
  readonly place: Place;
  readonly order: OrderPlace;
  readonly first: boolean;
  readonly kinds: readonly { readonly chair: Chair; readonly move: KindMove }[];
  readonly tune: Called;
  readonly previous: Called | null;
  readonly rhythms: readonly [string, string];
}

/** `5 fiddles`, `1 banjo` */
function players({ kind, count }: Chair): string {
  return `${count} ${(count === 1 ? kind.name : kind.plural).toLowerCase()}`;
}

/** "a, b and c" */
function listed(words: readonly string[]): string {
  return words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}

function pegs({ kinds }: Context): Reason[] {
  return kinds.flatMap(({ chair, move }) => {
    if (!move.from || !move.to || move.pegChanges === 0) return [];
    const words = `${players(chair)}: ${retuneWords(chair.kind, move.from.pitches, move.to.pitches)}.`;
    return [{ level: 'pegChanges', count: chair.count * move.pegChanges, words }];
  });
}

function stop({ place, first }: Context): Reason[] {
  if (place.pegChanges === 0) return [];
  if (place.offClock) {
    const when = first ? 'before the first tune' : 'in the break';
    return [{ level: 'retuneStops', count: 0, words: `No stop: it is done ${when}, and nobody waits.` }];
  }
  const words = `A stop inside a set: the room waits about ${halves(stopMinutes(place))} min.`;
  return [{ level: 'retuneStops', count: 1, words }];
}

/** 2.5 is "2½" */
const halves = (minutes: number): string => `${Math.floor(minutes)}${minutes % 1 === 0 ? '' : '½'}`;

function rules({ order, kinds, tune, previous, rhythms }: Context): Reason[] {
  const reasons: Reason[] = [];
  if (order.spacedPair && previous) {
    const [one, other] = rhythms.map((rhythm) => rhythm.toLowerCase());
    const words = `Two of a kind in a row: ${previous.title} (${one}) and ${tune.title} (${other}).`;
    reasons.push({ level: 'ruleBreaks', count: 1, words });
  }
  if (order.inMedley) {
    const changing = kinds.filter(({ move }) => changes(move)).map(({ chair }) => players(chair));
    if (changing.length > 0) {
      const words = `Inside a medley: ${listed(changing)} must change between two of its tunes.`;
      reasons.push({ level: 'ruleBreaks', count: 1, words });
    }
  }
  return reasons;
}

const capoMoves = ({ from, to }: KindMove): boolean => Boolean(from && to && from.capo !== to.capo);
const changes = (move: KindMove): boolean => move.pegChanges > 0 || capoMoves(move);

const CHOICES = ['first', 'second', 'third', 'fourth', 'fifth'];

function seconds({ kinds, order }: Context): Reason[] {
  return kinds.flatMap(({ chair, move }) => {
    const accepted = order.tune.accepted[chair.kind.id];
    const first = Array.isArray(accepted)
      ? (accepted as readonly NonNullable<KindMove['to']>[])[0]
      : undefined;
    if (!first || !move.to || move.choice === 0) return [];
    const which = CHOICES[move.choice] ? `their ${CHOICES[move.choice]} choice` : 'a late choice';
    const words = `${players(chair)} in ${showTuned(chair.kind, move.to)}, ${which}; the first is ${showTuned(chair.kind, first)}.`;
    return [{ level: 'secondChoices', count: chair.count, words }];
  });
}

function capos({ kinds, place }: Context): Reason[] {
  return kinds.flatMap(({ chair, move }) => {
    if (!move.from || !move.to || !capoMoves(move)) return [];
    const words = `${players(chair)}: ${capoWords(move.from.capo, move.to.capo)}.`;
    return [{ level: 'capoMoves', count: place.offClock ? 0 : chair.count, words }];
  });
}

function keys({ order, tune, previous }: Context): Reason[] {
  if (!order.keyChange || !previous) return [];
  return [{ level: 'keyChanges', count: 1, words: `The key changes from ${previous.key} to ${tune.key}.` }];
}

function semitones({ kinds }: Context): Reason[] {
  let sum = 0;
  for (const { chair, move } of kinds) {
    chair.kind.courses.forEach(({ pegs: each }, course) => {
      sum += chair.count * each * Math.abs(move.deltas[course] ?? 0);
    });
  }
  return sum === 0
    ? []
    : [
        {
          level: 'semitones',
          count: sum,
          words: `${sum} half ${sum === 1 ? 'step' : 'steps'} turned in all.`,
        },
      ];
}
