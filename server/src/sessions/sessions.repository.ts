import { Injectable } from '@nestjs/common';
import { and, asc, count, desc, eq, isNull, ne, sql } from 'drizzle-orm';
import type { PageQuery } from '@pegwell/shared/contract/page';
import type { Database } from '../database/database';
import { entries, seats, sessions, sessionSets } from './sessions.table';

export type SessionRow = typeof sessions.$inferSelect;
export type NewSession = typeof sessions.$inferInsert;
export interface ChairCount {
  readonly kind: string;
  readonly count: number;
}

@Injectable()
export class SessionsRepository {
  /** Null when the code is taken (one in a billion): try another. */
  async insert(db: Database, values: NewSession): Promise<SessionRow | null> {
    const [row] = await db
      .insert(sessions)
      .values(values)
      .onConflictDoNothing({ target: sessions.code })
      .returning();
    return row ?? null;
  }

  async byId(db: Database, sessionId: string): Promise<SessionRow | null> {
    const [row] = await db
      .select()
      .from(sessions)
      .where(and(eq(sessions.id, sessionId), isNull(sessions.removedAt)));
    return row ?? null;
  }

  /** The same, held until the transaction ends: whoever changes an evening does it one after the other. */
  async lock(db: Database, sessionId: string): Promise<SessionRow | null> {
    const [row] = await db
      .select()
      .from(sessions)
      .where(and(eq(sessions.id, sessionId), isNull(sessions.removedAt)))
      .for('update');
    return row ?? null;
  }

  async byCode(db: Database, code: string): Promise<SessionRow | null> {
    const [row] = await db
      .select()
      .from(sessions)
      .where(and(eq(sessions.code, code), isNull(sessions.removedAt)));
    return row ?? null;
  }

  async update(db: Database, sessionId: string, values: Partial<NewSession>): Promise<void> {
    if (Object.keys(values).length > 0)
      await db.update(sessions).set(values).where(eq(sessions.id, sessionId));
  }

  async page(db: Database, circleId: string, { page, pageSize }: PageQuery) {
    const mine = and(eq(sessions.circleId, circleId), isNull(sessions.removedAt));
    const [total] = await db.select({ count: count() }).from(sessions).where(mine);
    // A condition of its own keeps its columns' tables; bare in the template they would lose them.
    const standing = (table: typeof entries | typeof sessionSets) =>
      and(eq(table.sessionId, sessions.id), isNull(table.removedAt));
    const items = await db
      .select({
        session: sessions,
        tunes: sql<number>`(select count(*)::int from ${entries} where ${standing(entries)})`,
        sets: sql<number>`(select count(*)::int from ${sessionSets} where ${standing(sessionSets)})`,
      })
      .from(sessions)
      .where(mine)
      .orderBy(desc(sessions.startsAt), asc(sessions.id))
      .limit(pageSize)
      .offset((page - 1) * pageSize);
    return { total: total?.count ?? 0, items };
  }

  /** Evenings that were begun: for the record of what was played. */
  async begun(db: Database, circleId: string) {
    const { id, title, startsAt, timeZone } = sessions;
    return db
      .select({ id, title, startsAt, timeZone })
      .from(sessions)
      .where(
        and(eq(sessions.circleId, circleId), isNull(sessions.removedAt), ne(sessions.status, 'planned')),
      );
  }

  /** The seats that retune, counted by kind. */
  async chairs(db: Database, sessionId: string): Promise<ChairCount[]> {
    return db
      .select({ kind: seats.kind, count: count() })
      .from(seats)
      .where(and(eq(seats.sessionId, sessionId), eq(seats.retunes, true)))
      .groupBy(seats.kind)
      .orderBy(asc(seats.kind));
  }

  async replaceSeats(db: Database, sessionId: string, chairs: readonly ChairCount[]): Promise<void> {
    await db.delete(seats).where(eq(seats.sessionId, sessionId));
    const rows = chairs.flatMap(({ kind, count: seatsOfKind }) =>
      Array.from({ length: seatsOfKind }, () => ({ sessionId, kind })),
    );
    if (rows.length > 0) await db.insert(seats).values(rows);
  }
}
