import { Inject, Injectable } from '@nestjs/common';
import type { FieldError } from '@pegwell/shared/contract/errors';
import type { Page, PageQuery } from '@pegwell/shared/contract/page';
import {
  DEFAULT_SPACED_RHYTHMS,
  type CreateSession,
  type Session,
  type SessionSummary,
  type UpdateSession,
} from '@pegwell/shared/contract/sessions';
import { readChairs, readOpenings } from '@pegwell/shared/session/room';
import { AccountsService } from '../accounts/accounts.service';
import { CirclesService } from '../circles/circles.service';
import { HistoryService } from '../circles/history.service';
import { announceSession } from '../common/announce';
import type { Member } from '../common/access';
import { cannotBe, notFound } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { BoardRepository } from './board.repository';
import { EveningsService } from './evenings.service';
import { presentSession, presentSummary } from './present';
import { makeCode } from './session-code';
import { SessionsRepository, type NewSession, type SessionRow } from './sessions.repository';
import type { Progress } from './sessions.table';
import { startTime } from './start-time';

@Injectable()
export class SessionsService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly sessions: SessionsRepository,
    private readonly boards: BoardRepository,
    private readonly evenings: EveningsService,
    private readonly circles: CirclesService,
    private readonly history: HistoryService,
    private readonly accounts: AccountsService,
  ) {}

  /** For the access guard. */
  async circleOf(sessionId: string): Promise<string | null> {
    return (await this.sessions.byId(this.db, sessionId))?.circleId ?? null;
  }

  async list(member: Member, query: PageQuery): Promise<Page<SessionSummary>> {
    const { total, items } = await this.sessions.page(this.db, member.circleId, query);
    return { ...query, total, items: items.map(({ session, ...counts }) => presentSummary(session, counts)) };
  }

  async create(member: Member, body: CreateSession): Promise<Session> {
    const circle = await this.circles.row(this.db, member.circleId);
    const { values, chairs } = readFields({
      timeZone: circle.timeZone,
      chairs: [{ kind: 'fiddle', count: 1 }],
      ...body,
    });
    return this.db.transaction(async (tx) => {
      const session = await this.insert(tx, {
        ...(values as NewSession),
        spacedRhythms: values.spacedRhythms ?? [...DEFAULT_SPACED_RHYTHMS],
        circleId: member.circleId,
        updatedBy: member.account.id,
      });
      await this.sessions.replaceSeats(tx, session.id, chairs ?? []);
      const empty = { sets: [], medleys: [], befores: [] };
      await this.boards.keepVersion(tx, session.id, session.version, member.account.id, empty);
      await this.history.note(tx, member, {
        ...{ what: 'session.created', subjectId: session.id },
        after: { title: session.title, startsAt: session.localStart },
      });
      await announceSession(tx, session.id);
      return this.present(tx, member, session.id);
    });
  }

  get(member: Member, sessionId: string): Promise<Session> {
    return this.present(this.db, member, sessionId);
  }

  async update(member: Member, sessionId: string, body: UpdateSession): Promise<Session> {
    return this.db.transaction(async (tx) => {
      const before = await this.sessions.lock(tx, sessionId);
      if (!before) throw notFound();
      const movesZone = body.timeZone !== undefined && body.startsAt === undefined;
      const { values, chairs } = readFields({
        ...body,
        // A new zone keeps the hour on the wall.
        ...((movesZone || body.startsAt !== undefined) && {
          startsAt: body.startsAt ?? before.localStart,
          timeZone: body.timeZone ?? before.timeZone,
        }),
      });
      const calendar = ['title', 'place', 'startsAt', 'timeZone'].some((field) => field in body);
      await this.sessions.update(tx, sessionId, {
        ...values,
        updatedBy: member.account.id,
        ...(calendar && { calendarSequence: before.calendarSequence + 1 }),
      });
      if (chairs) await this.sessions.replaceSeats(tx, sessionId, chairs);
      await this.history.note(tx, member, {
        ...{ what: 'session.changed', subjectId: sessionId },
        ...changeOf(before, values, chairs && { chairs }),
      });
      await announceSession(tx, sessionId);
      return this.present(tx, member, sessionId);
    });
  }

  /** Another code, for when the old one got around: that one opens nothing from here on. */
  async changeCode(member: Member, sessionId: string): Promise<Session> {
    return this.db.transaction(async (tx) => {
      const session = await this.sessions.lock(tx, sessionId);
      if (!session) throw notFound();
      let code = makeCode();
      while (await this.sessions.byCode(tx, code)) code = makeCode();
      await this.sessions.update(tx, sessionId, { code, codeGivenAt: new Date() });
      // Not the codes themselves: whoever reads the history later has no need of them.
      await this.history.note(tx, member, {
        ...{ what: 'session.code-changed', subjectId: sessionId },
        after: { title: session.title },
      });
      await announceSession(tx, sessionId);
      return this.present(tx, member, sessionId);
    });
  }

  async remove(member: Member, sessionId: string): Promise<void> {
    await this.db.transaction(async (tx) => {
      const session = await this.sessions.lock(tx, sessionId);
      if (!session) throw notFound();
      await this.sessions.update(tx, sessionId, { removedAt: new Date() });
      await this.history.note(tx, member, {
        what: 'session.removed',
        subjectId: sessionId,
        before: { title: session.title },
      });
      await announceSession(tx, sessionId);
    });
  }

  async present(db: Database, member: Member, sessionId: string): Promise<Session> {
    const stored = await this.evenings.load(db, sessionId);
    if (!stored) throw notFound();
    const { updatedBy } = stored.session;
    return presentSession(stored, member, updatedBy && (await this.accounts.displayName(db, updatedBy)));
  }

  /** For the live console: held until the transaction ends. */
  lock(db: Database, sessionId: string): Promise<SessionRow | null> {
    return this.sessions.lock(db, sessionId);
  }

  /** For the live console: where the evening stands. The caller announces it. */
  async setProgress(
    db: Database,
    sessionId: string,
    values: { status: SessionRow['status']; progress: Progress | null; finishedAt: Date | null },
  ): Promise<void> {
    await this.sessions.update(db, sessionId, values);
  }

  /** For the record: the circle's evenings that were begun, by id; removed ones are left out. */
  async begun(
    db: Database,
    circleId: string,
  ): Promise<Map<string, Pick<SessionRow, 'title' | 'startsAt' | 'timeZone'>>> {
    const rows = await this.sessions.begun(db, circleId);
    return new Map(rows.map(({ id, ...evening }) => [id, evening]));
  }

  private async insert(db: Database, values: Omit<NewSession, 'code'>): Promise<SessionRow> {
    for (;;) {
      const row = await this.sessions.insert(db, { ...values, code: makeCode() });
      if (row) return row;
    }
  }
}

