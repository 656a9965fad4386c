import { createHash, createHmac, randomUUID } from 'node:crypto';
import { Inject, Injectable } from '@nestjs/common';
import { ProblemException } from '../common/problem';
import type { Database } from '../database/database';
import { ENV, type Env } from '../env';
import { LinksRepository, type LinkPurpose, type LinkRow } from './links.repository';

const HOUR_MS = 3_600_000;
const LIVES_MS: Readonly<Record<LinkPurpose, number>> = {
  reset: HOUR_MS,
  'change-email': 24 * HOUR_MS,
  confirm: 72 * HOUR_MS,
};
const PAGES: Readonly<Record<LinkPurpose, string>> = {
  reset: 'reset',
  'change-email': 'confirm',
  confirm: 'confirm',
};

/**
 * Links that are sent by mail, each good once. A link's token is made from its random id with the server's secret,
 * not drawn: a mail that waits names the link, and neither the queue nor a copy of the database opens anything.
 */
@Injectable()
export class LinksService {
  constructor(
    @Inject(ENV) private readonly env: Env,
    private readonly links: LinksRepository,
  ) {}

  /**
   * Makes a link, and the account's older ones for the same purpose void. The same id again, of a mail that could
   * not go out before, is the same link; its time begins anew, unless it was used.
   * @returns the link's id
   */
  async issue(
    db: Database,
    purpose: LinkPurpose,
    { accountId, email }: { readonly accountId: string; readonly email: string },
    id: string = randomUUID(),
  ): Promise<string> {
    const expiresAt = new Date(Date.now() + LIVES_MS[purpose]);
    const link = { id, accountId, purpose, email, tokenHash: digest(this.tokenOf(id)), expiresAt };
    if (await this.links.insert(db, link)) await this.links.removeOthers(db, link);
    return id;
  }

  /** Makes all links of an account for a purpose void. */
  async revoke(db: Database, accountId: string, purpose: LinkPurpose): Promise<void> {
    await this.links.removeAll(db, accountId, purpose);
  }

  /** Uses a link up; in the transaction of what it is used for, so that a failure leaves it whole. */
  async use(tx: Database, token: string, purposes: readonly LinkPurpose[]): Promise<LinkRow> {
    const link = await this.links.use(tx, digest(token));
    if (!link || !purposes.includes(link.purpose)) throw linkOver();
    return link;
  }

  async open(db: Database, linkId: string): Promise<LinkRow | null> {
    return this.links.openById(db, linkId);
  }

  /** In the fragment, which no browser sends: no log, no Referer and no GET carries the token. */
  urlOf({ id, purpose }: LinkRow): string {
    return `${this.env.PEGWELL_URL}/${PAGES[purpose]}#${this.tokenOf(id)}`;
  }

  private tokenOf(linkId: string): string {
    return createHmac('sha256', this.env.PEGWELL_SECRET).update(`account-link:${linkId}`).digest('base64url');
  }
}

export const linkOver = () =>
  new ProblemException('link-over', 'This link was used, is too old, or a newer one was sent.');

function digest(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
