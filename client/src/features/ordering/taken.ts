import type { Goal } from '@pegwell/shared/session/evening';
import type { Order } from './compare';

/** An order that a host takes. */
export interface Taken {
  /** "Took the suggested order" */
  readonly label: string;
  /** Of the board it was made for. */
  readonly version: number;
  readonly order: Order;
  /** What counted first; the evening's own unless the host switched. */
  readonly goal: Goal;
}
