import type { SessionSuggestion } from '@pegwell/shared/contract/ordering';
import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { BUILT_IN_KINDS } from '@pegwell/shared/music/instrument';
import { entriesOf, type Board } from '@pegwell/shared/session/board';
import { eveningOfBoard } from '@pegwell/shared/session/board-evening';
import { applyOperation } from '@pegwell/shared/session/board-operations';
import type { Evening, Goal, Scored } from '@pegwell/shared/session/evening';
import { scoreEvening } from '@pegwell/shared/session/score';

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

/** By entry id: the number, from 1, at which it stood; only of what stands at another now. */
export function movedFrom(before: Board<ShownEntry>, after: Board<ShownEntry>): ReadonlyMap<string, number> {
  const now = new Map(entriesOf(after).map(({ id }, index) => [id, index]));
  const numbers = entriesOf(before).map(({ id }, index) => [id, index + 1] as const);
  return new Map(numbers.filter(([id, number]) => now.get(id) !== number - 1));
}

/**
 * What is known about an order, in plain words: only what was proved is called proved.
 * @param of "these tunes", or "this set" where the others stay as they are
 * @param needed of the goal's first level
 */
export function proofWords(
  { goal, provenLevels, optimal, lowerBound, stopped }: SessionSuggestion,
  needed: number,
  of = 'these tunes',
): { readonly proved: boolean; readonly words: string } {
  const [best, next] =
    goal === 'pegs'
      ? ['turns fewer pegs', 'as few in fewer stops']
      : ['has fewer stops', 'as few with fewer pegs'];
  const none = `No order of ${of} ${best}`;
  if (optimal) return { proved: true, words: `${none}: proved, down to the last half step.` };
  if (provenLevels >= 2) return { proved: true, words: `${none}, or ${next}: proved.` };
  if (provenLevels === 1) return { proved: true, words: `${none}: proved.` };
  const unit = goal === 'pegs' ? 'pegs' : 'stops';
  const known =
    lowerBound > 0
      ? `At least ${lowerBound} ${unit} are needed; whether fewer than ${needed} are enough is not known.`
      : `Whether fewer than ${needed} ${unit} are enough is not known.`;
  return { proved: false, words: stopped ? `${known} The search ran out of time.` : known };
}
