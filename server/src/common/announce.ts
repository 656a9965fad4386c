import { sql } from 'drizzle-orm';
import type { Database } from '../database/database';

/** The channel on which every server process listens; the payload is `sessionId version`. */
export const FOLLOW_CHANNEL = 'pegwell_follow';

/**
 * Says that phones following this evening have something new to see. Called in the transaction that
 * makes the change: the version and the word go out with the commit, or not at all.
 */
export async function announceSession(db: Database, sessionId: string): Promise<void> {
  await db.execute(sql`
    with risen as (
      insert into follow_versions (session_id, version) values (${sessionId}, 1)
      on conflict (session_id) do update set version = follow_versions.version + 1
      returning session_id, version)
    select pg_notify(${FOLLOW_CHANNEL}, session_id || ' ' || version) from risen`);
}

/** The same for every evening of a circle that is not over: a tune or a usual tuning changed. */
export async function announceCircle(db: Database, circleId: string): Promise<void> {
  await db.execute(sql`
    with risen as (
      update follow_versions set version = follow_versions.version + 1
      where session_id in (
        select id from sessions where circle_id = ${circleId} and status <> 'finished' and removed_at is null)
      returning session_id, version)
    select pg_notify(${FOLLOW_CHANNEL}, session_id || ' ' || version) from risen`);
}
