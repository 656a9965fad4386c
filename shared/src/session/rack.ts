import type { FieldError } from '../contract/errors';
import { builtInKind, type InstrumentKind } from '../music/instrument';
import { parseTuning, type Tuned } from '../music/tuning';

/** Of one kind, in one player's hands. */
export const MOST_INSTRUMENTS = 4;

/**
 * How an instrument comes to the evening: in what its kind arrives in, tuned at home to what the plan says, or
 * in a tuning of its own.
 */
export type Arrival = 'opening' | 'free' | Tuned;

/** The instruments of one player, read; everything that cannot be is told with its place. */
export function readInstruments(
  kindId: string,
  instruments: readonly {
    readonly arrives: 'opening' | 'free' | 'tuned';
    readonly tuning?: string | undefined;
  }[],
): {
  readonly kind: InstrumentKind | undefined;
  readonly arrivals: readonly Arrival[];
  readonly errors: readonly FieldError[];
} {
  const kind = builtInKind(kindId);
  if (!kind) {
    const message = `${kindId} is no instrument that Pegwell knows.`;
    return { kind, arrivals: [], errors: [{ path: 'kind', message }] };
  }
  const errors: FieldError[] = [];
  const arrivals = instruments.map(({ arrives, tuning }, index): Arrival => {
    if (arrives !== 'tuned') return arrives;
    const tuned = parseTuning(kind, tuning ?? '');
    if (tuned.ok) return tuned.value;
    errors.push({ path: `instruments.${index}.tuning`, message: tuned.reason });
    return 'opening';
  });
  return { kind, arrivals, errors };
}
