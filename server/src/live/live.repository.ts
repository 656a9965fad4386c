import { Injectable } from '@nestjs/common';
import type { LiveState } from '@pegwell/shared/contract/live';
import { and, eq } from 'drizzle-orm';
import { followVersions } from '../common/follow-version.table';
import type { Database } from '../database/database';
import { liveActions, liveStates } from './live.table';

export type LiveRow = typeof liveStates.$inferSelect;

@Injectable()
export class LiveRepository {
  /** Null before the first step. */
  async state(db: Database, sessionId: string): Promise<LiveRow | null> {
    const [row] = await db.select().from(liveStates).where(eq(liveStates.sessionId, sessionId));
    return row ?? null;
  }

  async write(db: Database, row: LiveRow): Promise<void> {
    const { sessionId: _, ...values } = row;
    await db.insert(liveStates).values(row).onConflictDoUpdate({ target: liveStates.sessionId, set: values });
  }

  /** The first answer to an action that was sent before. */
  async answerTo(db: Database, sessionId: string, actionId: string): Promise<LiveState | null> {
    const [row] = await db
      .select({ answer: liveActions.answer })
      .from(liveActions)
      .where(and(eq(liveActions.sessionId, sessionId), eq(liveActions.actionId, actionId)));
    return row?.answer ?? null;
  }

  async keepAnswer(db: Database, sessionId: string, actionId: string, answer: LiveState): Promise<void> {
    await db.insert(liveActions).values({ sessionId, actionId, answer });
  }

  /** What phones have seen; 0 where nothing was ever announced. */
  async followVersion(db: Database, sessionId: string): Promise<number> {
    const [row] = await db
      .select({ version: followVersions.version })
      .from(followVersions)
      .where(eq(followVersions.sessionId, sessionId));
    return row?.version ?? 0;
  }
}
