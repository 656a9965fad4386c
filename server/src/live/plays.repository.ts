import { Injectable } from '@nestjs/common';
import type { PageQuery } from '@pegwell/shared/contract/page';
import { and, asc, count, desc, eq, inArray, isNull } from 'drizzle-orm';
import type { Database } from '../database/database';
import { plays } from './live.table';

export type PlayRow = typeof plays.$inferSelect;
export type NewPlay = typeof plays.$inferInsert;

/** What was really played. At most one play of a session is under way: the one without an end. */
@Injectable()
export class PlaysRepository {
  async ofSession(db: Database, sessionId: string): Promise<PlayRow[]> {
    return db.select().from(plays).where(eq(plays.sessionId, sessionId)).orderBy(asc(plays.calledAt));
  }

  /** Newest first, over these evenings. */
  async page(db: Database, sessionIds: readonly string[], { page, pageSize }: PageQuery) {
    if (sessionIds.length === 0) return { total: 0, items: [] };
    const mine = inArray(plays.sessionId, [...sessionIds]);
    const [total] = await db.select({ count: count() }).from(plays).where(mine);
    const items = await db
      .select()
      .from(plays)
      .where(mine)
      .orderBy(desc(plays.calledAt), asc(plays.id))
      .limit(pageSize)
      .offset((page - 1) * pageSize);
    return { total: total?.count ?? 0, items };
  }

  async current(db: Database, sessionId: string): Promise<PlayRow | null> {
    const [row] = await db.select().from(plays).where(underWay(sessionId));
    return row ?? null;
  }

  async begin(db: Database, play: NewPlay): Promise<void> {
    await db.insert(plays).values(play);
  }

  /** Everyone is in tune. A play that was under way already keeps its time. */
  async inTune(db: Database, sessionId: string, playingAt: Date): Promise<void> {
    await db
      .update(plays)
      .set({ playingAt })
      .where(and(underWay(sessionId), isNull(plays.playingAt)));
  }

  async end(db: Database, sessionId: string, endedAt: Date): Promise<void> {
    await db.update(plays).set({ endedAt }).where(underWay(sessionId));
  }

  /** The tune was called by mistake: it was not played. */
  async withdraw(db: Database, sessionId: string): Promise<void> {
    await db.delete(plays).where(underWay(sessionId));
  }

  /** The tune before goes on as if it had not ended. False where it was another one. */
  async goOn(db: Database, sessionId: string, entryId: string): Promise<boolean> {
    const [last] = await db
      .select()
      .from(plays)
      .where(eq(plays.sessionId, sessionId))
      .orderBy(desc(plays.calledAt))
      .limit(1);
    if (last?.entryId !== entryId) return false;
    await db.update(plays).set({ endedAt: null }).where(eq(plays.id, last.id));
    return true;
  }
}

const underWay = (sessionId: string) => and(eq(plays.sessionId, sessionId), isNull(plays.endedAt));
