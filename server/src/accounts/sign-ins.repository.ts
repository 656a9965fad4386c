import { Injectable } from '@nestjs/common';
import { and, desc, eq, gt, isNull, lt, ne, or } from 'drizzle-orm';
import type { Database } from '../database/database';
import { accounts, signIns } from './accounts.table';
import type { AccountRow } from './accounts.repository';

export type SignInRow = typeof signIns.$inferSelect;

@Injectable()
export class SignInsRepository {
  async insert(db: Database, accountId: string, userAgent: string | null): Promise<SignInRow> {
    const [row] = await db.insert(signIns).values({ accountId, userAgent }).returning();
    if (!row) throw new Error('a sign-in was not stored');
    return row;
  }

  /** The sign-in with its account, unless it was ended. */
  async open(db: Database, signInId: string): Promise<{ signIn: SignInRow; account: AccountRow } | null> {
    const [row] = await db
      .select({ signIn: signIns, account: accounts })
      .from(signIns)
      .innerJoin(accounts, eq(accounts.id, signIns.accountId))
      .where(and(eq(signIns.id, signInId), isNull(signIns.endedAt)));
    return row ?? null;
  }

  /** Those of an account that were not ended and whose cookie still lives, the last used first. */
  async openOf(db: Database, accountId: string, renewedAfter: Date): Promise<SignInRow[]> {
    return db
      .select()
      .from(signIns)
      .where(
        and(eq(signIns.accountId, accountId), isNull(signIns.endedAt), gt(signIns.renewedAt, renewedAfter)),
      )
      .orderBy(desc(signIns.usedAt), desc(signIns.id));
  }

  /** All that are kept of an account, ended ones too, the newest first. */
  async allOf(db: Database, accountId: string): Promise<SignInRow[]> {
    return db
      .select()
      .from(signIns)
      .where(eq(signIns.accountId, accountId))
      .orderBy(desc(signIns.createdAt), desc(signIns.id));
  }

  /** Only the first of two that renew at once changes the row; the answer says whether it was this one. */
  async renew(db: Database, signInId: string, generation: number): Promise<boolean> {
    const rows = await db
      .update(signIns)
      .set({ generation: generation + 1, renewedAt: new Date() })
      .where(and(eq(signIns.id, signInId), eq(signIns.generation, generation), isNull(signIns.endedAt)))
      .returning({ id: signIns.id });
    return rows.length === 1;
  }

  /** Notes that it was used, where the last note is older. */
  async touch(db: Database, signInId: string, notedBefore: Date): Promise<void> {
    await db
      .update(signIns)
      .set({ usedAt: new Date() })
      .where(and(eq(signIns.id, signInId), lt(signIns.usedAt, notedBefore)));
  }

  async end(db: Database, signInId: string): Promise<void> {
    await db
      .update(signIns)
      .set({ endedAt: new Date() })
      .where(and(eq(signIns.id, signInId), isNull(signIns.endedAt)));
  }

  /** False when the account has no such sign-in open. */
  async endOf(db: Database, accountId: string, signInId: string): Promise<boolean> {
    const rows = await db
      .update(signIns)
      .set({ endedAt: new Date() })
      .where(and(eq(signIns.id, signInId), eq(signIns.accountId, accountId), isNull(signIns.endedAt)))
      .returning({ id: signIns.id });
    return rows.length === 1;
  }

  /** Forgets those of an account that ended, or could last be renewed, before a day. */
  async removeOver(db: Database, accountId: string, before: Date): Promise<void> {
    await db
      .delete(signIns)
      .where(
        and(eq(signIns.accountId, accountId), or(lt(signIns.endedAt, before), lt(signIns.renewedAt, before))),
      );
  }

  /** @param keep the one that goes on, if any */
  async endAllOf(db: Database, accountId: string, keep: string | null): Promise<void> {
    await db
      .update(signIns)
      .set({ endedAt: new Date() })
      .where(
        and(
          eq(signIns.accountId, accountId),
          isNull(signIns.endedAt),
          ...(keep === null ? [] : [ne(signIns.id, keep)]),
        ),
      );
  }
}
