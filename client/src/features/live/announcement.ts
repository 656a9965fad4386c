import type { Follow } from '@pegwell/shared/contract/live';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { capoWords, turns } from '@pegwell/shared/music/words';
import { sidesOf, titleOf, underTitle, yours } from './follow-words';

/** What a screen reader says when the evening moves on: the tune, and what it asks of this player. */
export function announcement(follow: Follow, kind: InstrumentKind): string {
  const { status, now, kinds } = follow;
  if (status === 'finished') return 'This evening is over.';
  if (!now) return '';
  const tune = `${titleOf(now)}, ${underTitle(now).replaceAll(' · ', ', ')}.`;
  const { retune, phase } = now;
  if (retune && (phase === 'tuning' || !kinds.includes(kind.id))) {
    const sides = sidesOf(retune);
    const spoken = sides ? turns(kind, sides.from.pitches, sides.to.pitches).map((turn) => turn.spoken) : [];
    const capo = sides ? capoWords(sides.from.capo, sides.to.capo) : '';
    return `Tune now for ${tune} ${[...spoken, capo].filter(Boolean).join('; ')}.`;
  }
  if (phase === 'tuning') return `Coming now: ${tune} Stay as you are while the others tune.`;
  return `Playing now: ${tune} ${retune ? 'The room is in tune.' : `Stay as you are: ${yours(kind)} is set.`}`;
}
