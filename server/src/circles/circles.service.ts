import { Inject, Injectable } from '@nestjs/common';
import type { Circle, CreateCircle, Role } from '@pegwell/shared/contract/circles';
import { actionsOf } from '@pegwell/shared/policy';
import type { Account, Member } from '../common/access';
import { notFound } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { CirclesRepository, type CircleRow } from './circles.repository';
import { HistoryService } from './history.service';

@Injectable()
export class CirclesService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly circles: CirclesRepository,
    private readonly history: HistoryService,
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
      const maker = { circleId: circle.id, account };
      await this.history.note(tx, maker, { what: 'circle.created', after: { name, timeZone } });
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
}

function present(row: CircleRow, role: Role): Circle {
  const { id, name, timeZone, referenceA } = row;
  return { id, name, role, timeZone, referenceA, can: actionsOf(role) };
}
