import type { Rack, RackPlan, Racks } from '@pegwell/shared/contract/racks';
import type { ShownTuning } from '@pegwell/shared/contract/tunes';
import { BUILT_IN_KINDS, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { retune } from '@pegwell/shared/music/retune';
import { parseTuning, showTuning } from '@pegwell/shared/music/tuning';

/** The first kind that there is. */
const [fiddle] = BUILT_IN_KINDS as [InstrumentKind];

export function shown(text: string): ShownTuning & { readonly pitches: string[] } {
  const tuned = parseTuning(fiddle, text);
  if (!tuned.ok) throw new Error(tuned.reason);
  const { pitches, capo } = tuned.value;
  return { tuning: showTuning(fiddle, pitches), pitches: [...pitches], capo };
}

/** Two sets: `e1` to `e4`, then `e5` and `e6`, an open place. */
export const SETS: Racks['evening']['sets'] = [
  ['First set', ['Slack Tide', 'Stone Weir', 'Ford Lane', 'Low Bridge']] as const,
  ['Second set', ['Eel Pot', null]] as const,
].map(([title, titles], set) => ({
  id: `set${set}`,
  title,
  tunes: titles.map((tune, index) => ({
    id: `e${set * 4 + index + 1}`,
    title: tune,
    key: 'A',
    mode: 'modal' as const,
  })),
}));

interface Turned {
  readonly before: string;
  readonly needed?: string;
  readonly offClock?: boolean;
  readonly instrument: number;
  readonly from: string;
  readonly to: string;
  readonly gentler?: string;
}

export function turn({
  before,
  needed = before,
  offClock = false,
  instrument,
  from,
  to,
  gentler,
}: Turned): RackPlan['turns'][number] {
  const [was, is] = [shown(from), shown(to)];
  const { deltas, pegChanges } = retune(fiddle, was.pitches, is.pitches);
  return {
    ...{ before, needed, offClock, instrument, from: was, to: is },
    ...{ deltas: [...deltas], pegChanges, gentler: gentler ?? null },
  };
}

/** On 1, 2, 1, 1 | 2 (retuned in the break), 1: a stop before the third tune. */
export const PLAN: RackPlan = {
  bring: [shown('GDAE'), shown('AEAE')],
  tunes: [
    ['e1', 0, 'GDAE'],
    ['e2', 1, 'AEAE'],
    ['e3', 0, 'ADAE'],
    ['e4', 0, 'ADAE'],
    ['e5', 1, 'AEAC#'],
    ['e6', 1, 'AEAC#'],
  ].map(([entryId, instrument, tuning]) => ({
    entryId: entryId as string,
    instrument: instrument as number,
    tuned: shown(tuning as string),
    asItStands: entryId === 'e6',
  })),
  turns: [
    turn({ before: 'e3', instrument: 0, from: 'GDAE', to: 'ADAE', gentler: 'GDAE' }),
    turn({ before: 'e5', offClock: true, instrument: 1, from: 'AEAE', to: 'AEAC#' }),
  ],
  cost: { pegChanges: 2, stops: 1, semitones: 5 },
  alone: { pegChanges: 7, stops: 2, semitones: 15 },
};

export const rack = (more: Partial<Rack> = {}): Rack => ({
  id: 'r1',
  version: 1,
  player: 'Mara',
  kind: 'fiddle',
  instruments: [
    { arrives: 'opening', tuning: 'GDAE' },
    { arrives: 'free', tuning: null },
  ],
  plan: PLAN,
  refusal: null,
  ...more,
});

export const racks = (items: readonly Rack[], sets = SETS): Racks => ({
  evening: {
    title: 'Second Thursday',
    status: 'planned',
    kinds: ['banjo', 'fiddle'],
    openings: { fiddle: 'GDAE', banjo: 'gDGBD', mandolin: null },
    sets,
  },
  items: [...items],
});
