import { Injectable } from '@nestjs/common';
import { and, asc, eq, isNull, lt, lte, sql } from 'drizzle-orm';
import type { Database } from '../database/database';
import { mails } from './mail.table';

export type MailRow = typeof mails.$inferSelect;

@Injectable()
export class MailRepository {
  async insert(db: Database, values: typeof mails.$inferInsert): Promise<void> {
    await db.insert(mails).values(values);
  }

  /** Takes one that is due and holds it until the transaction ends, also by the death of this process. */
  async claimDue(tx: Database): Promise<MailRow | null> {
    const [row] = await tx
      .select()
      .from(mails)
      .where(and(isNull(mails.doneAt), lte(mails.dueAt, sql`now()`)))
      .orderBy(asc(mails.dueAt))
      .limit(1)
      .for('update', { skipLocked: true });
    return row ?? null;
  }

  /** Nobody's address stays here longer than it is needed. */
  async done(tx: Database, mailId: string): Promise<void> {
    await tx.update(mails).set({ doneAt: new Date(), details: {} }).where(eq(mails.id, mailId));
  }

  async later(tx: Database, mailId: string, tries: number, waitMs: number): Promise<void> {
    const dueAt = sql`now() + ${waitMs}::int * interval '1 millisecond'`;
    await tx.update(mails).set({ tries, dueAt }).where(eq(mails.id, mailId));
  }

  async removeDone(db: Database, before: Date): Promise<void> {
    await db.delete(mails).where(lt(mails.doneAt, before));
  }
}
