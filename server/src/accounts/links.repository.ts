import { Injectable } from '@nestjs/common';
import { and, eq, gt, isNull, ne, sql } from 'drizzle-orm';
import type { Database } from '../database/database';
import { accountLinks } from './accounts.table';

export type LinkRow = typeof accountLinks.$inferSelect;
export type LinkPurpose = LinkRow['purpose'];

@Injectable()
export class LinksRepository {
  /** A link that is there already lives on from now; false when it was used. */
  async insert(db: Database, values: typeof accountLinks.$inferInsert): Promise<boolean> {
    const rows = await db
      .insert(accountLinks)
      .values(values)
      .onConflictDoUpdate({
        target: accountLinks.id,
        set: { expiresAt: values.expiresAt },
        setWhere: isNull(accountLinks.usedAt),
      })
      .returning({ id: accountLinks.id });
    return rows.length === 1;
  }

  /** Takes away the account's other links for the purpose. */
  async removeOthers(db: Database, { id, accountId, purpose }: LinkRow | NewLink): Promise<void> {
    await db
      .delete(accountLinks)
      .where(
        and(
          eq(accountLinks.accountId, accountId),
          eq(accountLinks.purpose, purpose),
          ne(accountLinks.id, id),
        ),
      );
  }

  async removeAll(db: Database, accountId: string, purpose: LinkPurpose): Promise<void> {
    await db
      .delete(accountLinks)
      .where(and(eq(accountLinks.accountId, accountId), eq(accountLinks.purpose, purpose)));
  }

  /** A link that can still be used. */
  async openById(db: Database, linkId: string): Promise<LinkRow | null> {
    const [row] = await db
      .select()
      .from(accountLinks)
      .where(and(eq(accountLinks.id, linkId), open));
    return row ?? null;
  }

  /** Of two that use a link at once, one gets the row: the other waits for it, and finds it used. */
  async use(db: Database, tokenHash: string): Promise<LinkRow | null> {
    const [row] = await db
      .update(accountLinks)
      .set({ usedAt: sql`now()` })
      .where(and(eq(accountLinks.tokenHash, tokenHash), open))
      .returning();
    return row ?? null;
  }
}

const open = and(isNull(accountLinks.usedAt), gt(accountLinks.expiresAt, sql`now()`));

interface NewLink {
  readonly id: string;
  readonly accountId: string;
  readonly purpose: LinkPurpose;
}
