import type { Session, SessionSummary, ShownEntry } from '@pegwell/shared/contract/sessions';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { showTuned, showTuning, type Tuned } from '@pegwell/shared/music/tuning';
import { scoreEvening } from '@pegwell/shared/session/score';
import { actionsOf } from '@pegwell/shared/policy';
import type { Member } from '../common/access';
import { openingsOf, scoredEvening, type EveningEntry, type StoredEvening } from './evening';
import type { SessionRow } from './sessions.repository';
import type { Tunings } from './sessions.table';

/** A session as its members see it. */
export function presentSession(
  stored: StoredEvening,
  member: Pick<Member, 'role'>,
  updatedBy: string | null,
): Session {
  const { session, sets } = stored;
  const { progress } = session;
  const live = session.status === 'live' ? progress : null;
  return {
    ...summaryFields(session),
    circleId: session.circleId,
    notes: session.notes,
    version: session.version,
    chairs: stored.chairs.map(({ kind, count }) => ({ kind, count })),
    openings: pick(shown(openingsOf(session)), [
      ...stored.chairs.map(({ kind }) => kind),
      ...Object.keys(session.openings),
    ]),
    goal: session.goal,
    spacedRhythms: session.spacedRhythms,
    referenceA: stored.referenceA,
    sets: sets.map(({ id, title, entries }) => ({ id, title, entries: entries.map(presentEntry) })),
    medleys: session.medleys,
    befores: session.befores,
    score: scoreEvening(scoredEvening(stored)).score,
    called: [...(progress?.called ?? [])],
    nowEntryId: live?.nowEntryId ?? null,
    inForce: live ? shown(live.inForce) : null,
    updatedBy,
    can: actionsOf(member.role),
  };
}

export function presentSummary(session: SessionRow, counts: { tunes: number; sets: number }): SessionSummary {
  return { ...summaryFields(session), ...counts };
}

function summaryFields(session: SessionRow) {
  const { id, title, place, code, status, localStart, timeZone } = session;
  return { id, title, place, code, status, localStart, timeZone, startsAt: session.startsAt.toISOString() };
}

function presentEntry(entry: EveningEntry): ShownEntry {
  const { id, tuneId, settingId, pinned, open, title, key, mode, rhythm, minutes, removed } = entry;
  return {
    ...{ id, tuneId, settingId, pinned, open, title, key, mode, rhythm, minutes, removed },
    sitOut: [...entry.sitOut],
    tunings: Object.entries(entry.accepted).flatMap(([kindId, accepted]) => {
      const kind = builtInKind(kindId);
      if (!kind) return [];
      const list =
        accepted === 'any'
          ? [{ tuning: 'any', pitches: null, capo: 0 }]
          : accepted.map(({ pitches, capo }) => ({
              tuning: showTuning(kind, pitches),
              pitches: [...pitches],
              capo,
            }));
      return [{ kind: kindId, accepted: list, assumed: entry.assumed.has(kindId) }];
    }),
  };
}

/** Tunings by kind, as shown, with their capo. */
export function shown(tunings: Tunings): Record<string, string | null> {
  return Object.fromEntries(
    Object.entries(tunings).flatMap(([kindId, tuned]: [string, Tuned | null]) => {
      const kind = builtInKind(kindId);
      return kind ? [[kindId, tuned && showTuned(kind, tuned)]] : [];
    }),
  );
}

function pick<T>(record: Readonly<Record<string, T>>, keys: readonly string[]): Record<string, T> {
  return Object.fromEntries(Object.entries(record).filter(([key]) => keys.includes(key)));
}
