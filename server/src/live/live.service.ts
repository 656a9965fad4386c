import { Inject, Injectable } from '@nestjs/common';
import type { LiveState, LiveStep } from '@pegwell/shared/contract/live';
import { takeStep, type LiveRoom, type Standing } from '@pegwell/shared/live/step';
import { HistoryService } from '../circles/history.service';
import { announceSession } from '../common/announce';
import type { Member } from '../common/access';
import { cannotBe, notFound, ProblemException } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { ENV, type Env } from '../env';
import { openingsOf, type StoredEvening } from '../sessions/evening';
import { EveningsService } from '../sessions/evenings.service';
import { SessionsService } from '../sessions/sessions.service';
import { tuningsWith } from './called';
import { followUrl } from './follow-url';
import { LiveRepository, type LiveRow } from './live.repository';
import { RecordService } from './record.service';

/** The host's console: one step after the other, whoever of the hosts takes it. */
@Injectable()
export class LiveService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly sessions: SessionsService,
    private readonly evenings: EveningsService,
    private readonly live: LiveRepository,
    private readonly record: RecordService,
    private readonly history: HistoryService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  async get(sessionId: string): Promise<LiveState> {
    const stored = await this.evenings.load(this.db, sessionId);
    if (!stored) throw notFound();
    return this.present(stored.session, await this.live.state(this.db, sessionId));
  }

  /**
   * Takes a step, or says why not. A step sent again gets its first answer again; a step from a state that
   * is no longer so is refused with the state.
   */
  async step(member: Member, sessionId: string, step: LiveStep): Promise<LiveState> {
    return this.db.transaction(async (tx) => {
      const session = await this.sessions.lock(tx, sessionId);
      if (!session) throw notFound();
      const row = await this.live.state(tx, session.id);
      const first = step.actionId && (await this.live.answerTo(tx, session.id, step.actionId));
      if (first) return first;
      const current = this.present(session, row);
      if (step.liveVersion !== undefined && step.liveVersion !== current.liveVersion) {
        throw new ProblemException('changed', 'Another step was taken meanwhile.', { current });
      }
      const answer = await this.take(tx, member, await this.evenings.whole(tx, session), row, step);
      if (step.actionId) await this.live.keepAnswer(tx, session.id, step.actionId, answer);
      return answer;
    });
  }

  private async take(
    tx: Database,
    member: Member,
    stored: StoredEvening,
    row: LiveRow | null,
    step: LiveStep,
  ): Promise<LiveState> {
    const { session } = stored;
    const standing = { status: session.status, phase: row?.phase ?? null, progress: session.progress };
    const result = takeStep(roomOf(stored), standing, step);
    if (result.outcome === 'refused') {
      if (result.unknownEntry) throw cannotBe([{ path: 'entryId', message: result.reason }]);
      throw new ProblemException('live-impossible', result.reason);
    }
    if (result.outcome === 'unchanged') return this.present(session, row);

    const at = new Date();
    const { status, phase, progress } = result.standing;
    const finishedAt = status === 'finished' ? at : null;
    const after: LiveRow = {
      sessionId: session.id,
      liveVersion: (row?.liveVersion ?? 0) + 1,
      phase,
      startedAt: row?.startedAt ?? at,
      stepAt: at,
      finishedAt,
    };
    await this.sessions.setProgress(tx, session.id, { status, progress, finishedAt });
    await this.live.write(tx, after);
    await this.record.note(tx, stored, result, step.action, at);
    if (status !== session.status) {
      await this.history.note(tx, member, {
        what: status === 'finished' ? 'session.finished' : 'session.started',
        subjectId: session.id,
        after: { title: session.title },
      });
    }
    await announceSession(tx, session.id);
    return this.present({ ...session, status, progress }, after);
  }

  private present(
    session: {
      readonly id: string;
      readonly code: string;
      readonly status: Standing['status'];
      readonly progress: Standing['progress'];
    },
    row: LiveRow | null,
  ): LiveState {
    const live = session.status === 'live' ? session.progress : null;
    return {
      sessionId: session.id,
      liveVersion: row?.liveVersion ?? 0,
      status: session.status,
      nowEntryId: live?.nowEntryId ?? null,
      phase: live ? (row?.phase ?? null) : null,
      startedAt: row?.startedAt?.toISOString() ?? null,
      stepAt: row?.stepAt?.toISOString() ?? null,
      finishedAt: row?.finishedAt?.toISOString() ?? null,
      called: [...(session.progress?.called ?? [])],
      followUrl: followUrl(this.env, session.code),
    };
  }
}

function roomOf(stored: StoredEvening): LiveRoom {
  return {
    order: stored.entries.map(({ id }) => id),
    openings: openingsOf(stored.session),
    kinds: stored.chairs.map(({ kind }) => kind),
    tuningsFor: (entryId) => tuningsWith(stored, entryId),
  };
}
