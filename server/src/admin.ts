import 'reflect-metadata';
import { randomBytes } from 'node:crypto';
import { NestFactory } from '@nestjs/core';
import { registerSchema } from '@pegwell/shared/contract/accounts';
import { AccountsService } from './accounts/accounts.service';
import { RecoveryService } from './accounts/recovery.service';
import { AppModule } from './app.module';
import { createPool, DATABASE, type RootDatabase } from './database/database';
import { migrateDatabase } from './database/migrate';
import { parseEnv } from './env';

const HELP = `admin account ADDRESS NAME   makes an account, and prints the link by which its owner chooses a password
admin reset ADDRESS          prints such a link for an account that is there; all its sign-ins end when it is used`;

/**
 * What whoever runs the server may do without an account: begin, and let somebody in again. No password is typed or
 * printed here: a link is good once, for an hour, and whoever opens it chooses their own.
 */
async function main([word, address, ...name]: readonly string[]): Promise<void> {
  if ((word !== 'account' && word !== 'reset') || !address) throw new Error(HELP);
  const env = parseEnv({ ...process.env, PEGWELL_LOG: 'error' });
  const pool = createPool(env.DATABASE_URL);
  await migrateDatabase(pool).finally(() => pool.end());
  const app = await NestFactory.createApplicationContext(AppModule.with(env), { logger: ['error'] });
  try {
    if (word === 'account') {
      // A password that nobody knows, until the link is used.
      const password = randomBytes(32).toString('base64url');
      const values = registerSchema.parse({
        email: address,
        displayName: name.join(' ') || address,
        password,
      });
      await app
        .get(AccountsService)
        .createConfirmed(app.get<RootDatabase>(DATABASE), [values], values.password);
    }
    const link = await app.get(RecoveryService).linkFor(address);
    if (link === null) throw new Error(`Nobody has an account with the address ${address}.`);
    process.stdout.write(`Good once, for an hour:\n${link}\n`);
  } finally {
    await app.close();
  }
}

main(process.argv.slice(2)).catch((error: unknown) => {
  const { message, issues } = error as { message?: string; issues?: readonly { message: string }[] };
  const words = issues ? issues.map((issue) => issue.message).join('\n') : (message ?? String(error));
  process.stderr.write(`${words}\n`);
  process.exitCode = 1;
});
