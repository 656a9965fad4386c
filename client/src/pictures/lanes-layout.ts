import { midiOf } from '@pegwell/shared/music/pitch';
import type { Chair, Place } from '@pegwell/shared/session/evening';
import { moveOfKind } from './changing-kinds';

/*
 * Where everything in the string lanes stands, in px, for the width there is. Nothing is scaled: where
 * the whole evening does not fit in a row, every set gets rows of its own.
 *
 *   row    sets next to each other, or one set, or a part of one
 *   run    neighbouring tunes of a set within a row, after a lead
 *   lead   what stands before a run: nothing, the tail of the row above, or a gap off the clock
 */

export interface LanesEntry {
  readonly id: string;
  readonly title: string;
}

export interface LanesSet {
  readonly entries: readonly LanesEntry[];
}

export interface LaneTune extends LanesEntry {
  /** Counted from 1 through the evening. */
  readonly number: number;
  readonly place: Place;
  readonly x: number;
}

export type Lead = 'none' | 'tail' | 'opening' | 'break';

export interface LaneRun {
  readonly lead: Lead;
  /** Left edge of its first tune; the lead lies before it. */
  readonly x: number;
  readonly tunes: readonly LaneTune[];
}

export interface LaneRow {
  readonly runs: readonly LaneRun[];
  /** Where the lanes end. */
  readonly end: number;
}

export interface LanesLayout {
  readonly rows: readonly LaneRow[];
  readonly column: number;
  readonly width: number;
}

/** Room for the strings' names, left of the lanes. */
export const NAMES = 40;
/** A tune narrower than this cannot hold the mark of the next turn. */
const LEAST_COLUMN = 36;
const WIDEST_COLUMN = 110;
const LEADS: Readonly<Record<Lead, number>> = { none: 0, tail: 16, opening: 36, break: 36 };
export const GAP = LEADS.break;

type Unplaced = Omit<LaneTune, 'x'>;
interface Part {
  readonly lead: Lead;
  readonly tunes: readonly Unplaced[];
}

/** The sets that have tunes, numbered, each tune with the place before it. */
function partsOf(sets: readonly LanesSet[], places: readonly Place[], roomBefore: boolean): readonly Part[] {
  const before = new Map(places.map((place) => [place.before, place]));
  let number = 0;
  const filled = sets
    .map((set) =>
      set.entries.flatMap((entry): Unplaced[] => {
        number += 1;
        const place = before.get(entry.id);
        return place ? [{ ...entry, number, place }] : [];
      }),
    )
    .filter((tunes) => tunes.length > 0);
  return filled.map((tunes, index) => {
    if (index > 0) return { lead: 'break', tunes };
    const turnsFirst = (tunes[0]?.place.pegChanges ?? 0) > 0;
    return { lead: turnsFirst || roomBefore ? 'opening' : 'none', tunes };
  });
}

const leadsOf = (parts: readonly Part[]) => parts.reduce((sum, { lead }) => sum + LEADS[lead], 0);
const tunesOf = (parts: readonly Part[]) => parts.reduce((sum, { tunes }) => sum + tunes.length, 0);

/** Cuts a set into as few rows as fit, as even as they go. */
function cut(part: Part, room: number): readonly Part[] {
  const most = Math.max(1, Math.floor((room - LEADS[part.lead]) / LEAST_COLUMN));
  const rows = Math.ceil(part.tunes.length / most);
  const size = Math.ceil(part.tunes.length / rows);
  return Array.from({ length: rows }, (_, row) => ({
    lead: row === 0 ? part.lead : ('tail' as const),
    tunes: part.tunes.slice(row * size, (row + 1) * size),
  })).filter(({ tunes }) => tunes.length > 0);
}

/**
 * @param width of the whole picture in px
 * @param roomBefore whether the first tune has a gap before it though nothing is turned there
 */
export function layoutLanes(
  sets: readonly LanesSet[],
  places: readonly Place[],
  width: number,
  roomBefore = false,
): LanesLayout {
  const parts = partsOf(sets, places, roomBefore);
  const room = width - NAMES - 2;
  const fits = tunesOf(parts) * LEAST_COLUMN + leadsOf(parts) <= room;
  const rows = fits ? [parts] : parts.flatMap((part) => cut(part, room).map((piece) => [piece]));
  const filled = rows.filter((row) => row.length > 0);
  // One width for all columns, so that rows can be read under each other.
  const column = Math.min(
    WIDEST_COLUMN,
    ...filled.map((row) => Math.floor((room - leadsOf(row)) / tunesOf(row))),
  );
  return { rows: filled.map((row) => placeRow(row, column)), column, width };
}

function placeRow(parts: readonly Part[], column: number): LaneRow {
  let x = NAMES;
  const runs = parts.map(({ lead, tunes }): LaneRun => {
    x += LEADS[lead];
    const start = x;
    x += tunes.length * column;
    return { lead, x: start, tunes: tunes.map((tune, index) => ({ ...tune, x: start + index * column })) };
  });
  return { runs, end: x };
}

/** Where the mark of a stop stands: on the edge of its tune, or in the middle of the gap before it. */
export function stopX(run: LaneRun, tune: LaneTune): number {
  const first = run.tunes[0] === tune;
  if (!first || run.lead === 'none') return tune.x;
  return run.lead === 'tail' ? tune.x - 4 : tune.x - GAP / 2;
}

/** Semitones a string stands above its standard pitch after (or before) a place; null while it is free. */
export function levelOf(
  { kind }: Chair,
  course: number,
  place: Place,
  side: 'from' | 'to' = 'to',
): number | null {
  const pitch = moveOfKind(place, kind.id)?.[side]?.pitches[course];
  const standard = kind.courses[course]?.standard;
  return pitch && standard ? midiOf(pitch) - midiOf(standard) : null;
}
