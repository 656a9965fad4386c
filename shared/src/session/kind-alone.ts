import type { InstrumentKind } from '../music/instrument';
import type { Evening, KindMove } from './evening';
import { scoreEvening } from './score';

/**
 * What one kind does place by place where nobody else is in the room: how a kind without chairs is shown,
 * as one chair.
 *
 * @returns one move per tune, in playing order
 */
export function movesAlone(evening: Evening, kind: InstrumentKind): readonly KindMove[] {
  const { places } = scoreEvening({ ...evening, chairs: [{ kind, count: 1 }] });
  return places.map(({ kinds }) => kinds[0]!);
}
