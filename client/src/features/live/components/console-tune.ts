import type { Session } from '@pegwell/shared/contract/sessions';

/** An entry of the board as the phone's words know a tune. */
export const tuneOf = (entry: Session['sets'][number]['entries'][number]) => ({
  ...entry,
  minutes: entry.open?.minutes ?? null,
});
