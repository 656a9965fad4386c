import type { CreateRack } from '@pegwell/shared/contract/racks';
import { DateTime } from 'luxon';

/** An evening as its host wrote it down: tunes by title, set by set. */
export interface DemoEvening {
  readonly title: string;
  readonly place: string;
  readonly notes: string | null;
  readonly sets: readonly (readonly string[])[];
  /** Titles that stay where they are. */
  readonly pinned: readonly string[];
}

export const DEMO_CIRCLE = { name: 'Larkfen Tune Circle', timeZone: 'America/New_York' } as const;

/** Those who retune; guitars are welcome and stay in standard. */
export const DEMO_CHAIRS = [
  { kind: 'fiddle', count: 5 },
  { kind: 'banjo', count: 2 },
] as const;

/** What one of them brings to the coming evening; the second is tuned at home to what the plan says. */
export const TWO_FIDDLES: CreateRack = {
  player: 'Neva Thistlemere',
  kind: 'fiddle',
  instruments: [{ arrives: 'opening' }, { arrives: 'free' }],
};

/** In the order in which the tunes came to mind: any host would wish for a better one. */
export const COMING: DemoEvening = {
  title: 'Second Thursday in the net loft',
  place: 'The net loft, Larkfen',
  notes: 'Stove lit from seven. Bring a cup.',
  sets: [
    [
      'Angeline the Baker',
      'Soldier’s Joy',
      'Breaking Up Christmas',
      'Sandy River Belle',
      'Seneca Square Dance',
      'Moorhen’s Breakfast',
      'Cluck Old Hen',
      'June Apple',
      'Bonaparte’s Retreat',
      'Nine Swans',
      'Candle in the Pump House',
      'Eel Pot',
    ],
    [
      'Old Joe Clark',
      'Ice Saw',
      'The Kettle Walked',
      'Leather Britches',
      'Crooked Towpath',
      'Black Mountain Rag',
      'Midnight on the Water',
      'Over the Waterfall',
      'Needlecase',
      'Cold Frosty Morning',
      'Wet Matches',
      'Last Punt Home',
    ],
  ],
  pinned: ['Last Punt Home'],
};

/** As it was played, but for its last tune: it grew late. */
export const PAST: DemoEvening = {
  title: 'Second Thursday in the net loft',
  place: 'The net loft, Larkfen',
  notes: null,
  sets: [
    [
      'Whiskey Before Breakfast',
      'Liberty',
      'Forked Deer',
      'Big Sciota',
      'Lamp Oil',
      'Sally in the Green Corn',
      'Thaw on the Long Dyke',
    ],
    [
      'Mississippi Sawyer',
      'Wind Pump',
      'Low Bridge, High Water',
      'Kitchen Girl',
      'Ducks on the Millpond',
      'Drunken Hiccups',
      'Red-Haired Boy',
    ],
  ],
  pinned: [],
};

/** Half past seven on second Thursdays, local time: the coming one, a day away at least, and the one before. */
export function demoDates(now: Date): { readonly past: string; readonly coming: string } {
  const today = DateTime.fromJSDate(now, { zone: DEMO_CIRCLE.timeZone });
  const around = [-2, -1, 0, 1, 2].map((months) => secondThursday(today.plus({ months })));
  const coming = around.find((date) => date > today.plus({ days: 1 }));
  const past = around.findLast((date) => date < today.minus({ days: 1 }));
  if (!coming || !past) throw new Error('every month has a second Thursday');
  return { past: written(past), coming: written(coming) };
}

function secondThursday(month: DateTime): DateTime {
  const first = month.startOf('month');
  const THURSDAY = 4;
  const days = ((THURSDAY - first.weekday + 7) % 7) + 7;
  return first.plus({ days }).set({ hour: 19, minute: 30 });
}

function written(date: DateTime): string {
  return date.toFormat("yyyy-MM-dd'T'HH:mm");
}
