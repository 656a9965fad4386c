import { Inject, Injectable } from '@nestjs/common';
import { DepartureService } from '../circles/departure.service';
import type { Account } from '../common/access';
import { DATABASE, type RootDatabase } from '../database/database';
import { EveningTracesService } from '../sessions/evening-traces.service';
import { AccountsService } from './accounts.service';
import { SignInsService } from './sign-ins.service';

/** Everything that is kept about one account, for its owner. Tunes and evenings are the circle's. */
@Injectable()
export class OwnDataService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly accounts: AccountsService,
    private readonly signIns: SignInsService,
    private readonly circles: DepartureService,
    private readonly evenings: EveningTracesService,
  ) {}

  /** As of one moment: what happens meanwhile is in all of it or in none. */
  async of({ id }: Account) {
    return this.db.transaction(
      async (tx) => ({
        writtenAt: new Date(),
        account: await this.accounts.recorded(tx, id),
        signIns: await this.signIns.recorded(tx, id),
        ...(await this.circles.recorded(tx, id)),
        ...(await this.evenings.recorded(tx, id)),
      }),
      { isolationLevel: 'repeatable read', accessMode: 'read only' },
    );
  }
}
