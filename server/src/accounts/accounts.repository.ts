import { Injectable } from '@nestjs/common';
import { eq, inArray } from 'drizzle-orm';
import type { Database } from '../database/database';
import { accounts } from './accounts.table';

export type AccountRow = typeof accounts.$inferSelect;
type Changes = Partial<typeof accounts.$inferInsert>;

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

  async byId(db: Database, accountId: string): Promise<AccountRow | null> {
    const [row] = await this.byIds(db, [accountId]);
    return row ?? null;
  }

  async byIds(db: Database, accountIds: readonly string[]): Promise<AccountRow[]> {
    if (accountIds.length === 0) return [];
    return db
      .select()
      .from(accounts)
      .where(inArray(accounts.id, [...accountIds]));
  }

  /** The account, held until the transaction ends. */
  async hold(tx: Database, accountId: string): Promise<AccountRow | null> {
    const [row] = await tx.select().from(accounts).where(eq(accounts.id, accountId)).for('update');
    return row ?? null;
  }

  /** Null when it is gone. */
  async update(db: Database, accountId: string, changes: Changes): Promise<AccountRow | null> {
    const [row] = await db.update(accounts).set(changes).where(eq(accounts.id, accountId)).returning();
    return row ?? null;
  }

  async remove(db: Database, accountId: string): Promise<void> {
    await db.delete(accounts).where(eq(accounts.id, accountId));
  }
}
