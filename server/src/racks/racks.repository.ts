import { Injectable } from '@nestjs/common';
import { and, asc, count, eq } from 'drizzle-orm';
import type { Database } from '../database/database';
import { racks } from './racks.table';

export type RackRow = typeof racks.$inferSelect;
export type RackContent = Pick<RackRow, 'player' | 'kind' | 'arrivals'>;

@Injectable()
export class RacksRepository {
  async ofSession(db: Database, sessionId: string): Promise<RackRow[]> {
    return db
      .select()
      .from(racks)
      .where(eq(racks.sessionId, sessionId))
      .orderBy(asc(racks.createdAt), asc(racks.id));
  }

  async count(db: Database, sessionId: string): Promise<number> {
    const [row] = await db.select({ count: count() }).from(racks).where(eq(racks.sessionId, sessionId));
    return row?.count ?? 0;
  }

  /** Held until the transaction ends. */
  async lock(db: Database, sessionId: string, rackId: string): Promise<RackRow | null> {
    const [row] = await db.select().from(racks).where(one(sessionId, rackId)).for('update');
    return row ?? null;
  }

  async insert(db: Database, sessionId: string, content: RackContent): Promise<RackRow> {
    const [row] = await db
      .insert(racks)
      .values({ sessionId, ...content })
      .returning();
    if (!row) throw new Error('an insert gives its row');
    return row;
  }

  async update(db: Database, { id, version }: RackRow, content: RackContent): Promise<RackRow> {
    const [row] = await db
      .update(racks)
      .set({ ...content, version: version + 1 })
      .where(eq(racks.id, id))
      .returning();
    if (!row) throw new Error('a locked row is there');
    return row;
  }

  /** False where it was not there. */
  async remove(db: Database, sessionId: string, rackId: string): Promise<boolean> {
    const gone = await db.delete(racks).where(one(sessionId, rackId)).returning({ id: racks.id });
    return gone.length > 0;
  }
}

/** Of this session: an id of another evening is not there. */
const one = (sessionId: string, rackId: string) => and(eq(racks.id, rackId), eq(racks.sessionId, sessionId));