/** What the body said, beside what was there. Seats are told as they became: they are rows of their own. */
function changeOf(row: SessionRow, values: Partial<NewSession>, seats: object | null) {
  const before = Object.fromEntries(
    Object.entries(row).filter(([name]) => name === 'title' || name in values),
  );
  return { before, after: { title: row.title, ...values, ...seats } };
}

/** The row's fields that the body names, read; everything that cannot be is told with its place. */
function readFields(body: UpdateSession): {
  values: Partial<NewSession>;
  chairs: readonly { kind: string; count: number }[] | null;
} {
  const errors: FieldError[] = [];
  const values: Partial<NewSession> = {};
  if (body.startsAt !== undefined && body.timeZone !== undefined) {
    const time = startTime(body.startsAt, body.timeZone);
    if (time) Object.assign(values, time, { timeZone: body.timeZone });
    else errors.push({ path: 'startsAt', message: 'There is no such date.' });
  }
  const { title, place, notes, goal, spacedRhythms } = body;
  Object.assign(
    values,
    Object.fromEntries(
      Object.entries({ title, place, notes, goal, spacedRhythms }).filter(([, value]) => value !== undefined),
    ),
  );
  if (body.openings) {
    const openings = readOpenings(body.openings);
    errors.push(...openings.errors);
    values.openings = openings.openings;
  }
  const chairs = body.chairs ? readChairs(body.chairs) : null;
  errors.push(...(chairs?.errors ?? []));
  if (errors.length > 0) throw cannotBe(errors);
  return { values, chairs: chairs && chairs.chairs.map(({ kind, count }) => ({ kind: kind.id, count })) };
}
