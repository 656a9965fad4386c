import { Inject, Injectable } from '@nestjs/common';
import type { AddMember, Circle, CircleMember, CreateCircle, Role } from '@pegwell/shared/contract/circles';
import type { Page, PageQuery } from '@pegwell/shared/contract/page';
import { actionsOf, may } from '@pegwell/shared/policy';
import { AccountsService } from '../accounts/accounts.service';
import type { Account, Member } from '../common/access';
import { cannotBe, notFound, ProblemException } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { CirclesRepository, type CircleRow } from './circles.repository';

/** One line of the circle's history: who did what to what, and how it was before. */
export interface CircleEvent {
  readonly what: string;
  readonly subjectId?: string;
  readonly before?: unknown;
  readonly after?: unknown;
}

@Injectable()
export class CirclesService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly circles: CirclesRepository,
    private readonly accounts: AccountsService,
  ) {}

  listOf(accountId: string): Promise<{ id: string; name: string; role: Role }[]> {
    return this.circles.ofAccount(this.db, accountId);
  }

  roleOf(circleId: string, accountId: string): Promise<Role | null> {
    return this.circles.roleOf(this.db, circleId, accountId);
  }

  async create(account: Account, { name, timeZone = 'UTC' }: CreateCircle): Promise<Circle> {
    const row = await this.db.transaction(async (tx) => {
      const circle = await this.circles.insert(tx, { name, timeZone });
      await this.circles.addMember(tx, circle.id, account.id, 'host');
      return circle;
    });
    return present(row, 'host');
  }

  async get(member: Member): Promise<Circle> {
    return present(await this.row(this.db, member.circleId), member.role);
  }

  /** The stored circle, for other features: its time zone and reference A. */
  async row(db: Database, circleId: string): Promise<CircleRow> {
    const row = await this.circles.byId(db, circleId);
    if (!row) throw notFound();
    return row;
  }

  async members(member: Member, query: PageQuery): Promise<Page<CircleMember>> {
    const { total, items } = await this.circles.members(this.db, member.circleId, query);
    const people = await this.accounts.byIds(
      this.db,
      items.map(({ accountId }) => accountId),
    );
    const showMail = may(member.role, 'members.change');
    return {
      ...query,
      total,
      items: items.flatMap(({ accountId, role }) => {
        const person = people.get(accountId);
        if (!person) return [];
        const { displayName, email } = person;
        return [{ accountId, role, displayName, ...(showMail && { email }) }];
      }),
    };
  }

  async addMember(member: Member, { email, role }: AddMember): Promise<CircleMember> {
    return this.db.transaction(async (tx) => {
      const user = await this.accounts.byEmail(tx, email);
      if (!user) {
        throw cannotBe([
          { path: 'email', message: 'Nobody has an account with this e-mail yet. Ask them to register.' },
        ]);
      }
      if (!(await this.circles.addMember(tx, member.circleId, user.id, role))) {
        throw new ProblemException('already-member', `${user.displayName} is in this circle already.`, {
          errors: [{ path: 'email', message: `${user.displayName} is in this circle already.` }],
        });
      }
      await this.note(tx, member, { what: 'member.added', subjectId: user.id, after: { role } });
      return { accountId: user.id, displayName: user.displayName, email: user.email, role };
    });
  }

  /** Writes the circle's history, in the caller's transaction. */
  async note(db: Database, member: Member, event: CircleEvent): Promise<void> {
    await this.circles.insertEvent(db, { circleId: member.circleId, accountId: member.account.id, ...event });
  }
}

function present(row: CircleRow, role: Role): Circle {
  const { id, name, timeZone, referenceA } = row;
  return { id, name, role, timeZone, referenceA, can: actionsOf(role) };
}
