import type { Active, Announcements, DndContextProps, Over } from '@dnd-kit/core';
import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { setTitle, spotAt, standingOf, type Board } from '@pegwell/shared/session/board';
import { applyOperation } from '@pegwell/shared/session/board-operations';
import { count } from '../../../lib/format';
import { entryOfTune } from '../entries';
import { entryTitle } from '../../../music/entry-title';
import { slotOf, type DraggedEntry, type DraggedTune } from './drag-slots';
import { scoreBoard } from './use-scored';

/** `place 3 of 9 in First set` */
function standingWords(board: Board<ShownEntry>, entryId: string): string {
  const standing = standingOf(board, entryId);
  if (!standing) return 'not on the board';
  const { set, setIndex, index } = standing;
  return `place ${index + 1} of ${set.entries.length} in ${setTitle(set.title, setIndex)}`;
}

/** What is said while something is dragged: where it would stand, and what that costs. */
export function dragWords(
  session: Session,
  board: Board<ShownEntry>,
): NonNullable<DndContextProps['accessibility']> {
  const heldBy = (active: Active): ShownEntry | null => {
    const data = active.data.current as DraggedEntry | DraggedTune | undefined;
    if (!data) return null;
    return 'tune' in data ? entryOfTune(data.tune, 'held') : (standingOf(board, data.entryId)?.entry ?? null);
  };

  const boardWith = (entry: ShownEntry, over: Over | null): Board<ShownEntry> => {
    const slot = slotOf(over);
    if (!slot) return board;
    const standing = standingOf(board, entry.id);
    const behind = standing?.set.id === slot.setId && standing.index < slot.index;
    const to = spotAt(board, slot.setId, behind ? slot.index - 1 : slot.index, entry.id);
    const moved = applyOperation(
      board,
      standing ? { type: 'move-entry', entryId: entry.id, to } : { type: 'add-entry', entry, to },
    );
    return moved ?? board;
  };

  const where = (active: Active, over: Over | null): string => {
    const entry = heldBy(active);
    if (!entry) return '';
    const there = boardWith(entry, over);
    const scored = scoreBoard(session, there);
    const pegs = scored.places.find(({ before }) => before === entry.id)?.pegChanges ?? 0;
    return `${entryTitle(entry)}, ${standingWords(there, entry.id)}, ${count(pegs, 'peg')}; ${count(scored.score.pegChanges, 'peg change')} in the evening`;
  };

  const announcements: Announcements = {
    onDragStart: ({ active }) => `Picked up ${where(active, null)}.`,
    onDragOver: ({ active, over }) => `${where(active, over)}.`,
    onDragEnd: ({ active, over }) => `Put down: ${where(active, over)}.`,
    onDragCancel: ({ active }) => {
      const entry = heldBy(active);
      return entry ? `${entryTitle(entry)} stays where it was.` : 'Nothing moved.';
    },
  };
  return {
    announcements,
    screenReaderInstructions: {
      draggable:
        'To move a tune, press space, then up or down from place to place and left or right from set to set; space puts it down, escape leaves it where it was. The menu beside moves it too.',
    },
  };
}
