import { Injectable } from '@nestjs/common';
import { and, asc, eq, inArray, isNull, notInArray, sql } from 'drizzle-orm';
import type { Database } from '../database/database';
import { boardVersions, entries, sessionSets, type StoredBoard, type StoredEntry } from './sessions.table';

export type StoredSet = StoredBoard['sets'][number];

@Injectable()
export class BoardRepository {
  async sets(db: Database, sessionId: string): Promise<StoredSet[]> {
    const setRows = await db
      .select()
      .from(sessionSets)
      .where(and(eq(sessionSets.sessionId, sessionId), isNull(sessionSets.removedAt)))
      .orderBy(asc(sessionSets.position));
    const entryRows = await db
      .select()
      .from(entries)
      .where(and(eq(entries.sessionId, sessionId), isNull(entries.removedAt)))
      .orderBy(asc(entries.position));
    return setRows.map(({ id, title }) => ({
      id,
      title,
      entries: entryRows.filter((entry) => entry.setId === id).map(toEntry),
    }));
  }

  /** Entries with these ids, of any session and removed ones too: an id says what it was. */
  async entriesByIds(
    db: Database,
    ids: readonly string[],
  ): Promise<Map<string, StoredEntry & { sessionId: string }>> {
    if (ids.length === 0) return new Map();
    const rows = await db
      .select()
      .from(entries)
      .where(inArray(entries.id, [...ids]));
    return new Map(rows.map((row) => [row.id, { ...toEntry(row), sessionId: row.sessionId }]));
  }

  /** Sets with these ids, of any session and removed ones too. */
  async setsByIds(
    db: Database,
    ids: readonly string[],
  ): Promise<Map<string, { sessionId: string; title: string }>> {
    if (ids.length === 0) return new Map();
    const rows = await db
      .select()
      .from(sessionSets)
      .where(inArray(sessionSets.id, [...ids]));
    return new Map(rows.map(({ id, sessionId, title }) => [id, { sessionId, title }]));
  }

  /** Writes the rows of the board as they should be; what is not on it is marked removed. */
  async write(db: Database, sessionId: string, sets: readonly StoredSet[]): Promise<void> {
    const setIds = sets.map(({ id }) => id);
    const entryRows = sets.flatMap((set) =>
      set.entries.map((entry, position) => ({
        ...entry,
        sitOut: [...entry.sitOut],
        sessionId,
        setId: set.id,
        position,
        removedAt: null,
      })),
    );
    if (sets.length > 0) {
      await db
        .insert(sessionSets)
        .values(sets.map(({ id, title }, position) => ({ id, title, sessionId, position, removedAt: null })))
        .onConflictDoUpdate({
          target: sessionSets.id,
          set: { title: sql`excluded.title`, position: sql`excluded.position`, removedAt: null },
        });
    }
    if (entryRows.length > 0) {
      await db
        .insert(entries)
        .values(entryRows)
        .onConflictDoUpdate({
          target: entries.id,
          set: {
            setId: sql`excluded.set_id`,
            position: sql`excluded.position`,
            tuneId: sql`excluded.tune_id`,
            settingId: sql`excluded.setting_id`,
            open: sql`excluded.open`,
            pinned: sql`excluded.pinned`,
            sitOut: sql`excluded.sit_out`,
            removedAt: null,
          },
        });
    }
    const removedAt = new Date();
    const entryIds = entryRows.map(({ id }) => id);
    await db
      .update(entries)
      .set({ removedAt })
      .where(
        and(
          eq(entries.sessionId, sessionId),
          isNull(entries.removedAt),
          entryIds.length > 0 ? notInArray(entries.id, entryIds) : undefined,
        ),
      );
    await db
      .update(sessionSets)
      .set({ removedAt })
      .where(
        and(
          eq(sessionSets.sessionId, sessionId),
          isNull(sessionSets.removedAt),
          setIds.length > 0 ? notInArray(sessionSets.id, setIds) : undefined,
        ),
      );
  }

  async keepVersion(
    db: Database,
    sessionId: string,
    version: number,
    savedBy: string | null,
    board: StoredBoard,
  ): Promise<void> {
    await db.insert(boardVersions).values({ sessionId, version, savedBy, board });
  }
}

function toEntry(row: typeof entries.$inferSelect): StoredEntry {
  const { id, tuneId, settingId, open, pinned, sitOut } = row;
  return { id, tuneId, settingId, open, pinned, sitOut };
}
