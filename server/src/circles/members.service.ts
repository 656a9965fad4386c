import { Inject, Injectable } from '@nestjs/common';
import type { AddMember, CircleMember, Role } from '@pegwell/shared/contract/circles';
import type { User } from '@pegwell/shared/contract/accounts';
import type { Page, PageQuery } from '@pegwell/shared/contract/page';
import { may } from '@pegwell/shared/policy';
import { AccountsService } from '../accounts/accounts.service';
import type { Member } from '../common/access';
import { cannotBe, notFound, ProblemException } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { CirclesRepository } from './circles.repository';
import { HistoryService } from './history.service';

/** Who is in a circle and as what. A circle keeps at least one host, whoever asks for what at the same time. */
@Injectable()
export class MembersService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly circles: CirclesRepository,
    private readonly accounts: AccountsService,
    private readonly history: HistoryService,
  ) {}

  async list(member: Member, query: PageQuery): Promise<Page<CircleMember>> {
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

  async add(member: Member, { email, role }: AddMember): Promise<CircleMember> {
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
      await this.history.note(tx, member, { what: 'member.added', subjectId: user.id, after: { role } });
      return present(user, role);
    });
  }

  async changeRole(member: Member, accountId: string, role: Role): Promise<CircleMember> {
    return this.db.transaction(async (tx) => {
      const before = await this.holdMember(tx, member.circleId, accountId, role);
      if (before !== role) {
        await this.circles.setRole(tx, member.circleId, accountId, role);
        await this.history.note(tx, member, {
          ...{ what: 'member.changed', subjectId: accountId },
          ...{ before: { role: before }, after: { role } },
        });
      }
      const user = (await this.accounts.byIds(tx, [accountId])).get(accountId);
      if (!user) throw notFound();
      return present(user, role);
    });
  }

  /** Also for somebody who leaves. What they did stays, and so do the instruments they bring, should they return. */
  async remove(member: Member, accountId: string): Promise<void> {
    await this.db.transaction(async (tx) => {
      const role = await this.holdMember(tx, member.circleId, accountId, null);
      await this.circles.removeMember(tx, member.circleId, accountId);
      const what = accountId === member.account.id ? 'member.left' : 'member.removed';
      await this.history.note(tx, member, { what, subjectId: accountId, before: { role } });
    });
  }

  /**
   * The member's role, with the circle's hosts held until the transaction ends: of two hosts who make each
   * other players at once, the second is refused.
   */
  private async holdMember(
    tx: Database,
    circleId: string,
    accountId: string,
    becomes: Role | null,
  ): Promise<Role> {
    const hosts = await this.circles.holdHosts(tx, circleId);
    const role = await this.circles.roleOf(tx, circleId, accountId);
    if (!role) throw notFound();
    if (role === 'host' && becomes !== 'host' && hosts.length < 2) {
      throw cannotBe([
        { path: 'role', message: 'A circle keeps at least one host. Make somebody else a host first.' },
      ]);
    }
    return role;
  }
}

function present({ id, displayName, email }: User, role: Role): CircleMember {
  return { accountId: id, displayName, email, role };
}
