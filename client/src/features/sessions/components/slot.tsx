import { useDroppable } from '@dnd-kit/core';
import type { ReactNode } from 'react';
import { slotId, type SlotData } from '../hooks/drag-slots';
import { useHeld } from './held-context';
import styles from './slot.module.css';

interface SlotProps {
  readonly setId: string;
  /** Before the card that stands there, counted from 0. */
  readonly index: number;
  /** The entries around it, by which a slot knows that dropping here changes nothing. */
  readonly around: readonly (string | undefined)[];
  /** Closed slots take nothing: before what was called already. */
  readonly closed?: boolean;
  /** The strip between two tunes. */
  readonly children?: ReactNode;
  readonly className?: string | undefined;
}

/** Where a card can be put down; while one is held over it, a line shows. */
export function Slot({ setId, index, around, closed = false, children, className }: SlotProps) {
  const { heldId, target } = useHeld();
  const own = heldId !== null && around.includes(heldId);
  const data: SlotData = { slot: true, setId, index, own };
  const { setNodeRef } = useDroppable({ id: slotId(setId, index), data, disabled: closed });
  const here = target !== null && target.setId === setId && target.index === index;
  return (
    <div ref={setNodeRef} className={`${styles.slot} ${className ?? ''}`}>
      {children}
      {here ? <div className={styles.line} /> : null}
    </div>
  );
}
