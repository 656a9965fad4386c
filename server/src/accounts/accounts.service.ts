import { Inject, Injectable } from '@nestjs/common';
import type { Login, Register, User } from '@pegwell/shared/contract/accounts';
import { emailKeyOf } from '../common/email-key';
import { ProblemException } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { AccountsRepository, type AccountRow } from './accounts.repository';
import { AddressService, emailTaken } from './address.service';
import { hashPassword, isHashedOtherwise, isPassword, refuseCommonPassword } from './passwords';
import { toUser } from './user';

type Person = Pick<Register, 'email' | 'displayName'>;

@Injectable()
export class AccountsService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly accounts: AccountsRepository,
    private readonly addresses: AddressService,
  ) {}

  async register(values: Register): Promise<User> {
    const passwordHash = await newPasswordHash(values);
    return this.db.transaction(async (tx) => {
      const row = await this.insert(tx, values, passwordHash, null);
      await this.addresses.askToConfirm(tx, row);
      return toUser(row);
    });
  }

  /** Accounts that nobody has to confirm, all with one password, hashed once: it takes a tenth of a second. */
  async createConfirmed(db: Database, people: readonly Person[], password: string): Promise<User[]> {
    const passwordHash = await hashPassword(password);
    const users: User[] = [];
    for (const person of people) {
      users.push(toUser(await this.insert(db, person, passwordHash, new Date())));
    }
    return users;
  }

  async checkPassword({ email, password }: Login): Promise<User> {
    const row = await this.accounts.byEmailKey(this.db, emailKeyOf(email));
    const right = await isPassword(password, row?.passwordHash ?? null);
    if (!row || !right) throw new ProblemException('wrong-credentials');
    if (isHashedOtherwise(row.passwordHash)) {
      await this.accounts.update(this.db, row.id, { passwordHash: await hashPassword(password) });
    }
    return toUser(row);
  }

  /** @throws wrong-password at `current`, which is no 401: a page would take the sign-in for ended */
  async checkPresent(accountId: string, current: string): Promise<AccountRow> {
    const row = await this.accounts.byId(this.db, accountId);
    if (row && (await isPassword(current, row.passwordHash))) return row;
    const message = 'This is not your password.';
    throw new ProblemException('wrong-password', message, { errors: [{ path: 'current', message }] });
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

  /** What is kept of the account itself, for its export. */
  async recorded(db: Database, accountId: string) {
    const row = await this.accounts.byId(db, accountId);
    if (!row) throw new ProblemException('not-signed-in');
    const { id, email, displayName, createdAt, confirmedAt } = row;
    return { id, email, displayName, createdAt, confirmedAt };
  }

  /** Takes the account away, and with it its sign-ins, links and memberships; what it did stays, without a name. */
  async remove(tx: Database, accountId: string): Promise<void> {
    await this.accounts.remove(tx, accountId);
  }

  private async insert(
    db: Database,
    { email, displayName }: Person,
    passwordHash: string,
    confirmedAt: Date | null,
  ): Promise<AccountRow> {
    const emailKey = emailKeyOf(email);
    const row = await this.accounts.insert(db, { email, emailKey, displayName, passwordHash, confirmedAt });
    if (!row) throw emailTaken();
    return row;
  }
}

function newPasswordHash({ email, displayName, password }: Register): Promise<string> {
  refuseCommonPassword(password, [email, displayName]);
  return hashPassword(password);
}
