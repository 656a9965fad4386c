import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { entriesOf, standingOf, type Board } from '@pegwell/shared/session/board';
import { boardBody } from '@pegwell/shared/session/board-body';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import { entryTitle } from '../../../music/entry-title';

/** How the board stands towards the server. `refused`: it does not take changes from us now. */
export type Saving = 'saved' | 'waiting' | 'saving' | 'offline' | 'refused';

export interface BoardState {
  /** As the server last told it; its own sets are older than `board` while something is not saved. */
  readonly session: Session;
  /** What is on screen: the server's board with everything that is not saved yet. */
  readonly board: Board<ShownEntry>;
  readonly saving: Saving;
  /** Actions that are not saved yet. */
  readonly waiting: number;
  /** Whose changes came in last, and with which version. */
  readonly takenIn: { readonly who: string; readonly version: number } | null;
  /** Sentences about what could not be done, newest last. */
  readonly problems: readonly string[];
  /** What would be taken back or done again; null when there is nothing. */
  readonly undo: string | null;
  readonly redo: string | null;
}

export function boardOf(session: Session): Board<ShownEntry> {
  return { sets: session.sets, medleys: session.medleys, befores: session.befores };
}

/** Whether two boards are saved as the same. */
export function sameToSave(a: Board<ShownEntry>, b: Board<ShownEntry>): boolean {
  return a === b || JSON.stringify(boardBody(a, 0)) === JSON.stringify(boardBody(b, 0));
}

/** The entry that an operation is about, if it is about one. */
export function entryOf(operation: BoardOperation<ShownEntry>): string | null {
  if (operation.type === 'add-entry') return operation.entry.id;
  return 'entryId' in operation ? operation.entryId : null;
}

export function setOf(operation: BoardOperation<ShownEntry>): string | null {
  if ('setId' in operation) return operation.setId;
  return operation.type === 'add-entry' ? operation.to.setId : null;
}

export function titleOf(board: Board<ShownEntry>, entryId: string): string | null {
  const entry = standingOf(board, entryId)?.entry;
  return entry ? entryTitle(entry) : null;
}

/**
 * While an evening is live, what was called keeps its place. Tells the first that would not.
 * @returns its number in the evening as it was, from 1; null where all keep theirs
 */
export function calledThatMoves(
  session: Session,
  before: Board<ShownEntry>,
  after: Board<ShownEntry>,
): number | null {
  if (session.status !== 'live') return null;
  const was = entriesOf(before).map(({ id }) => id);
  const is = entriesOf(after).map(({ id }) => id);
  const called = [...session.called, ...(session.nowEntryId ? [session.nowEntryId] : [])];
  const moved = called.map((id) => was.indexOf(id)).filter((at) => at >= 0 && is[at] !== was[at]);
  return moved.length > 0 ? Math.min(...moved) + 1 : null;
}
