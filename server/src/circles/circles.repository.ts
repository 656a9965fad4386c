import { Injectable } from '@nestjs/common';
import { and, asc, count, eq, isNotNull, isNull } from 'drizzle-orm';
import type { Role } from '@pegwell/shared/contract/circles';
import type { PageQuery } from '@pegwell/shared/contract/page';
import type { Database } from '../database/database';
import { circles, members, usualTunings } from './circles.table';

export type CircleRow = typeof circles.$inferSelect;
export type UsualTuningRow = typeof usualTunings.$inferSelect;

@Injectable()
export class CirclesRepository {
  async insert(db: Database, values: typeof circles.$inferInsert): Promise<CircleRow> {
    const [row] = await db.insert(circles).values(values).returning();
    if (!row) throw new Error('a circle was not stored');
    return row;
  }

  async byId(db: Database, circleId: string): Promise<CircleRow | null> {
    const [row] = await db
      .select()
      .from(circles)
      .where(and(eq(circles.id, circleId), isNull(circles.removedAt)));
    return row ?? null;
  }

  async ofAccount(db: Database, accountId: string): Promise<{ id: string; name: string; role: Role }[]> {
    return db
      .select({ id: circles.id, name: circles.name, role: members.role })
      .from(members)
      .innerJoin(circles, eq(circles.id, members.circleId))
      .where(and(eq(members.accountId, accountId), isNull(members.removedAt), isNull(circles.removedAt)))
      .orderBy(asc(circles.name), asc(circles.id));
  }

  async roleOf(db: Database, circleId: string, accountId: string): Promise<Role | null> {
    const [row] = await db
      .select({ role: members.role })
      .from(members)
      .innerJoin(circles, eq(circles.id, members.circleId))
      .where(
        and(
          eq(members.circleId, circleId),
          eq(members.accountId, accountId),
          isNull(members.removedAt),
          isNull(circles.removedAt),
        ),
      );
    return row?.role ?? null;
  }

  /** False when the account is a member already. A member who left comes back in the new role. */
  async addMember(db: Database, circleId: string, accountId: string, role: Role): Promise<boolean> {
    const rows = await db
      .insert(members)
      .values({ circleId, accountId, role })
      .onConflictDoUpdate({
        target: [members.circleId, members.accountId],
        set: { role, removedAt: null, joinedAt: new Date() },
        setWhere: isNotNull(members.removedAt),
      })
      .returning({ accountId: members.accountId });
    return rows.length === 1;
  }

  /** The circle's hosts, held until the transaction ends. */
  async holdHosts(db: Database, circleId: string): Promise<{ accountId: string }[]> {
    return db
      .select({ accountId: members.accountId })
      .from(members)
      .where(and(eq(members.circleId, circleId), eq(members.role, 'host'), isNull(members.removedAt)))
      .orderBy(asc(members.accountId))
      .for('update');
  }

  async setRole(db: Database, circleId: string, accountId: string, role: Role): Promise<void> {
    await db.update(members).set({ role }).where(thatMember(circleId, accountId));
  }

  async removeMember(db: Database, circleId: string, accountId: string): Promise<void> {
    await db.update(members).set({ removedAt: new Date() }).where(thatMember(circleId, accountId));
  }

  /** Who is in, in the order of joining. */
  async members(db: Database, circleId: string, { page, pageSize }: PageQuery) {
    const present = and(eq(members.circleId, circleId), isNull(members.removedAt));
    const [total] = await db.select({ count: count() }).from(members).where(present);
    const items = await db
      .select({ accountId: members.accountId, role: members.role })
      .from(members)
      .where(present)
      .orderBy(asc(members.joinedAt), asc(members.accountId))
      .limit(pageSize)
      .offset((page - 1) * pageSize);
    return { total: total?.count ?? 0, items };
  }

  async usualTunings(db: Database, circleId: string): Promise<UsualTuningRow[]> {
    return db.select().from(usualTunings).where(eq(usualTunings.circleId, circleId));
  }

  async replaceUsualTunings(
    db: Database,
    circleId: string,
    rows: (typeof usualTunings.$inferInsert)[],
  ): Promise<void> {
    await db.delete(usualTunings).where(eq(usualTunings.circleId, circleId));
    if (rows.length > 0) await db.insert(usualTunings).values(rows);
  }
}

function thatMember(circleId: string, accountId: string) {
  return and(eq(members.circleId, circleId), eq(members.accountId, accountId), isNull(members.removedAt));
}
