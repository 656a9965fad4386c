import { Inject, Injectable } from '@nestjs/common';
import type { Forgot, Reset } from '@pegwell/shared/contract/accounts';
import { emailKeyOf } from '../common/email-key';
import { ProblemException } from '../common/problem';
import { DATABASE, type RootDatabase } from '../database/database';
import { MailService } from '../mail/mail.service';
import { AccountsRepository } from './accounts.repository';
import { linkOver, LinksService } from './links.service';
import { hashPassword, refuseCommonPassword } from './passwords';
import { SignInsService } from './sign-ins.service';

/** A forgotten password: a link by mail, and a new password by the link. */
@Injectable()
export class RecoveryService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly accounts: AccountsRepository,
    private readonly links: LinksService,
    private readonly signIns: SignInsService,
    private readonly mail: MailService,
  ) {}

  /**
   * The address is not even looked up before the answer: the one row that is written is the same whether anybody
   * has it. The mail's writer finds out.
   */
  async forgot({ email }: Forgot): Promise<void> {
    if (!this.mail.sends) throw new ProblemException('no-mail');
    await this.mail.post(this.db, 'reset-password', { email });
  }

  /** For whoever runs the server, who hands the link over; null where nobody has the address. */
  async linkFor(address: string): Promise<string | null> {
    const account = await this.accounts.byEmailKey(this.db, emailKeyOf(address));
    if (!account) return null;
    const id = await this.links.issue(this.db, 'reset', { accountId: account.id, email: account.email });
    const link = await this.links.open(this.db, id);
    return link && this.links.urlOf(link);
  }

  /** Ends all sign-ins. The link came by mail, so the address is confirmed as well. */
  async reset({ token, password }: Reset): Promise<void> {
    refuseCommonPassword(password, []);
    const passwordHash = await hashPassword(password);
    await this.db.transaction(async (tx) => {
      const { accountId, email } = await this.links.use(tx, token, ['reset']);
      const row = await this.accounts.hold(tx, accountId);
      if (!row) throw linkOver();
      refuseCommonPassword(password, [row.email, row.displayName]);
      const confirmedAt = row.email === email ? (row.confirmedAt ?? new Date()) : row.confirmedAt;
      await this.accounts.update(tx, accountId, { passwordHash, confirmedAt });
      await this.signIns.endAll(tx, accountId);
      // An address that somebody else asked for, with the old password.
      await this.links.revoke(tx, accountId, 'change-email');
      await this.mail.post(tx, 'password-changed', { to: row.email });
    });
  }
}
