import { Injectable } from '@nestjs/common';
import type { Database } from '../database/database';
import { liveStates, plays } from '../live/live.table';

/** Writes a record of the past, which no service can: theirs is the time that it is now. */
@Injectable()
export class DemoRepository {
  async insertPlays(db: Database, rows: (typeof plays.$inferInsert)[]): Promise<void> {
    await db.insert(plays).values(rows);
  }

  async insertLiveState(db: Database, row: typeof liveStates.$inferInsert): Promise<void> {
    await db.insert(liveStates).values(row);
  }
}
