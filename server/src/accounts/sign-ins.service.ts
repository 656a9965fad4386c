import { Inject, Injectable } from '@nestjs/common';
import { JwtService } from '@nestjs/jwt';
import type { SignIn } from '@pegwell/shared/contract/accounts';
import type { Request, Response } from 'express';
import { z } from 'zod';
import type { Account } from '../common/access';
import { notFound } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { ENV, type Env } from '../env';
import { clearSignInCookie, cookieName, setSignInCookie, SIGN_IN_DAYS } from './cookie';
import { deviceOf } from './device';
import { SignInsRepository } from './sign-ins.repository';
import { toUser } from './user';

/** A cookie older than this gets a successor with the answer to an ordinary request. */
const RENEW_AFTER_MS = 12 * 3_600_000;
/** The same successor again within this time: the first answer was lost, or two requests met. */
const GRACE_MS = 60_000;
/** How exactly it is known when a sign-in was last used: writing it down at every request would cost more. */
const USED_MS = 600_000;
/** How long it is kept that somebody was signed in, and with what: longer than any cookie lives. */
const KEEP_MS = 2 * SIGN_IN_DAYS * 86_400_000;

const claimsSchema = z.object({ sid: z.guid(), gen: z.number().int(), iat: z.number().int() });

/** Sign-ins are rows; the cookie carries only the row's id and generation, signed. */
@Injectable()
export class SignInsService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    @Inject(ENV) private readonly env: Env,
    private readonly jwt: JwtService,
    private readonly signIns: SignInsRepository,
  ) {}

  async begin(accountId: string, request: Request, response: Response): Promise<void> {
    const userAgent = request.headers['user-agent']?.slice(0, 300) ?? null;
    const row = await this.signIns.insert(this.db, accountId, userAgent);
    await this.signIns.removeOver(this.db, accountId, new Date(Date.now() - KEEP_MS));
    this.setCookie(response, row.id, row.generation);
  }

  async end(signInId: string, response: Response): Promise<void> {
    await this.signIns.end(this.db, signInId);
    this.forget(response);
  }

  /** Takes the cookie away from whoever asks. */
  forget(response: Response): void {
    clearSignInCookie(response, this.env.PEGWELL_URL);
  }

  /** The account whose sign-in the cookie names, or null; renews the cookie when it is due. */
  async accountOf(request: Request, response: Response): Promise<Account | null> {
    const claims = this.claimsOf(request);
    if (!claims) return null;
    const found = await this.signIns.open(this.db, claims.sid);
    if (!found) return null;
    const { signIn, account } = found;
    if (claims.gen !== signIn.generation) {
      const late = Date.now() - signIn.renewedAt.getTime() > GRACE_MS;
      if (claims.gen !== signIn.generation - 1 || late) {
        // A cookie that was replaced long ago is in use: one of the two was copied. Both end.
        await this.signIns.end(this.db, signIn.id);
        return null;
      }
      this.setCookie(response, signIn.id, signIn.generation);
    } else if (Date.now() - signIn.renewedAt.getTime() > RENEW_AFTER_MS) {
      await this.signIns.renew(this.db, signIn.id, signIn.generation);
      // Whoever was first, the successor is the same.
      this.setCookie(response, signIn.id, signIn.generation + 1);
    }
    const notedBefore = new Date(Date.now() - USED_MS);
    if (signIn.usedAt < notedBefore) await this.signIns.touch(this.db, signIn.id, notedBefore);
    return { ...toUser(account), signInId: signIn.id };
  }

  /** Where the account is signed in, the last used first. */
  async list({ id, signInId }: Account): Promise<SignIn[]> {
    const rows = await this.signIns.openOf(this.db, id, new Date(Date.now() - SIGN_IN_DAYS * 86_400_000));
    return rows.map((row) => ({
      id: row.id,
      device: deviceOf(row.userAgent),
      begunAt: row.createdAt.toISOString(),
      usedAt: row.usedAt.toISOString(),
      here: row.id === signInId,
    }));
  }

  async endOne({ id }: Account, signInId: string): Promise<void> {
    if (!(await this.signIns.endOf(this.db, id, signInId))) throw notFound();
  }

  async endOthers({ id, signInId }: Account, db: Database = this.db): Promise<void> {
    await this.signIns.endAllOf(db, id, signInId);
  }

  async endAll(db: Database, accountId: string): Promise<void> {
    await this.signIns.endAllOf(db, accountId, null);
  }

  /** Everything kept about an account's sign-ins, for its export. */
  async recorded(db: Database, accountId: string) {
    const rows = await this.signIns.allOf(db, accountId);
    return rows.map(({ userAgent, createdAt, usedAt, endedAt }) => ({
      userAgent,
      createdAt,
      usedAt,
      endedAt,
    }));
  }

  private claimsOf(request: Request) {
    const cookies = request.cookies as Record<string, unknown> | undefined;
    const token = cookies?.[cookieName(this.env.PEGWELL_URL)];
    if (typeof token !== 'string') return null;
    try {
      return claimsSchema.parse(this.jwt.verify(token));
    } catch {
      return null;
    }
  }

  private setCookie(response: Response, sid: string, gen: number): void {
    const token = this.jwt.sign({ sid, gen }, { expiresIn: `${SIGN_IN_DAYS}d` });
    setSignInCookie(response, this.env.PEGWELL_URL, token);
  }
}
