import { setTimeout as pause } from 'node:timers/promises';
import {
  Inject,
  Injectable,
  Logger,
  type BeforeApplicationShutdown,
  type OnApplicationBootstrap,
} from '@nestjs/common';
import { DATABASE, type RootDatabase } from '../database/database';
import { MailRepository, type MailRow } from './mail.repository';
import { MailService } from './mail.service';
import { MailTransport, neverTakes } from './transport';

/** How often an idle sender looks for new mail. */
const LOOK_MS = 500;
/** The first wait after a failure; each further one is twice as long, up to the longest. */
const FIRST_WAIT_MS = 5_000;
const LONGEST_WAIT_MS = 3_600_000;
/** A mail that could not be sent for so long is given up. */
const GIVE_UP_MS = 3 * 86_400_000;
/** How long it is kept after it went out, to answer "did you send it?". */
const KEEP_MS = 7 * 86_400_000;
const TIDY_MS = 3_600_000;

/**
 * Sends what is due, one mail after the other, apart from all requests. Each process has one; a mail is held by
 * the one that sends it. When a process dies after the mail server took a mail and before that was noted, the
 * mail goes out again under the same Message-ID: SMTP has no way to know (RFC 1047).
 */
@Injectable()
export class MailSender implements OnApplicationBootstrap, BeforeApplicationShutdown {
  private readonly logger = new Logger('Mail');
  private readonly ending = new AbortController();
  private running: Promise<void> | null = null;
  private tidiedAt = 0;

  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly mails: MailRepository,
    private readonly mail: MailService,
    private readonly transport: MailTransport,
  ) {}

  onApplicationBootstrap(): void {
    if (this.mail.sends) this.running = this.run();
  }

  /** While the database is still there. */
  async beforeApplicationShutdown(): Promise<void> {
    this.ending.abort();
    await this.running;
  }

  private async run(): Promise<void> {
    const { signal } = this.ending;
    while (!signal.aborted) {
      const worked = await this.sendNext().catch(() => {
        this.logger.warn('the queue could not be read; it is read again soon');
        return false;
      });
      // It ends early, by an error, when everything ends.
      if (!worked) await pause(LOOK_MS, undefined, { signal, ref: false }).catch(() => undefined);
    }
  }

  /** @returns whether anything was due */
  private async sendNext(): Promise<boolean> {
    await this.tidy();
    return this.db.transaction(async (tx) => {
      const row = await this.mails.claimDue(tx);
      if (!row) return false;
      const waitMs = await this.attempt(row);
      if (waitMs === null) await this.mails.done(tx, row.id);
      else await this.mails.later(tx, row.id, row.tries + 1, waitMs);
      return true;
    });
  }

  /** @returns null when there is no more to do, else how long to wait before the next try, in milliseconds */
  private async attempt(row: MailRow): Promise<number | null> {
    try {
      const writer = this.mail.writerOf(row.letter);
      if (!writer) throw new Error(`nobody writes the letter ${row.letter}`);
      const letter = await writer(row.details, row.id);
      if (letter) await this.transport.send(row.id, letter);
      return null;
    } catch (error) {
      // Never the whole error: what a mail server says may quote an address.
      const { code, responseCode } = error as { code?: string; responseCode?: number };
      const about = { mail: row.id, letter: row.letter, code, responseCode, tries: row.tries + 1 };
      if (neverTakes(error) || Date.now() - row.createdAt.getTime() > GIVE_UP_MS) {
        this.logger.error(about, 'a mail is given up');
        return null;
      }
      this.logger.warn(about, 'a mail could not be sent; it is tried again');
      return Math.min(FIRST_WAIT_MS * 2 ** row.tries, LONGEST_WAIT_MS);
    }
  }

  private async tidy(): Promise<void> {
    if (Date.now() - this.tidiedAt < TIDY_MS) return;
    this.tidiedAt = Date.now();
    await this.mails.removeDone(this.db, new Date(Date.now() - KEEP_MS));
  }
}
