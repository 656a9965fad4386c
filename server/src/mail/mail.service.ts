import { Inject, Injectable } from '@nestjs/common';
import type { Database } from '../database/database';
import { ENV, type Env } from '../env';
import type { Letter } from './letter';
import { MailRepository } from './mail.repository';

/**
 * Writes the letter when it goes out, perhaps long after it was posted and perhaps more than once; null when it is
 * no longer needed. `mailId` is the same each time: what the writer makes for it, it makes once.
 */
export type LetterWriter = (details: unknown, mailId: string) => Promise<Letter | null> | Letter;

/**
 * Where features post mail. The queue is a table of our own, in which a sender holds the row it works on. Of the
 * packages for it, graphile-worker 0.16 frees what a killed process held after four hours, and pg-boss 10 when it
 * expires; its worker also leaves the answer "done" unawaited, so that a database that is away just then ends the
 * process. A row lock ends with its connection: the mail is free at once.
 */
@Injectable()
export class MailService {
  private readonly writers = new Map<string, LetterWriter>();
  /** Whether this server sends mail at all. */
  readonly sends: boolean;

  constructor(
    @Inject(ENV) env: Env,
    private readonly mails: MailRepository,
  ) {
    this.sends = env.PEGWELL_MAIL_URL !== undefined;
  }

  /** Says how a letter of this name is written; once, at the start. */
  teach(letter: string, writer: LetterWriter): void {
    if (this.writers.has(letter)) throw new Error(`two write the letter ${letter}`);
    this.writers.set(letter, writer);
  }

  writerOf(letter: string): LetterWriter | undefined {
    return this.writers.get(letter);
  }

  /**
   * Puts a mail into the caller's transaction: it goes out if that is committed. On a server that sends none
   * nothing is kept, so that nobody hears of old things on the day when it begins to.
   */
  async post(db: Database, letter: string, details: Readonly<Record<string, unknown>>): Promise<void> {
    if (!this.writers.has(letter)) throw new Error(`nobody writes the letter ${letter}`);
    if (this.sends) await this.mails.insert(db, { letter, details });
  }
}
