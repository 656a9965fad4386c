import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import type { Tuned } from '@pegwell/shared/music/tuning';

interface Room {
  /** Of the evening to come back to. */
  readonly code?: string | undefined;
  /** A4 of the room, in hertz. */
  readonly referenceA?: number | undefined;
}

/** In full, so that the phone need not load what reads and writes short names. */
const inFull = ({ pitches, capo }: Tuned): string => `${pitches.join(' ')}${capo > 0 ? ` capo ${capo}` : ''}`;

/** Where the retune card of two tunings is: all that it shows stands in its address. */
export function retuneAddress(kind: InstrumentKind, from: Tuned, to: Tuned, room: Room = {}): string {
  const query = new URLSearchParams({ kind: kind.id, from: inFull(from), to: inFull(to) });
  if (room.referenceA !== undefined && room.referenceA !== 440) query.set('a', `${room.referenceA}`);
  if (room.code !== undefined) query.set('code', room.code);
  return `/retune?${query.toString()}`;
}
