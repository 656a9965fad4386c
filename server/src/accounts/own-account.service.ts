import { Inject, Injectable } from '@nestjs/common';
import type { ChangeEmail, ChangePassword, Rename, User } from '@pegwell/shared/contract/accounts';
import type { Account } from '../common/access';
import { ProblemException } from '../common/problem';
import { DATABASE, type RootDatabase } from '../database/database';
import { MailService } from '../mail/mail.service';
import { AccountsRepository } from './accounts.repository';
import { AccountsService } from './accounts.service';
import { AddressService } from './address.service';
import { LinksService } from './links.service';
import { hashPassword, refuseCommonPassword } from './passwords';
import { SignInsService } from './sign-ins.service';
import { toUser } from './user';

/** What somebody changes about their own account. */
@Injectable()
export class OwnAccountService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly accounts: AccountsRepository,
    private readonly passwords: AccountsService,
    private readonly addresses: AddressService,
    private readonly links: LinksService,
    private readonly signIns: SignInsService,
    private readonly mail: MailService,
  ) {}

  async rename(account: Account, { displayName }: Rename): Promise<User> {
    const row = await this.accounts.update(this.db, account.id, { displayName });
    if (!row) throw new ProblemException('not-signed-in');
    return toUser(row);
  }

  /** Ends all other sign-ins: whoever knew the old password is out. */
  async changePassword(account: Account, { current, password }: ChangePassword): Promise<void> {
    refuseCommonPassword(password, [account.email, account.displayName]);
    const row = await this.passwords.checkPresent(account.id, current);
    const passwordHash = await hashPassword(password);
    await this.db.transaction(async (tx) => {
      await this.accounts.update(tx, account.id, { passwordHash });
      await this.signIns.endOthers(account, tx);
      await this.links.revoke(tx, account.id, 'reset');
      await this.links.revoke(tx, account.id, 'change-email');
      await this.mail.post(tx, 'password-changed', { to: row.email });
    });
  }

  async askForAddress(account: Account, { email, current }: ChangeEmail): Promise<void> {
    const row = await this.passwords.checkPresent(account.id, current);
    await this.addresses.askToChange(row, email);
  }
}
