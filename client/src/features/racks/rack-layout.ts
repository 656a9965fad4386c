import type { RackPlan, Racks } from '@pegwell/shared/contract/racks';
import type { Place } from '@pegwell/shared/session/evening';
import { NAMES, stopX, type LaneRow } from '../../pictures/lanes-layout';
import { tunedText } from './rack-words';

/** Distances in px: above the first lane, a lane, the numbers below. */
export const TOP = 10;
export const LANE = 54;
export const NUMBERS = 20;
/** Half the length of the swing from one lane to another. */
const HALF = 12;
/** Of a letter of a tuning, as the lanes set them. */
const LETTER = 11.5;

/** One instrument in one row of the picture. */
export interface RackLane {
  readonly instrument: number;
  readonly y: number;
  readonly start: number;
  /** What it stands in from there on; `below` where the one before would run into it. */
  readonly labels: readonly { readonly x: number; readonly text: string; readonly below: boolean }[];
  readonly marks: readonly { readonly x: number; readonly pegs: number; readonly offClock: boolean }[];
}

/** The places of the evening with this player's pegs alone: what the layout of the lanes goes by. */
export function rackPlaces(sets: Racks['evening']['sets'], { turns }: RackPlan): readonly Place[] {
  return sets.flatMap((set) =>
    set.tunes.map(({ id }, index) => {
      const here = turns.filter(({ before }) => before === id);
      const pegChanges = here.reduce((sum, turn) => sum + turn.pegChanges, 0);
      return { before: id, offClock: index === 0, pegChanges, kinds: [] };
    }),
  );
}

/** What stands in a row: lanes with their letters and marks, the line of the hand, and where stops are. */
export function layRack(
  row: LaneRow,
  column: number,
  plan: RackPlan,
): { readonly lanes: readonly RackLane[]; readonly hand: string; readonly stops: readonly number[] } {
  const lanes = plan.bring.map((_, instrument) => layLane(row, plan, instrument));
  const stops = row.runs.flatMap((run) =>
    run.tunes.filter(({ place }) => place.pegChanges > 0 && !place.offClock).map((tune) => stopX(run, tune)),
  );
  return { lanes, hand: handPath(row, column, plan, lanes), stops };
}

function layLane(row: LaneRow, plan: RackPlan, instrument: number): RackLane {
  const y = TOP + instrument * LANE + LANE / 2;
  const start = (row.runs[0]?.x ?? NAMES) - (row.runs[0]?.lead === 'opening' ? 34 : 0);
  const labels: { x: number; text: string; below: boolean }[] = [];
  const marks: { x: number; pegs: number; offClock: boolean }[] = [];
  const ends = { above: 0, below: 0 };
  const label = (x: number, text: string) => {
    const below = x < ends.above && x >= ends.below;
    ends[below ? 'below' : 'above'] = x + (text.length + 0.5) * LETTER;
    labels.push({ x, text, below });
  };
  const standing = standingBefore(row, plan, instrument);
  if (standing) label(start + 2, standing);
  for (const run of row.runs) {
    for (const tune of run.tunes) {
      const turn = plan.turns.find((each) => each.before === tune.id && each.instrument === instrument);
      if (!turn) continue;
      const x = stopX(run, tune);
      marks.push({ x, pegs: turn.pegChanges, offClock: turn.offClock });
      label(x + 13, turn.to.tuning);
    }
  }
  return { instrument, y, start, labels, marks };
}

/** How an instrument stands where a row begins; a first mark that says it anew there makes it superfluous. */
function standingBefore(row: LaneRow, plan: RackPlan, instrument: number): string | null {
  const first = row.runs[0]?.tunes[0];
  const order = plan.tunes.map(({ entryId }) => entryId);
  const at = order.indexOf(first?.id ?? '');
  const turns = plan.turns.filter((turn) => turn.instrument === instrument);
  const lead = row.runs[0]?.lead;
  if (lead !== 'opening' && turns.some((turn) => turn.before === first?.id)) return null;
  const last = turns.findLast((turn) => order.indexOf(turn.before) < at);
  const tuned = last?.to ?? plan.bring[instrument];
  return tuned ? tunedText({ ...tuned, capo: 0 }) : null;
}

/** Along the lane that is played, over to another in an S, nothing in a gap. */
function handPath(row: LaneRow, column: number, plan: RackPlan, lanes: readonly RackLane[]): string {
  const played = new Map(plan.tunes.map(({ entryId, instrument }) => [entryId, instrument]));
  const commands: string[] = [];
  for (const run of row.runs) {
    let at: number | null = null;
    for (const tune of run.tunes) {
      const y = lanes[played.get(tune.id) ?? 0]?.y ?? 0;
      if (at === null) commands.push(`M${tune.x} ${y}`);
      else if (at !== y) {
        commands.push(`H${tune.x - HALF}C${tune.x + 2} ${at} ${tune.x - 2} ${y} ${tune.x + HALF} ${y}`);
      }
      at = y;
    }
    const last = run.tunes.at(-1);
    if (last) commands.push(`H${last.x + column}`);
  }
  return commands.join('');
}
