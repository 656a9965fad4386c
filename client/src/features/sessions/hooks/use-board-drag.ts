import {
  KeyboardSensor,
  MouseSensor,
  TouchSensor,
  useSensor,
  useSensors,
  type DndContextProps,
  type DragEndEvent,
  type DragOverEvent,
  type DragStartEvent,
} from '@dnd-kit/core';
import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { spotAt, spotOf, standingOf, type Board } from '@pegwell/shared/session/board';
import { applyOperation, type BoardOperation } from '@pegwell/shared/session/board-operations';
import { useMemo, useState } from 'react';
import { newId } from '../../../lib/new-id';
import { entryOfTune } from '../entries';
import { entryTitle } from '../../../music/entry-title';
import type { BoardInHand } from './use-board';
import { dragWords } from './drag-words';
import {
  nearestSlot,
  slotCoordinates,
  slotOf,
  type DraggedEntry,
  type DraggedTune,
  type SlotData,
} from './drag-slots';

export interface BoardDrag {
  /** Spread into the DndContext around finder and board. */
  readonly context: Pick<
    DndContextProps,
    | 'sensors'
    | 'collisionDetection'
    | 'accessibility'
    | 'onDragStart'
    | 'onDragOver'
    | 'onDragEnd'
    | 'onDragCancel'
  >;
  /** What is in the hand; null when nothing is. */
  readonly held: ShownEntry | null;
  /** Where it would land, and the board as it would be; null where it would stay. */
  readonly target: Pick<SlotData, 'setId' | 'index'> | null;
  readonly draft: Board<ShownEntry> | null;
}

interface Hand {
  readonly entry: ShownEntry;
  /** From the finder: not on the board yet. */
  readonly isNew: boolean;
}

/** Slots count as the board stands; a spot counts without the entry that moves. */
function operationFor(
  board: Board<ShownEntry>,
  { entry, isNew }: Hand,
  { setId, index }: Pick<SlotData, 'setId' | 'index'>,
): BoardOperation<ShownEntry> | null {
  if (isNew) return { type: 'add-entry', entry, to: spotAt(board, setId, index) };
  const standing = standingOf(board, entry.id);
  if (!standing) return null;
  const behind = standing.set.id === setId && standing.index < index;
  const to = spotAt(board, setId, behind ? index - 1 : index, entry.id);
  const same = JSON.stringify(to) === JSON.stringify(spotOf(board, entry.id));
  return same ? null : { type: 'move-entry', entryId: entry.id, to };
}

/** Dragging on the board and from the finder, by mouse, finger and keyboard. */
export function useBoardDrag(session: Session, { board, perform }: BoardInHand): BoardDrag {
  const [hand, setHand] = useState<Hand | null>(null);
  const [target, setTarget] = useState<Pick<SlotData, 'setId' | 'index'> | null>(null);

  const sensors = useSensors(
    useSensor(MouseSensor, { activationConstraint: { distance: 5 } }),
    // A finger that rests takes the card; one that moves on scrolls the page.
    useSensor(TouchSensor, { activationConstraint: { delay: 180, tolerance: 8 } }),
    useSensor(KeyboardSensor, { coordinateGetter: slotCoordinates }),
  );

  const operation = useMemo(
    () => (hand && target ? operationFor(board, hand, target) : null),
    [board, hand, target],
  );
  const draft = useMemo(() => operation && applyOperation(board, operation), [board, operation]);

  const handFor = (event: { active: DragStartEvent['active'] }): Hand | null => {
    const data = event.active.data.current as DraggedEntry | DraggedTune | undefined;
    if (!data) return null;
    if ('tune' in data) return { entry: entryOfTune(data.tune, newId()), isNew: true };
    const entry = standingOf(board, data.entryId)?.entry;
    return entry ? { entry, isNew: false } : null;
  };

  const letGo = () => {
    setHand(null);
    setTarget(null);
  };

  return {
    held: hand?.entry ?? null,
    target: operation ? target : null,
    draft,
    context: {
      sensors,
      collisionDetection: nearestSlot,
      accessibility: dragWords(session, board),
      onDragStart: (event: DragStartEvent) => setHand(handFor(event)),
      onDragOver: ({ over }: DragOverEvent) => setTarget(slotOf(over)),
      onDragEnd: ({ over }: DragEndEvent) => {
        const slot = slotOf(over);
        const done = hand && slot && operationFor(board, hand, slot);
        letGo();
        if (done) perform(`${hand.isNew ? 'Added' : 'Moved'} ${entryTitle(hand.entry)}`, [done]);
      },
      onDragCancel: letGo,
    },
  };
}
