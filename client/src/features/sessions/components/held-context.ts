import { createContext, useContext } from 'react';
import type { SlotData } from '../hooks/drag-slots';

interface Held {
  /** The entry in the hand; null when nothing is. */
  readonly heldId: string | null;
  readonly target: Pick<SlotData, 'setId' | 'index'> | null;
}

const NOTHING: Held = { heldId: null, target: null };

export const HeldContext = createContext<Held>(NOTHING);

/** What is being dragged, for the slots under it. */
export const useHeld = (): Held => useContext(HeldContext);
