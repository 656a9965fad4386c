import type { Tuned } from '../music/tuning';

/** By kind id; null is "free" (tune to the first tune, nothing stated yet). */
export type Tunings = Readonly<Record<string, Tuned | null>>;

/** Where a live evening stands: facts, copied, so that a later change to a tune does not rewrite them. */
export interface Progress {
  readonly nowEntryId: string;
  /** Every entry that was called, in the order of calling, each once. */
  readonly called: readonly string[];
  /** The entry that was now before the last step; null at the first. */
  readonly previousEntryId: string | null;
  /** In force before the last step, for every kind. */
  readonly before: Tunings;
  /** In force with the tune that is now, for every kind. */
  readonly inForce: Tunings;
}
