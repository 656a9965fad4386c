import { Injectable } from '@nestjs/common';
import { asc, eq } from 'drizzle-orm';
import type { Database } from '../database/database';
import { boardVersions, seats, sessions } from './sessions.table';

@Injectable()
export class EveningTracesRepository {
  async seats(db: Database, accountId: string) {
    return db
      .select({ evening: sessions.title, startsAt: sessions.startsAt, kind: seats.kind })
      .from(seats)
      .innerJoin(sessions, eq(sessions.id, seats.sessionId))
      .where(eq(seats.accountId, accountId))
      .orderBy(asc(sessions.startsAt), asc(seats.id));
  }

  async boardsSaved(db: Database, accountId: string) {
    return db
      .select({ evening: sessions.title, version: boardVersions.version, savedAt: boardVersions.savedAt })
      .from(boardVersions)
      .innerJoin(sessions, eq(sessions.id, boardVersions.sessionId))
      .where(eq(boardVersions.savedBy, accountId))
      .orderBy(asc(boardVersions.savedAt), asc(boardVersions.version));
  }
}
