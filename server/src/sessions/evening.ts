import type { Mode } from '@pegwell/shared/contract/keys';
import type { OpenPlace } from '@pegwell/shared/contract/sessions';
import { BUILT_IN_KINDS, builtInKind, standardPitches } from '@pegwell/shared/music/instrument';
import { parseTonic } from '@pegwell/shared/music/pitch';
import type { Tuned } from '@pegwell/shared/music/tuning';
import type { Evening, EveningTune, KindMove, Scored } from '@pegwell/shared/session/evening';
import { scoreEvening } from '@pegwell/shared/session/score';
import type { SessionRow } from './sessions.repository';
import type { Tunings } from './sessions.table';

export type Accepted = Readonly<Record<string, readonly Tuned[] | 'any'>>;

/** An entry with what it plays tonight. */
export interface EveningEntry {
  readonly id: string;
  readonly tuneId: string | null;
  /** As the host chose it; null for the usual one. */
  readonly settingId: string | null;
  readonly open: OpenPlace | null;
  readonly pinned: boolean;
  readonly sitOut: readonly string[];
  /** Null for an open place. */
  readonly title: string | null;
  readonly key: string;
  readonly mode: Mode;
  readonly rhythm: string | null;
  readonly minutes: number;
  /** By kind, with usual tunings filled in and sit-outs applied. */
  readonly accepted: Accepted;
  /** Kinds whose tunings are assumed. */
  readonly assumed: ReadonlySet<string>;
  readonly removed: boolean;
}

export interface EveningSet {
  readonly id: string;
  readonly title: string;
  readonly entries: readonly EveningEntry[];
}

/** A stored session, read whole: what the board, the phones, the sheet and the ordering work on. */
export interface StoredEvening {
  readonly session: SessionRow;
  /** Hz. */
  readonly referenceA: number;
  readonly chairs: readonly { readonly kind: string; readonly count: number }[];
  readonly sets: readonly EveningSet[];
  /** The entries, set by set, in playing order. */
  readonly entries: readonly EveningEntry[];
}

/** What every kind arrives in: what the host said, else its standard tuning. */
export function openingsOf(session: Pick<SessionRow, 'openings'>): Tunings {
  return Object.fromEntries(
    BUILT_IN_KINDS.map((kind) => {
      const said = session.openings[kind.id];
      return [kind.id, said === undefined ? { pitches: standardPitches(kind), capo: 0 } : said];
    }),
  );
}

/**
 * The evening as it is scored: whole, or, while it is live, what is left from the tunings in force. What
 * is now stands first in it as a fact: one tuning a kind, already taken.
 */
export function scoredEvening(stored: StoredEvening, chairs = stored.chairs): Evening {
  const { session } = stored;
  const now = session.status === 'live' ? session.progress : null;
  const sets = now ? setsFrom(stored.sets, now.nowEntryId) : stored.sets;
  return {
    chairs: chairs.flatMap(({ kind: id, count }) => {
      const kind = builtInKind(id);
      return kind && count > 0 ? [{ kind, count }] : [];
    }),
    openings: now ? now.inForce : openingsOf(session),
    goal: session.goal,
    spacedRhythms: session.spacedRhythms,
    tunes: sets.flatMap((set) =>
      set.entries.map((entry) =>
        now?.nowEntryId === entry.id ? { ...toTune(entry), accepted: asFact(now.inForce) } : toTune(entry),
      ),
    ),
    sets: sets.map((set) => set.entries.map((entry) => entry.id)),
    medleys: session.medleys,
  };
}

function setsFrom(sets: readonly EveningSet[], entryId: string): EveningSet[] {
  const first = sets.findIndex((set) => set.entries.some((entry) => entry.id === entryId));
  return sets.slice(Math.max(0, first)).map((set, index) => {
    if (index > 0 || first < 0) return set;
    return { ...set, entries: set.entries.slice(set.entries.findIndex((entry) => entry.id === entryId)) };
  });
}

function toTune(entry: EveningEntry): EveningTune {
  const { id, rhythm, accepted } = entry;
  return { id, rhythm, accepted, tonic: parseTonic(entry.key)?.pitchClass ?? 0 };
}

function asFact(inForce: Tunings): Accepted {
  return Object.fromEntries(
    Object.entries(inForce).map(([kind, tuned]) => [kind, tuned === null ? ('any' as const) : [tuned]]),
  );
}

/** What every kind does at every place: the room's kinds together, any other alone, as one chair. */
export interface Walk {
  readonly room: Scored;
  /** By entry id; entries that were called before what is now are left out. */
  moves(kindId: string): ReadonlyMap<string, KindMove>;
}

export function walkOf(stored: StoredEvening): Walk {
  const room = scoreEvening(scoredEvening(stored));
  const known = new Map<string, ReadonlyMap<string, KindMove>>();
  return {
    room,
    moves: (kindId) => {
      let moves = known.get(kindId);
      if (!moves) {
        const inRoom = stored.chairs.some(({ kind, count }) => kind === kindId && count > 0);
        const scored = inRoom ? room : scoreEvening(scoredEvening(stored, [{ kind: kindId, count: 1 }]));
        known.set(kindId, (moves = movesOf(scored, kindId)));
      }
      return moves;
    },
  };
}

function movesOf(scored: Scored, kindId: string): ReadonlyMap<string, KindMove> {
  return new Map(
    scored.places.flatMap((place) => {
      const move = place.kinds.find(({ kind }) => kind === kindId);
      return move ? [[place.before, move] as const] : [];
    }),
  );
}
