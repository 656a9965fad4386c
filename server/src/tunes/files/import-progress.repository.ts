import { Injectable } from '@nestjs/common';
import { and, desc, eq, gt, lt, sql } from 'drizzle-orm';
import {
  importReportSchema,
  type ImportProgress,
  type ImportReport,
  type RecentImports,
} from '@pegwell/shared/contract/tunes';
import type { Database } from '../../database/database';
import { imports } from '../tunes.table';

/** How far imports are, and what became of them. */
@Injectable()
export class ImportProgressRepository {
  /**
   * Handed the pool and not a transaction, as `move` is, or nobody could watch. Rows of yesterday go.
   * @returns false when the id stands for another circle's import, or for another file
   */
  async start(db: Database, circleId: string, id: string, digest: string, total: number): Promise<boolean> {
    const dayAgo = sql`now() - interval '1 day'`;
    await db.delete(imports).where(and(eq(imports.circleId, circleId), lt(imports.createdAt, dayAgo)));
    await db.insert(imports).values({ id, circleId, digest, total }).onConflictDoNothing();
    const [row] = await db.select().from(imports).where(eq(imports.id, id));
    return row?.circleId === circleId && row.digest === digest;
  }

  async move(db: Database, id: string, total: number, written: number): Promise<void> {
    await db.update(imports).set({ total, written }).where(eq(imports.id, id));
  }

  /** In the import's own transaction: an import that is finished is one whose tunes are there. */
  async finish(db: Database, id: string, report: ImportReport): Promise<void> {
    await db
      .update(imports)
      .set({ report, finishedAt: sql`now()` })
      .where(eq(imports.id, id));
  }

  /** What became of it; null while it is not finished. */
  async reportOf(db: Database, id: string): Promise<ImportReport | null> {
    const [row] = await db.select({ report: imports.report }).from(imports).where(eq(imports.id, id));
    return row?.report ? importReportSchema.parse(row.report) : null;
  }

  async markUndone(db: Database, id: string): Promise<void> {
    await db
      .update(imports)
      .set({ report: sql`${imports.report} || '{"undone": true}'` })
      .where(eq(imports.id, id));
  }

  /** Of the last day, newest first: what changed something, and was not undone. */
  async recent(db: Database, circleId: string): Promise<RecentImports['items']> {
    const { id, finishedAt, report } = imports;
    const countOf = (field: string) => sql<number>`(${report}->>${field})::int`;
    const rows = await db
      .select({
        ...{ id, at: finishedAt, created: countOf('created'), updated: countOf('updated') },
        format: sql<RecentImports['items'][number]['format']>`${report}->>'format'`,
      })
      .from(imports)
      .where(
        and(
          eq(imports.circleId, circleId),
          gt(finishedAt, sql`now() - interval '1 day'`),
          sql`not coalesce((${report}->>'undone')::boolean, false)`,
          sql`${countOf('created')} + ${countOf('updated')} > 0`,
        ),
      )
      .orderBy(desc(finishedAt));
    return rows.map(({ at, ...row }) => ({ ...row, at: at?.toISOString() ?? '' }));
  }

  /** An import that failed leaves its id free. */
  async forget(db: Database, id: string): Promise<void> {
    await db.delete(imports).where(eq(imports.id, id));
  }

  async byId(db: Database, circleId: string, id: string): Promise<ImportProgress | null> {
    const [row] = await db
      .select()
      .from(imports)
      .where(and(eq(imports.circleId, circleId), eq(imports.id, id)));
    return row ? { total: row.total, written: row.written, finished: row.finishedAt !== null } : null;
  }
}
