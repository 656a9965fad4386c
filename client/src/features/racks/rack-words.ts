import type { Rack, RackCost, RackPlan, Racks } from '@pegwell/shared/contract/racks';
import type { ShownTuning } from '@pegwell/shared/contract/tunes';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { count } from '../../lib/format';
import { keyWords } from '../../music/key-words';

type EveningTune = Racks['evening']['sets'][number]['tunes'][number];

/** An open place has no title: it is named by what may be called there. */
export const titleOf = ({ title, key, mode }: EveningTune): string => title ?? `${keyWords(key, mode)} tunes`;

/** `gDGBD capo 2` */
export const tunedText = ({ tuning, capo }: ShownTuning): string =>
  capo === 0 ? tuning : `${tuning} capo ${capo}`;

const COUNTED = ['no', 'one', 'two', 'three', 'four'];

/** `two fiddles`, `one banjo` */
export function instrumentsWords({ name, plural }: InstrumentKind, many: number): string {
  return `${COUNTED[many] ?? many} ${(many === 1 ? name : plural).toLowerCase()}`;
}

/** Where several instruments save no pegs, or save them at more stops: that is said, not left to be seen. */
export function savingWords(kind: InstrumentKind, many: number, { cost, alone }: RackPlan): string {
  if (many === 1) return '';
  const one = instrumentsWords(kind, 1);
  if (alone.pegChanges === 0) return `There is nothing to turn with ${one} either.`;
  if (cost.stops > alone.stops) return `Fewer pegs than with ${one}, at more stops.`;
  if (cost.pegChanges === alone.pegChanges && cost.stops === alone.stops) return `As with ${one}.`;
  return '';
}

/** `20 pegs`, `1 stop` */
export const pegsWords = ({ pegChanges }: RackCost): string => count(pegChanges, 'peg');
export const stopsWords = ({ stops }: RackCost): string => count(stops, 'stop');

/** How an instrument comes to the evening, in a line under its letters. */
export function arrivalWords(
  { arrives, tuning }: Rack['instruments'][number],
  played: boolean,
  bring: ShownTuning | null,
): string {
  if (!played) return 'Not needed tonight.';
  if (bring === null) return 'As it stands: no tune says a tuning.';
  if (arrives === 'tuned') return 'As entered here.';
  return tuning === null ? 'Tune it before you come.' : 'As everybody arrives.';
}
