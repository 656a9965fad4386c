import type {
  CollisionDetection,
  DroppableContainer,
  KeyboardCoordinateGetter,
  UniqueIdentifier,
} from '@dnd-kit/core';
import type { Tune } from '@pegwell/shared/contract/tunes';

/**
 * Cards are dropped into slots: one before each card and one at the end of each set. Nothing parts while a
 * card is dragged, so what is aimed at stays where it is; a line shows where the card will land, and what
 * the evening then costs.
 */
export interface SlotData {
  readonly slot: true;
  readonly setId: string;
  /** Before the entry that stands there now; counted from 0. */
  readonly index: number;
  /** Dropping here leaves the dragged entry where it is: arrows pass over it. */
  readonly own: boolean;
}

export interface DraggedEntry {
  readonly entryId: string;
}
export interface DraggedTune {
  readonly tune: Tune;
}

export const slotId = (setId: string, index: number) => `slot ${setId} ${index}`;

export function slotOf(container: { readonly data: { readonly current?: unknown } } | null): SlotData | null {
  const data = container?.data.current;
  return typeof data === 'object' && data !== null && 'slot' in data ? (data as SlotData) : null;
}

interface Point {
  readonly x: number;
  readonly y: number;
}
interface Rect {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

const centreOf = ({ left, top, width, height }: Rect): Point => ({
  x: left + width / 2,
  y: top + height / 2,
});

/** How far a point is from a slot: sideways only where it is outside the slot's column. */
function distance(point: Point, rect: Rect): number {
  const outside = Math.max(rect.left - point.x, 0, point.x - rect.left - rect.width);
  return Math.abs(centreOf(rect).y - point.y) + outside * 4;
}

/** The slot nearest to the pointer, or to where the keyboard has put the card. */
export const nearestSlot: CollisionDetection = ({
  droppableContainers,
  droppableRects,
  pointerCoordinates,
  collisionRect,
}) => {
  const point = pointerCoordinates ?? centreOf(collisionRect);
  return droppableContainers
    .filter((container) => slotOf(container) !== null)
    .flatMap((container) => {
      const rect = droppableRects.get(container.id);
      return rect
        ? [{ id: container.id, data: { droppableContainer: container, value: distance(point, rect) } }]
        : [];
    })
    .sort((a, b) => a.data.value - b.data.value)
    .slice(0, 1);
};

/** Up and down go from slot to slot in playing order, left and right to the set beside. */
function slotByArrow(
  slots: readonly DroppableContainer[],
  over: UniqueIdentifier | null,
  code: string,
): DroppableContainer | null {
  const ordered = [...slots].sort(inPlayingOrder);
  const at = ordered.findIndex(({ id }) => id === over);
  const forward = code === 'ArrowDown' || code === 'ArrowRight';
  const here = ordered[at];
  const rest = forward ? ordered.slice(at + 1) : ordered.slice(0, Math.max(0, at)).reverse();
  if (code === 'ArrowDown' || code === 'ArrowUp')
    return rest.find((each) => slotOf(each)?.own === false) ?? null;
  const setId = slotOf(here ?? null)?.setId;
  const next = rest.find((each) => slotOf(each)?.setId !== setId);
  const nextSet = slotOf(next ?? null)?.setId;
  const index = slotOf(here ?? null)?.index ?? 0;
  const inNext = ordered.filter((each) => slotOf(each)?.setId === nextSet);
  return inNext[Math.min(index, inNext.length - 1)] ?? null;
}

function inPlayingOrder(a: DroppableContainer, b: DroppableContainer): number {
  const [first, second] = [a.node.current, b.node.current];
  if (!first || !second) return 0;
  return first.compareDocumentPosition(second) & Node.DOCUMENT_POSITION_FOLLOWING ? -1 : 1;
}

export const slotCoordinates: KeyboardCoordinateGetter = (event, { context, currentCoordinates }) => {
  if (!event.code.startsWith('Arrow')) return undefined;
  event.preventDefault();
  const { collisionRect, droppableContainers, droppableRects, over } = context;
  const slots = droppableContainers.getEnabled().filter((each) => slotOf(each) !== null);
  const slot = slotByArrow(slots, over?.id ?? null, event.code);
  const rect = slot && droppableRects.get(slot.id);
  if (!rect || !collisionRect) return currentCoordinates;
  const centre = centreOf(rect);
  return { x: centre.x - collisionRect.width / 2, y: centre.y - collisionRect.height / 2 };
};
