import { Inject, Injectable } from '@nestjs/common';
import { JwtService } from '@nestjs/jwt';
import type { Request, Response } from 'express';
import { z } from 'zod';
import type { Account } from '../common/access';
import { DATABASE, type RootDatabase } from '../database/database';
import { ENV, type Env } from '../env';
import { AccountsRepository } from './accounts.repository';
import { clearSignInCookie, cookieName, setSignInCookie, SIGN_IN_DAYS } from './cookie';

/** A cookie older than this gets a successor with the answer to an ordinary request. */
const RENEW_AFTER_MS = 12 * 3_600_000;
/** The same successor again within this time: the first answer was lost, or two requests met. */
const GRACE_MS = 60_000;

const claimsSchema = z.object({ sid: z.guid(), gen: z.number().int(), iat: z.number().int() });

/** Sign-ins are rows; the cookie carries only the row's id and generation, signed. */
@Injectable()
export class SignInsService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    @Inject(ENV) private readonly env: Env,
    private readonly jwt: JwtService,
    private readonly accounts: AccountsRepository,
  ) {}

  async begin(accountId: string, request: Request, response: Response): Promise<void> {
    const userAgent = request.headers['user-agent']?.slice(0, 300) ?? null;
    const row = await this.accounts.insertSignIn(this.db, accountId, userAgent);
    this.setCookie(response, row.id, row.generation);
  }

  async end(signInId: string, response: Response): Promise<void> {
    await this.accounts.endSignIn(this.db, signInId);
    clearSignInCookie(response, this.env.PEGWELL_URL);
  }

  /** The account whose sign-in the cookie names, or null; renews the cookie when it is due. */
  async accountOf(request: Request, response: Response): Promise<Account | null> {
    const claims = this.claimsOf(request);
    if (!claims) return null;
    const found = await this.accounts.openSignIn(this.db, claims.sid);
    if (!found) return null;
    const { signIn, account } = found;
    if (claims.gen !== signIn.generation) {
      const late = Date.now() - signIn.renewedAt.getTime() > GRACE_MS;
      if (claims.gen !== signIn.generation - 1 || late) {
        // A cookie that was replaced long ago is in use: one of the two was copied. Both end.
        await this.accounts.endSignIn(this.db, signIn.id);
        return null;
      }
      this.setCookie(response, signIn.id, signIn.generation);
    } else if (Date.now() - signIn.renewedAt.getTime() > RENEW_AFTER_MS) {
      await this.accounts.renewSignIn(this.db, signIn.id, signIn.generation);
      // Whoever was first, the successor is the same.
      this.setCookie(response, signIn.id, signIn.generation + 1);
    }
    return { id: account.id, email: account.email, displayName: account.displayName, signInId: signIn.id };
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
