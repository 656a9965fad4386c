import { Inject, Injectable } from '@nestjs/common';
import type { CirclePlay, LiveAction, Play } from '@pegwell/shared/contract/live';
import type { Mode } from '@pegwell/shared/contract/keys';
import type { Page, PageQuery } from '@pegwell/shared/contract/page';
import type { StepResult } from '@pegwell/shared/live/step';
import type { Member } from '../common/access';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import type { StoredEvening } from '../sessions/evening';
import { shown } from '../sessions/present';
import { SessionsService } from '../sessions/sessions.service';
import { PlaysRepository, type PlayRow } from './plays.repository';

/** A tune that is stepped back from this soon was called by mistake; nobody played it. */
const MISTAKE_MS = 30_000;

type Taken = Extract<StepResult, { readonly standing: unknown }>;

/** What was really played, when, and how long the room took to be in tune. */
@Injectable()
export class RecordService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly plays: PlaysRepository,
    private readonly sessions: SessionsService,
  ) {}

  async ofSession(sessionId: string): Promise<{ items: Play[] }> {
    return { items: (await this.plays.ofSession(this.db, sessionId)).map(presentPlay) };
  }

  async ofCircle(member: Member, query: PageQuery): Promise<Page<CirclePlay>> {
    const evenings = await this.sessions.begun(this.db, member.circleId);
    const { total, items } = await this.plays.page(this.db, [...evenings.keys()], query);
    return {
      ...query,
      total,
      items: items.flatMap((row) => {
        const evening = evenings.get(row.sessionId);
        if (!evening) return [];
        const { title, startsAt, timeZone } = evening;
        return [{ ...presentPlay(row), session: { title, startsAt: startsAt.toISOString(), timeZone } }];
      }),
    };
  }

  /** Writes a step into the record, in the step's transaction. */
  async note(tx: Database, stored: StoredEvening, taken: Taken, action: LiveAction, at: Date): Promise<void> {
    const sessionId = stored.session.id;
    if (taken.outcome === 'retuned') return this.plays.inTune(tx, sessionId, at);
    if (taken.outcome === 'finished') return this.plays.end(tx, sessionId, at);
    if (taken.outcome === 'withdrawn' || (await this.mistaken(tx, sessionId, action, at))) {
      await this.plays.withdraw(tx, sessionId);
      if (await this.plays.goOn(tx, sessionId, taken.standing.progress.nowEntryId)) return;
    }
    await this.plays.end(tx, sessionId, at);
    await this.begin(tx, stored, taken, at);
  }

  private async mistaken(tx: Database, sessionId: string, action: LiveAction, at: Date): Promise<boolean> {
    if (action !== 'back') return false;
    const current = await this.plays.current(tx, sessionId);
    return current !== null && at.getTime() - current.calledAt.getTime() < MISTAKE_MS;
  }

  private async begin(tx: Database, stored: StoredEvening, taken: Taken, at: Date): Promise<void> {
    const { progress, phase } = taken.standing;
    const entry = stored.entries.find(({ id }) => id === progress.nowEntryId);
    if (!entry) return;
    const room = stored.chairs.map(({ kind }) => [kind, progress.inForce[kind] ?? null] as const);
    await this.plays.begin(tx, {
      circleId: stored.session.circleId,
      sessionId: stored.session.id,
      entryId: entry.id,
      tuneId: entry.tuneId,
      title: entry.title,
      key: entry.key,
      mode: entry.mode,
      tunings: shown(Object.fromEntries(room)),
      calledAt: at,
      playingAt: phase === 'playing' ? at : null,
    });
  }
}

function presentPlay(row: PlayRow): Play {
  const { id, sessionId, entryId, tuneId, title, key, tunings } = row;
  return {
    ...{ id, sessionId, entryId, tuneId, title, key, tunings },
    // Only written from an entry, whose mode is one.
    mode: row.mode as Mode,
    calledAt: row.calledAt.toISOString(),
    playingAt: row.playingAt?.toISOString() ?? null,
    endedAt: row.endedAt?.toISOString() ?? null,
  };
}
