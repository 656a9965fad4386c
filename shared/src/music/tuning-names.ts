import type { InstrumentKind } from './instrument';
import type { NamedTuning } from './named-tunings';
import { NAMED_TUNINGS } from './named-tunings';
import { sameTuning } from './tuning';

/**
 * The built-in named tuning with these pitches, if there is one; as it sounds, so `Db` finds `C#`.
 * @example namedTuning(fiddle, ['A3','E4','A4','C#5'])?.names // ['calico', 'open A']
 */
export function namedTuning(kind: InstrumentKind, pitches: readonly string[]): NamedTuning | undefined {
  return NAMED_TUNINGS[kind.id]?.find((named) => sameTuning(named.pitches, pitches));
}
