import { Injectable } from '@nestjs/common';
import { and, eq, inArray, isNull } from 'drizzle-orm';
import type { Database } from '../database/database';
import { accounts, signIns } from './accounts.table';

export type AccountRow = typeof accounts.$inferSelect;
export type SignInRow = typeof signIns.$inferSelect;

@Injectable()
export class AccountsRepository {
  /** Null when the address is taken. */
  async insert(db: Database, values: typeof accounts.$inferInsert): Promise<AccountRow | null> {
    const [row] = await db
      .insert(accounts)
      .values(values)
      .onConflictDoNothing({ target: accounts.emailKey })
      .returning();
    return row ?? null;
  }

  async byEmailKey(db: Database, emailKey: string): Promise<AccountRow | null> {
    const [row] = await db.select().from(accounts).where(eq(accounts.emailKey, emailKey));
    return row ?? null;
  }

  async byIds(db: Database, accountIds: readonly string[]): Promise<AccountRow[]> {
    if (accountIds.length === 0) return [];
    return db
      .select()
      .from(accounts)
      .where(inArray(accounts.id, [...accountIds]));
  }

  async insertSignIn(db: Database, accountId: string, userAgent: string | null): Promise<SignInRow> {
    const [row] = await db.insert(signIns).values({ accountId, userAgent }).returning();
    if (!row) throw new Error('a sign-in was not stored');
    return row;
  }

  /** The sign-in with its account, unless it was ended. */
  async openSignIn(
    db: Database,
    signInId: string,
  ): Promise<{ signIn: SignInRow; account: AccountRow } | null> {
    const [row] = await db
      .select({ signIn: signIns, account: accounts })
      .from(signIns)
      .innerJoin(accounts, eq(accounts.id, signIns.accountId))
      .where(and(eq(signIns.id, signInId), isNull(signIns.endedAt)));
    return row ?? null;
  }

  /** Only the first of two that renew at once changes the row; the answer says whether it was this one. */
  async renewSignIn(db: Database, signInId: string, generation: number): Promise<boolean> {
    const rows = await db
      .update(signIns)
      .set({ generation: generation + 1, renewedAt: new Date() })
      .where(and(eq(signIns.id, signInId), eq(signIns.generation, generation), isNull(signIns.endedAt)))
      .returning({ id: signIns.id });
    return rows.length === 1;
  }

  async endSignIn(db: Database, signInId: string): Promise<void> {
    await db
      .update(signIns)
      .set({ endedAt: new Date() })
      .where(and(eq(signIns.id, signInId), isNull(signIns.endedAt)));
  }
}
