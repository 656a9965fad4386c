import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { showTuned, type Tuned } from '@pegwell/shared/music/tuning';

/** What a kind accepts, as `parseAccepted` reads it back: `AEAE or GDAE`, `gDGBD capo 2`, `any`. */
export function showCell(kind: InstrumentKind, accepted: readonly Tuned[] | 'any'): string {
  return accepted === 'any' ? 'any' : accepted.map((tuned) => showTuned(kind, tuned)).join(' or ');
}
