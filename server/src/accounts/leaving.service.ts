import { Inject, Injectable } from '@nestjs/common';
import type { DeleteAccount } from '@pegwell/shared/contract/accounts';
import type { Response } from 'express';
import { DepartureService } from '../circles/departure.service';
import type { Account } from '../common/access';
import { ProblemException } from '../common/problem';
import { DATABASE, type RootDatabase } from '../database/database';
import { AccountsService } from './accounts.service';
import { SignInsService } from './sign-ins.service';

/** Deleting one's own account. */
@Injectable()
export class LeavingService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly accounts: AccountsService,
    private readonly circles: DepartureService,
    private readonly signIns: SignInsService,
  ) {}

  /** Refused to the only host of a circle that others are in: it would be nobody's. */
  async deleteAccount(account: Account, { current }: DeleteAccount, response: Response): Promise<void> {
    await this.accounts.checkPresent(account.id, current);
    await this.db.transaction(async (tx) => {
      const names = await this.circles.leaveAll(tx, account.id);
      if (names.length > 0) {
        throw new ProblemException(
          'sole-host',
          `You are the only host of ${names.join(', ')}. Make somebody else a host there first.`,
        );
      }
      await this.accounts.remove(tx, account.id);
    });
    this.signIns.forget(response);
  }
}
