import { Injectable } from '@nestjs/common';
import { and, asc, eq, isNull, ne } from 'drizzle-orm';
import type { Database } from '../database/database';
import { circles, events, members } from './circles.table';

@Injectable()
export class DepartureRepository {
  /** Whether anybody but this account is in the circle. */
  async hasOthers(db: Database, circleId: string, accountId: string): Promise<boolean> {
    const rows = await db
      .select({ accountId: members.accountId })
      .from(members)
      .where(and(eq(members.circleId, circleId), ne(members.accountId, accountId), isNull(members.removedAt)))
      .limit(1);
    return rows.length > 0;
  }

  /** Marks a circle as removed. */
  async removeCircle(db: Database, circleId: string): Promise<void> {
    await db.update(circles).set({ removedAt: new Date() }).where(eq(circles.id, circleId));
  }

  /** Every membership there was, also of circles that were left. */
  async memberships(db: Database, accountId: string) {
    return db
      .select({
        id: circles.id,
        name: circles.name,
        role: members.role,
        joinedAt: members.joinedAt,
        leftAt: members.removedAt,
      })
      .from(members)
      .innerJoin(circles, eq(circles.id, members.circleId))
      .where(eq(members.accountId, accountId))
      .orderBy(asc(members.joinedAt), asc(circles.id));
  }

  /** What the account did in circles: when and what, not the tunes themselves. */
  async deeds(db: Database, accountId: string) {
    const { circleId, at, what, subjectId } = events;
    return db
      .select({ circleId, at, what, subjectId })
      .from(events)
      .where(eq(events.accountId, accountId))
      .orderBy(asc(at), asc(events.id));
  }
}
