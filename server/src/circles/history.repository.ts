import { Injectable } from '@nestjs/common';
import { and, count, desc, eq, sql } from 'drizzle-orm';
import type { EventKind } from '@pegwell/shared/contract/history';
import type { PageQuery } from '@pegwell/shared/contract/page';
import type { Database } from '../database/database';
import { events } from './circles.table';

const { before, after } = events;
/** Titles of tunes and evenings, names of circles, as they were when it happened. */
const TITLE = sql<
  string | null
>`coalesce(${after}->>'title', ${before}->>'title', ${after}->>'name', ${before}->>'name')`;
/** The fields that differ. Only where there was a before: everything of a new tune is new. */
const CHANGED = sql<
  string[]
>`case when jsonb_typeof(${before}) = 'object' and jsonb_typeof(${after}) = 'object' then
  array(select field.key from jsonb_each(${after}) as field
        where ${before}->field.key is distinct from field.value order by field.key) else '{}' end`;
const lengthOf = (field: 'created' | 'updated') =>
  sql<number>`case when jsonb_typeof(${after}->'${sql.raw(field)}') = 'array'
    then jsonb_array_length(${after}->'${sql.raw(field)}') else 0 end`;

/** An event as it is stored, for whoever undoes it. */
export interface PastEvent {
  readonly at: Date;
  readonly before: unknown;
  readonly after: unknown;
}

@Injectable()
export class HistoryRepository {
  async insert(
    db: Database,
    values: typeof events.$inferInsert & { readonly what: EventKind },
  ): Promise<void> {
    await db.insert(events).values(values);
  }

  async last(db: Database, circleId: string, what: EventKind, subjectId: string): Promise<PastEvent | null> {
    const [event] = await db
      .select({ at: events.at, before: events.before, after: events.after })
      .from(events)
      .where(and(eq(events.circleId, circleId), eq(events.what, what), eq(events.subjectId, subjectId)))
      .orderBy(desc(events.at))
      .limit(1);
    return event ?? null;
  }

  /** Newest first. The stored before and after stay behind: of an import they are thousands of tunes. */
  async page(db: Database, circleId: string, { page, pageSize }: PageQuery) {
    const ours = eq(events.circleId, circleId);
    const [total] = await db.select({ count: count() }).from(events).where(ours);
    const { id, accountId, at, what, subjectId } = events;
    const items = await db
      .select({
        ...{ id, accountId, at, what, subjectId },
        title: TITLE,
        changed: CHANGED,
        role: sql<string | null>`${after}->>'role'`,
        created: lengthOf('created'),
        updated: lengthOf('updated'),
      })
      .from(events)
      .where(ours)
      .orderBy(desc(at), desc(id))
      .limit(pageSize)
      .offset((page - 1) * pageSize);
    return { total: total?.count ?? 0, items };
  }
}
