import type { Follow, FollowMove, FollowTune } from '@pegwell/shared/contract/live';
import type { Phase } from '@pegwell/shared/contract/live';
import { gentlerChoice } from '@pegwell/shared/music/caution';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { retune } from '@pegwell/shared/music/retune';
import { showTuned, showTuning, type Tuned } from '@pegwell/shared/music/tuning';
import type { EveningEntry, StoredEvening, Walk } from '../sessions/evening';

/** What is known of an evening when phones ask: read once, shown for any kind. */
export interface Followed {
  readonly stored: StoredEvening;
  readonly walk: Walk;
  /** Null unless it is live. */
  readonly phase: Phase | null;
  /** The follow version. */
  readonly version: number;
  readonly followUrl: string;
}

interface Stand {
  readonly from: Tuned | null;
  readonly to: Tuned | null;
}

/** What the phone of one kind shows: now, next, later, and how many tunes until it is its turn to turn. */
export function presentFollow(
  { stored, walk, phase, version, followUrl }: Followed,
  kind: InstrumentKind,
): Follow {
  const { session, entries } = stored;
  const live = session.status === 'live' ? session.progress : null;
  const nowIndex = live ? entries.findIndex(({ id }) => id === live.nowEntryId) : -1;
  const now = entries[nowIndex];
  const left = session.status === 'finished' ? [] : entries.slice(nowIndex + 1);
  const moves = walk.moves(kind.id);
  const standFor = ({ id }: EveningEntry): Stand => moves.get(id) ?? { from: null, to: null };
  const facts: Stand = { from: live?.before[kind.id] ?? null, to: live?.inForce[kind.id] ?? null };
  // A kind that is free is shown the first tuning that will be stated for it.
  const firstStated = left.map(standFor).find(({ to }) => to !== null)?.to ?? null;

  const show = (entry: EveningEntry, stand: Stand): FollowTune => {
    const shown = stand.to ?? firstStated;
    return {
      entryId: entry.id,
      title: entry.title,
      open: entry.open !== null,
      key: entry.key,
      mode: entry.mode,
      rhythm: entry.rhythm,
      minutes: entry.open?.minutes ?? null,
      tuning: shown && showTuning(kind, shown.pitches),
      capo: shown?.capo ?? null,
      pitches: shown && [...shown.pitches],
      retune: moveOf(kind, stand, entry),
      set: stored.sets.find((set) => set.entries.includes(entry))?.title ?? '',
      position: entries.indexOf(entry) + 1,
    };
  };
  const [next = null, ...later] = left.map((entry) => show(entry, standFor(entry)));
  const untilRetune = [next, ...later].findIndex((tune) => tune !== null && tune.retune !== null);
  return {
    version,
    status: session.status,
    title: session.title,
    kind: kind.id,
    kinds: stored.chairs.map((chair) => chair.kind),
    referenceA: stored.referenceA,
    startsAt: session.startsAt.toISOString(),
    timeZone: session.timeZone,
    total: entries.length,
    followUrl,
    now: now ? { ...show(now, facts), phase: phase ?? 'playing' } : null,
    next,
    later,
    retuneIn: untilRetune < 0 ? null : untilRetune + (now ? 1 : 0),
  };
}

/** Null where nothing turns and no capo moves; being first stated moves nothing. */
function moveOf(kind: InstrumentKind, { from, to }: Stand, entry: EveningEntry): FollowMove | null {
  if (from === null || to === null) return null;
  const { deltas, pegChanges } = retune(kind, from.pitches, to.pitches);
  if (pegChanges === 0 && from.capo === to.capo) return null;
  const gentler = gentlerChoice(kind, from.pitches, to, entry.accepted[kind.id] ?? 'any');
  return {
    deltas: [...deltas],
    pegChanges,
    from: showTuning(kind, from.pitches),
    to: showTuning(kind, to.pitches),
    capoFrom: from.capo,
    capoTo: to.capo,
    fromPitches: [...from.pitches],
    toPitches: [...to.pitches],
    gentler: gentler && showTuned(kind, gentler),
  };
}
