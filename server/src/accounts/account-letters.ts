import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import { z } from 'zod';
import { emailKeyOf } from '../common/email-key';
import { DATABASE, type RootDatabase } from '../database/database';
import { ENV, type Env } from '../env';
import type { Letter } from '../mail/letter';
import { MailService } from '../mail/mail.service';
import { AccountsRepository } from './accounts.repository';
import { LinksService } from './links.service';

const linkSchema = z.object({ linkId: z.guid() });
const emailSchema = z.object({ email: z.string() });
const toSchema = z.object({ to: z.string() });

/**
 * The words of every mail about an account. None holds the account's name: anybody can register a stranger's address
 * under a name that reads like an advertisement.
 */
@Injectable()
export class AccountLetters implements OnModuleInit {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    @Inject(ENV) private readonly env: Env,
    private readonly mail: MailService,
    private readonly accounts: AccountsRepository,
    private readonly links: LinksService,
  ) {}

  onModuleInit(): void {
    this.mail.teach('confirm-address', (details) => this.confirm(linkSchema.parse(details).linkId));
    this.mail.teach('reset-password', (details, mailId) =>
      this.reset(emailSchema.parse(details).email, mailId),
    );
    this.mail.teach('address-asked', (details) => this.addressAsked(toSchema.parse(details).to));
    this.mail.teach('address-changed', (details) => this.addressChanged(toSchema.parse(details).to));
    this.mail.teach('password-changed', (details) => this.passwordChanged(toSchema.parse(details).to));
  }

  private async confirm(linkId: string): Promise<Letter | null> {
    const link = await this.links.open(this.db, linkId);
    if (!link) return null;
    const url = this.links.urlOf(link);
    if (link.purpose === 'confirm') {
      return {
        to: link.email,
        subject: 'Confirm your e-mail address',
        paragraphs: [
          `Somebody made a Pegwell account with this address at ${this.site}. If that was you, please confirm that mail reaches you.`,
        ],
        link: { words: 'Confirm this address', url },
        foot: 'The link works once, for three days. If it was not you, there is nothing to do.',
      };
    }
    return {
      to: link.email,
      subject: 'Confirm your new e-mail address',
      paragraphs: [`Somebody asked to use this address for their Pegwell account at ${this.site}.`],
      link: { words: 'Use this address', url },
      foot: 'The link works once, for a day. If it was not you, there is nothing to do.',
    };
  }

  /** Null where nobody has the address. The link has the mail's id: tried again, it is the same one. */
  private async reset(email: string, mailId: string): Promise<Letter | null> {
    const row = await this.accounts.byEmailKey(this.db, emailKeyOf(email));
    if (!row) return null;
    const linkId = await this.db.transaction((tx) =>
      this.links.issue(tx, 'reset', { accountId: row.id, email: row.email }, mailId),
    );
    const link = await this.links.open(this.db, linkId);
    if (!link) return null;
    return {
      to: row.email,
      subject: 'Choose a new password',
      paragraphs: [`Somebody asked for a new password for your Pegwell account at ${this.site}.`],
      link: { words: 'Choose a new password', url: this.links.urlOf(link) },
      foot: 'The link works once, for one hour. If it was not you, there is nothing to do: your password stays as it is.',
    };
  }

  private addressAsked(to: string): Letter {
    return {
      to,
      subject: 'Another e-mail address was asked for',
      paragraphs: [
        `Somebody who is signed in to your Pegwell account at ${this.site} asked to use another address for it. Until that address is confirmed, this one stays.`,
        'If it was not you, choose a new password now: that ends all sign-ins and the change.',
      ],
      link: this.forgot,
    };
  }

  private addressChanged(to: string): Letter {
    return {
      to,
      subject: 'Your e-mail address was changed',
      paragraphs: [
        `Your Pegwell account at ${this.site} has another address now; it was confirmed from there. Nothing more is sent to this one.`,
        'If it was not you, tell whoever runs the site.',
      ],
    };
  }

  private passwordChanged(to: string): Letter {
    return {
      to,
      subject: 'Your password was changed',
      paragraphs: [
        `The password of your Pegwell account at ${this.site} was changed. Other sign-ins have ended.`,
        'If it was not you, choose a new one now.',
      ],
      link: this.forgot,
    };
  }

  /** The site as people know it. */
  private get site(): string {
    return new URL(this.env.PEGWELL_URL).host;
  }

  private get forgot() {
    return { words: 'Choose a new password', url: `${this.env.PEGWELL_URL}/forgot` };
  }
}
