import { BUILT_IN_KINDS } from '@pegwell/shared/music/instrument';
import type { UsualLookup } from '../circles/usual-tunings.service';
import type { Accepted, EveningEntry } from './evening';

/** What is stated, then the circle's usual tunings (assumed), and kinds that sit out as they stand. */
export function acceptedTonight(
  stated: Accepted,
  { key, mode }: Pick<EveningEntry, 'key' | 'mode'>,
  sitOut: readonly string[],
  usual: UsualLookup,
): Pick<EveningEntry, 'accepted' | 'assumed'> {
  const accepted: Record<string, Accepted[string]> = {};
  const assumed = new Set<string>();
  for (const { id } of BUILT_IN_KINDS) {
    const said = stated[id];
    if (sitOut.includes(id)) accepted[id] = 'any';
    else if (said !== undefined) accepted[id] = said;
    else {
      const assumption = usual(id, key, mode);
      if (assumption === 'any') continue;
      accepted[id] = [assumption];
      assumed.add(id);
    }
  }
  return { accepted, assumed };
}
