import { Inject, Injectable } from '@nestjs/common';
import { happenedSchema, type EventKind, type Happened } from '@pegwell/shared/contract/history';
import type { Page, PageQuery } from '@pegwell/shared/contract/page';
import { AccountsService } from '../accounts/accounts.service';
import type { Member } from '../common/access';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { HistoryRepository, type PastEvent } from './history.repository';

/** One line of the circle's history: who did what to what, and how it was before. */
export interface CircleEvent {
  readonly what: EventKind;
  readonly subjectId?: string;
  readonly before?: unknown;
  readonly after?: unknown;
}

/** Who did what in a circle: written with every change, read by those who answer for the circle. */
@Injectable()
export class HistoryService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly history: HistoryRepository,
    private readonly accounts: AccountsService,
  ) {}

  /** Writes a line, in the transaction of the change: both are there, or neither. */
  note(db: Database, member: Pick<Member, 'circleId' | 'account'>, event: CircleEvent): Promise<void> {
    return this.history.insert(db, { circleId: member.circleId, accountId: member.account.id, ...event });
  }

  /** The last event of that kind about that subject, with what was there before and after. */
  last(db: Database, circleId: string, what: EventKind, subjectId: string): Promise<PastEvent | null> {
    return this.history.last(db, circleId, what, subjectId);
  }

  async page(member: Member, query: PageQuery): Promise<Page<Happened>> {
    const { total, items } = await this.history.page(this.db, member.circleId, query);
    const ids = items.flatMap((event) => [event.accountId, isAbout(event.what) ? event.subjectId : null]);
    const people = await this.accounts.byIds(this.db, [...new Set(ids.filter((id) => id !== null))]);
    const nameOf = (id: string | null) => (id === null ? null : (people.get(id)?.displayName ?? null));
    return {
      ...query,
      total,
      items: items.map(({ accountId, at, what, subjectId, title, role, created, updated, ...event }) =>
        happenedSchema.parse({
          ...event,
          ...{ what, subjectId },
          at: at.toISOString(),
          who: nameOf(accountId),
          subject: isAbout(what) ? nameOf(subjectId) : title,
          role: isAbout(what) ? role : null,
          counts: what === 'tunes.imported' ? { created, updated } : null,
        }),
      ),
    };
  }
}

/** Whether a line is about somebody: their name is looked up, so that a deleted account takes it along. */
const isAbout = (what: string) => what.startsWith('member.');
