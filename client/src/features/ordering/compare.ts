import type { SessionSuggestion } from '@pegwell/shared/contract/ordering';
import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { BUILT_IN_KINDS } from '@pegwell/shared/music/instrument';
import { entriesOf, setTitle, type Board } from '@pegwell/shared/session/board';
import { eveningOfBoard } from '@pegwell/shared/session/board-evening';
import { applyOperation } from '@pegwell/shared/session/board-operations';
import type { Evening, Goal, Scored } from '@pegwell/shared/session/evening';
import { compareScores, scoreEvening } from '@pegwell/shared/session/score';

/** An order of the board's own entries, one list per set of the board. */
export type Order = readonly (readonly string[])[];

export interface Compared extends Scored {
  readonly board: Board<ShownEntry>;
  readonly evening: Evening;
}

/** An answer may leave empty sets out; the board keeps them. */
export function alignOrder(board: Board<ShownEntry>, sets: Order): Order {
  if (sets.length === board.sets.length) return sets;
  const rest = [...sets];
  return board.sets.map(({ entries }) => (entries.length === 0 ? [] : (rest.shift() ?? [])));
}

export function scoreOrder(session: Session, board: Board<ShownEntry>, goal: Goal, order?: Order): Compared {
  const ordered = order
    ? applyOperation(board, {
        type: 'replace-order',
        sets: board.sets.map(({ id }, index) => ({ setId: id, entryIds: order[index] ?? [] })),
      })
    : board;
  const plain = eveningOfBoard({ ...session, goal }, ordered ?? board);
  const chairs = BUILT_IN_KINDS.flatMap(({ id }) => plain.chairs.filter(({ kind }) => kind.id === id));
  const evening = { ...plain, chairs };
  return { board: ordered ?? board, evening, ...scoreEvening(evening) };
}

interface Part {
  readonly setId: string;
  readonly label: string;
  readonly order: Order;
}

/**
 * The sets whose suggested tunes are their own, so that one can be taken without the others; only where
 * that is better than what the host has, and less than the whole.
 */
export function partsOf(
  session: Session,
  board: Board<ShownEntry>,
  goal: Goal,
  order: Order,
): readonly Part[] {
  const now = board.sets.map(({ entries }) => entries.map(({ id }) => id));
  const changed = order.filter((ids, index) => ids.join() !== now[index]?.join()).length;
  if (changed < 2) return [];
  const mine = scoreOrder(session, board, goal);
  return board.sets.flatMap((set, index): Part[] => {
    const own = now[index] ?? [];
    const suggested = order[index] ?? [];
    const same = [...own].sort().join() === [...suggested].sort().join();
    if (!same || own.join() === suggested.join()) return [];
    const partial = now.map((ids, other) => (other === index ? suggested : ids));
    const better = compareScores(scoreOrder(session, board, goal, partial).score, mine.score, goal) < 0;
    return better
      ? [{ setId: set.id, label: `Only ${spoken(setTitle(set.title, index))}`, order: partial }]
      : [];
  });
}

/** `the first set`; a name of the host's own stands as it is. */
const spoken = (title: string) => (/^\w+ set$/.test(title) ? `the ${title.toLowerCase()}` : title);

interface Moved {
  readonly entry: ShownEntry;
  /** Numbers in the evening, from 1. */
  readonly from: number;
  readonly to: number;
}

/** What stands at another number, the longest ways first. */
export function movedEntries(before: Board<ShownEntry>, after: Board<ShownEntry>): readonly Moved[] {
  const numbers = new Map(entriesOf(after).map(({ id }, index) => [id, index + 1]));
  return entriesOf(before)
    .map((entry, index) => ({ entry, from: index + 1, to: numbers.get(entry.id) ?? index + 1 }))
    .filter(({ from, to }) => from !== to)
    .sort((a, b) => Math.abs(b.to - b.from) - Math.abs(a.to - a.from));
}

/**
 * What is known about the order, in one or two sentences: only what was proved is called proved.
 * `provenLevels` counts levels in the goal's order.
 */
export function proofWords(
  { goal, provenLevels, optimal, lowerBound, stopped }: SessionSuggestion,
  needed: number,
): { readonly proved: boolean; readonly words: string } {
  const [first, second] = goal === 'pegs' ? ['pegs', 'stops'] : ['stops', 'pegs'];
  if (optimal) return { proved: true, words: 'No order is better. Proved.' };
  if (provenLevels >= 2) {
    return { proved: true, words: `No order needs fewer ${first}, nor with these fewer ${second}. Proved.` };
  }
  if (provenLevels === 1) return { proved: true, words: `No order needs fewer ${first}. Proved.` };
  const known =
    lowerBound > 0
      ? `Every order needs at least ${lowerBound} ${first}; whether fewer than ${needed} do is not known.`
      : `Whether an order needs fewer ${first} is not known.`;
  return { proved: false, words: stopped ? `${known} The search ran out of time.` : known };
}

interface LeftOut {
  readonly entry: ShownEntry;
  readonly pegChanges: number;
}

/** The tunes without which this very order needs fewer pegs, the dearest first. */
export function dearest(session: Session, { board, score }: Compared, goal: Goal): readonly LeftOut[] {
  return entriesOf(board)
    .filter(({ id }) => id !== session.nowEntryId)
    .flatMap((entry): LeftOut[] => {
      const without = applyOperation(board, { type: 'remove-entry', entryId: entry.id });
      if (!without) return [];
      const { pegChanges } = scoreEvening(eveningOfBoard({ ...session, goal }, without)).score;
      return pegChanges < score.pegChanges ? [{ entry, pegChanges }] : [];
    })
    .sort((a, b) => a.pegChanges - b.pegChanges);
}
