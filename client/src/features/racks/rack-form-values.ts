import type { CreateRack, Rack } from '@pegwell/shared/contract/racks';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning } from '@pegwell/shared/music/tuning';

type Arrives = Rack['instruments'][number]['arrives'];

export interface InstrumentValues {
  readonly arrives: Arrives;
  /** As typed; only of one that arrives tuned. */
  readonly tuning: string;
}

export interface RackFormValues {
  readonly player: string;
  readonly kind: string;
  readonly instruments: InstrumentValues[];
}

export const newInstrument = (arrives: Arrives): InstrumentValues => ({ arrives, tuning: '' });

/** Two instruments, the second tuned to what the plan says: what most who bring two will want. */
export const newRack = (kind: string): RackFormValues => ({
  player: '',
  kind,
  instruments: [newInstrument('opening'), newInstrument('free')],
});

export const valuesOf = ({ player, kind, instruments }: Rack): RackFormValues => ({
  player,
  kind,
  instruments: instruments.map(({ arrives, tuning }) => ({
    arrives,
    tuning: arrives === 'tuned' ? (tuning ?? '') : '',
  })),
});

export const toSend = ({ player, kind, instruments }: RackFormValues): CreateRack => ({
  player,
  kind,
  instruments: instruments.map(({ arrives, tuning }) =>
    arrives === 'tuned' ? { arrives, tuning: tuning.trim() } : { arrives },
  ),
});

/** Why a typed tuning cannot be read; true where it can, or where none is typed. */
export function tuningProblem(kindId: string, { arrives, tuning }: InstrumentValues): string | true {
  const kind = builtInKind(kindId);
  if (arrives !== 'tuned' || !kind) return true;
  if (tuning.trim() === '') return 'Say a tuning.';
  const parsed = parseTuning(kind, tuning);
  return parsed.ok || parsed.reason;
}
