import { Inject, Injectable } from '@nestjs/common';
import type { Confirm, Confirmed } from '@pegwell/shared/contract/accounts';
import type { Account } from '../common/access';
import { emailKeyOf } from '../common/email-key';
import { cannotBe, ProblemException } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { MailService } from '../mail/mail.service';
import { AccountsRepository, type AccountRow } from './accounts.repository';
import { linkOver, LinksService } from './links.service';

/** Whether mail to an account's address reaches whoever has the account, and the change to another address. */
@Injectable()
export class AddressService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly accounts: AccountsRepository,
    private readonly links: LinksService,
    private readonly mail: MailService,
  ) {}

  /** Sends a link to the account's address, in the caller's transaction. Without mail there is none to send. */
  async askToConfirm(tx: Database, { id, email }: Pick<AccountRow, 'id' | 'email'>): Promise<void> {
    if (!this.mail.sends) return;
    const linkId = await this.links.issue(tx, 'confirm', { accountId: id, email });
    await this.mail.post(tx, 'confirm-address', { linkId });
  }

  /** The same once more, for somebody who waits in vain. */
  async askAgain(account: Account): Promise<void> {
    this.mustSendMail();
    if (account.confirmed) return;
    await this.db.transaction((tx) => this.askToConfirm(tx, account));
  }

  /** Tells both addresses; the account keeps the old one until the link that goes to the new one is used. */
  async askToChange(row: AccountRow, email: string): Promise<void> {
    this.mustSendMail();
    const emailKey = emailKeyOf(email);
    if (emailKey === row.emailKey) {
      throw cannotBe([{ path: 'email', message: 'This is your address already.' }]);
    }
    await this.db.transaction(async (tx) => {
      if (await this.accounts.byEmailKey(tx, emailKey)) throw emailTaken();
      const linkId = await this.links.issue(tx, 'change-email', { accountId: row.id, email });
      await this.mail.post(tx, 'confirm-address', { linkId });
      await this.mail.post(tx, 'address-asked', { to: row.email });
    });
  }

  /** Uses a link of either kind. Whoever has it reads the address's mail: no sign-in is asked for. */
  async confirm({ token }: Confirm): Promise<Confirmed> {
    return this.db.transaction(async (tx) => {
      const { purpose, accountId, email } = await this.links.use(tx, token, ['confirm', 'change-email']);
      const row = await this.accounts.hold(tx, accountId);
      if (!row) throw linkOver();
      if (purpose === 'confirm') {
        if (row.email !== email) throw linkOver();
        await this.accounts.update(tx, accountId, { confirmedAt: new Date() });
      } else {
        await this.change(tx, row, email);
      }
      return { email };
    });
  }

  private async change(tx: Database, row: AccountRow, email: string): Promise<void> {
    const emailKey = emailKeyOf(email);
    const holder = await this.accounts.byEmailKey(tx, emailKey);
    if (holder && holder.id !== row.id) throw emailTaken();
    await this.accounts.update(tx, row.id, { email, emailKey, confirmedAt: new Date() });
    // Whoever reads the old mailbox has no way in any more.
    await this.links.revoke(tx, row.id, 'reset');
    await this.links.revoke(tx, row.id, 'confirm');
    await this.mail.post(tx, 'address-changed', { to: row.email });
  }

  private mustSendMail(): void {
    if (!this.mail.sends) throw new ProblemException('no-mail');
  }
}

export function emailTaken(): ProblemException {
  const message = 'An account with this e-mail exists. Sign in instead.';
  return new ProblemException('email-taken', message, { errors: [{ path: 'email', message }] });
}
