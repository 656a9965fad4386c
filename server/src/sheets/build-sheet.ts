import { BUILT_IN_KINDS, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { showTuning, type Tuned } from '@pegwell/shared/music/tuning';
import type { KindMove } from '@pegwell/shared/session/evening';
import { eveningMinutes } from '@pegwell/shared/session/minutes';
import { DateTime } from 'luxon';
import { openingsOf, walkOf, type EveningEntry, type StoredEvening, type Walk } from '../sessions/evening';
import type { Sheet, SheetArrival, SheetEntry, SheetPlace, SheetTuning, Standing } from './sheet';
import { sheetMove } from './sheet-move';

interface RoomKind {
  readonly kind: InstrumentKind;
  readonly count: number;
  readonly moves: ReadonlyMap<string, KindMove>;
  /** What the kind first takes where it arrives in nothing. */
  readonly firstStated: Tuned | null;
}

/**
 * A set sheet of an evening. While it is live, what was called before now is past, as for the score, and the
 * rest goes on from the tunings in force.
 * @param notes by tune id
 * @param siteUrl without a slash at its end
 */
export function buildSheet(
  stored: StoredEvening,
  notes: ReadonlyMap<string, string | null>,
  siteUrl: string,
): Sheet {
  const { session } = stored;
  const walk = walkOf(stored);
  const room = roomOf(stored, walk);
  const live = session.status === 'live';
  const offClock = new Map(walk.room.places.map((place) => [place.before, place.offClock]));
  const follows = straightOn(session.medleys);
  let number = 0;

  const entry = (each: EveningEntry): SheetEntry => {
    number += 1;
    const next = stored.entries[number];
    const length = each.open ? `${each.minutes} min` : each.rhythm;
    const tuneNotes = each.tuneId === null ? null : (notes.get(each.tuneId) ?? null);
    return {
      number,
      title: each.title,
      key: [each.mode === 'major' ? each.key : `${each.key} ${each.mode}`, length]
        .filter(Boolean)
        .join(' · '),
      tunings: room.map((kind) => tuningOf(kind, each)),
      notes: tuneNotes && oneLine(tuneNotes, LONGEST_NOTE),
      straightOn: next !== undefined && (follows.get(each.id)?.has(next.id) ?? false),
      before: placeBefore(room, each, number, offClock.get(each.id) ?? false, live),
    };
  };
  const sets = stored.sets
    .filter(({ entries }) => entries.length > 0)
    .map(({ title, entries }) => ({ title, entries: entries.map(entry) }));
  return {
    title: session.title,
    when: whenOf(session),
    place: session.place,
    notes: session.notes && oneLine(session.notes, LONGEST_NOTES),
    room: room.map(({ kind, count }) => ({ name: kind.name, players: playersOf(kind, count) })),
    referenceA: String(Math.round(stored.referenceA * 10) / 10),
    summary: summaryOf(stored, walk.room.places),
    follow: { url: `${siteUrl}/f/${session.code}`, code: session.code },
    arrivals: live ? [] : room.map((kind) => arrivalOf(kind, session)),
    sets,
    turns: walk.room.places.some(({ pegChanges }) => pegChanges > 0),
    legend: legendOf(sets.flatMap(({ entries }) => entries)),
  };
}

function roomOf(stored: StoredEvening, walk: Walk): readonly RoomKind[] {
  return BUILT_IN_KINDS.flatMap((kind) => {
    const count = stored.chairs.find((chair) => chair.kind === kind.id)?.count ?? 0;
    if (count === 0) return [];
    const moves = walk.moves(kind.id);
    const firstStated = stored.entries.map(({ id }) => moves.get(id)?.to ?? null).find((to) => to !== null);
    return [{ kind, count, moves, firstStated: firstStated ?? null }];
  });
}

function placeBefore(
  room: readonly RoomKind[],
  entry: EveningEntry,
  number: number,
  offClock: boolean,
  live: boolean,
): SheetPlace | null {
  const moves = room.flatMap(({ kind, count, moves }) => {
    const move = moves.get(entry.id);
    return (move && sheetMove(kind, count, entry, move)) ?? [];
  });
  if (moves.length === 0) return null;
  // Live, the place before what is now lies behind everybody, and has no moves.
  const when = !offClock ? 'between' : number === 1 && !live ? 'before the first tune' : 'in the break';
  return { when, moves };
}

function tuningOf({ kind, moves, firstStated }: RoomKind, entry: EveningEntry): SheetTuning {
  const move = moves.get(entry.id);
  if (!move) return { letters: '', capo: 0, standing: 'past' };
  const standing: Standing = entry.sitOut.includes(kind.id)
    ? 'sits out'
    : entry.assumed.has(kind.id)
      ? 'assumed'
      : (entry.accepted[kind.id] ?? 'any') === 'any'
        ? 'as it stands'
        : 'stated';
  return shownAs(kind, move.to ?? firstStated, standing);
}

function shownAs(kind: InstrumentKind, tuned: Tuned | null, standing: Standing): SheetTuning {
  return tuned
    ? { letters: showTuning(kind, tuned.pitches), capo: tuned.capo, standing }
    : { letters: '', capo: 0, standing };
}

function arrivalOf({ kind, firstStated }: RoomKind, session: StoredEvening['session']): SheetArrival {
  const opening = openingsOf(session)[kind.id] ?? null;
  const tuned = opening ?? firstStated;
  return {
    kind: kind.name,
    tuning: tuned && shownAs(kind, tuned, 'stated'),
    free: opening === null,
  };
}

/** By entry id: who follows without stopping. */
function straightOn(medleys: readonly (readonly string[])[]): ReadonlyMap<string, ReadonlySet<string>> {
  const follows = new Map<string, Set<string>>();
  for (const medley of medleys) {
    for (const [index, id] of medley.entries()) {
      const next = medley[index + 1];
      if (next === undefined) continue;
      const known = follows.get(id);
      if (known) known.add(next);
      else follows.set(id, new Set([next]));
    }
  }
  return follows;
}

function legendOf(entries: readonly SheetEntry[]): readonly string[] {
  const found = new Set(entries.flatMap(({ tunings }) => tunings.map(({ standing }) => standing)));
  return [
    ...(found.has('assumed') ? ['* assumed: usual for the key, the tune says nothing'] : []),
    ...(found.has('as it stands') ? ['( ) plays it as it stands'] : []),
  ];
}

function whenOf({ localStart, timeZone }: StoredEvening['session']): string {
  return DateTime.fromISO(localStart, { zone: timeZone, locale: 'en-GB' }).toFormat(
    'cccc d MMMM yyyy, HH:mm',
  );
}

function playersOf(kind: InstrumentKind, count: number): string {
  return `${count} ${(count === 1 ? kind.name : kind.plural).toLowerCase()}`;
}

function summaryOf(stored: StoredEvening, places: Parameters<typeof eveningMinutes>[1]): string {
  const tunes = stored.entries.filter(({ open }) => !open).length;
  const open = stored.entries.length - tunes;
  const counts = [
    ...(tunes > 0 ? [`${tunes} ${tunes === 1 ? 'tune' : 'tunes'}`] : []),
    ...(open > 0 ? [`${open} open ${open === 1 ? 'place' : 'places'}`] : []),
  ];
  if (counts.length === 0) return '';
  const minutes =
    Math.round(
      eveningMinutes(
        stored.sets.map(({ entries }) => entries),
        places,
      ) / 5,
    ) * 5;
  const [hours, rest] = [Math.floor(minutes / 60), minutes % 60];
  const length = [...(hours > 0 ? [`${hours} h`] : []), ...(rest > 0 ? [`${rest} min`] : [])].join(' ');
  return `${counts.join(', ')}, about ${length}`;
}

/** Characters: a sheet has room for a line or two about a tune, and a few about the evening. */
const LONGEST_NOTE = 160;
const LONGEST_NOTES = 360;

function oneLine(notes: string, longest: number): string {
  const plain = notes.replace(/\s+/g, ' ').trim();
  const letters = [...plain];
  return letters.length > longest
    ? `${letters
        .slice(0, longest - 1)
        .join('')
        .trimEnd()}…`
    : plain;
}
