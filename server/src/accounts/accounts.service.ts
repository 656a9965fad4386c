import { Inject, Injectable } from '@nestjs/common';
import type { Login, Register, User } from '@pegwell/shared/contract/accounts';
import { compare, hash } from 'bcryptjs';
import { ProblemException } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { AccountsRepository, type AccountRow } from './accounts.repository';
import { isCommonPassword } from './common-passwords';

/** About 60 ms here with bcryptjs on one core. */
const BCRYPT_COST = 10;
/** Compared against when nobody has the address, so that the answer takes as long. */
const NOBODY = '$2b$10$Cm.wOXmEPxSHEB7ILtt8mOr5As.iD.SYYbKvb37JXrUip7fzuxBRS';

@Injectable()
export class AccountsService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly accounts: AccountsRepository,
  ) {}

  async register(values: Register): Promise<User> {
    return toUser(await this.create(this.db, values));
  }

  /** Also for the demo, inside its transaction. */
  async create(db: Database, { email, password, displayName }: Register): Promise<AccountRow> {
    if (isCommonPassword(password)) {
      const message = 'This password is among the first that anybody would try. Take another.';
      throw new ProblemException('not-valid', message, { errors: [{ path: 'password', message }] });
    }
    const passwordHash = await hash(password, BCRYPT_COST);
    const row = await this.accounts.insert(db, {
      email,
      emailKey: emailKeyOf(email),
      displayName,
      passwordHash,
    });
    if (!row) {
      const message = 'An account with this e-mail exists. Sign in instead.';
      throw new ProblemException('email-taken', message, { errors: [{ path: 'email', message }] });
    }
    return row;
  }

  async checkPassword({ email, password }: Login): Promise<User> {
    const row = await this.accounts.byEmailKey(this.db, emailKeyOf(email));
    const right = await compare(password, row?.passwordHash ?? NOBODY);
    if (!row || !right) throw new ProblemException('wrong-credentials');
    return toUser(row);
  }

  async byIds(db: Database, accountIds: readonly string[]): Promise<Map<string, User>> {
    const rows = await this.accounts.byIds(db, accountIds);
    return new Map(rows.map((row) => [row.id, toUser(row)]));
  }

  async displayName(db: Database, accountId: string): Promise<string | null> {
    return (await this.byIds(db, [accountId])).get(accountId)?.displayName ?? null;
  }

  async byEmail(db: Database, email: string): Promise<User | null> {
    const row = await this.accounts.byEmailKey(db, emailKeyOf(email));
    return row && toUser(row);
  }
}

export function toUser(row: AccountRow): User {
  return { id: row.id, email: row.email, displayName: row.displayName };
}

/** What addresses are compared by: compatibility forms and case folded away. */
export function emailKeyOf(email: string): string {
  return email.trim().normalize('NFKC').toLowerCase();
}
