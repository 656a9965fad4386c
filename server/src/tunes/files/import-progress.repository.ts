import { Injectable } from '@nestjs/common';
import { and, eq, lt, sql } from 'drizzle-orm';
import type { ImportProgress } from '@pegwell/shared/contract/tunes';
import type { Database } from '../../database/database';
import { imports } from '../tunes.table';

/** How far imports are. Handed the pool and not a transaction, or nobody could watch. */
@Injectable()
export class ImportProgressRepository {
  /** False when the id was used before. Rows that nobody watches any more go. */
  async start(db: Database, circleId: string, id: string, total: number): Promise<boolean> {
    const dayAgo = sql`now() - interval '1 day'`;
    await db.delete(imports).where(and(eq(imports.circleId, circleId), lt(imports.createdAt, dayAgo)));
    const rows = await db
      .insert(imports)
      .values({ id, circleId, total })
      .onConflictDoNothing()
      .returning({ id: imports.id });
    return rows.length === 1;
  }

  async move(db: Database, id: string, total: number, written: number): Promise<void> {
    await db.update(imports).set({ total, written }).where(eq(imports.id, id));
  }

  async finish(db: Database, id: string): Promise<void> {
    await db
      .update(imports)
      .set({ finishedAt: sql`now()` })
      .where(eq(imports.id, id));
  }

  async byId(db: Database, circleId: string, id: string): Promise<ImportProgress | null> {
    const [row] = await db
      .select()
      .from(imports)
      .where(and(eq(imports.circleId, circleId), eq(imports.id, id)));
    return row ? { total: row.total, written: row.written, finished: row.finishedAt !== null } : null;
  }
}
