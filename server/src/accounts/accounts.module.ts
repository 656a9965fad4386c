import { createSecretKey } from 'node:crypto';
import { Module } from '@nestjs/common';
import { JwtModule } from '@nestjs/jwt';
import { ENV, type Env } from '../env';
import { MailModule } from '../mail/mail.module';
import { AccountLetters } from './account-letters';
import { AccountsRepository } from './accounts.repository';
import { AccountsService } from './accounts.service';
import { AddressService } from './address.service';
import { LinksRepository } from './links.repository';
import { LinksService } from './links.service';
import { OwnAccountService } from './own-account.service';
import { RecoveryService } from './recovery.service';
import { SignInsRepository } from './sign-ins.repository';
import { SignInsService } from './sign-ins.service';

@Module({
  imports: [
    MailModule,
    JwtModule.registerAsync({
      inject: [ENV],
      useFactory: (env: Env) => ({
        // A key, not its text: jsonwebtoken would try to read the text as a public key with every request (1 ms).
        secret: createSecretKey(env.PEGWELL_SECRET, 'utf8'),
        // Named, so that a token signed in any other way (or not at all) is none.
        signOptions: { algorithm: 'HS256' as const },
        verifyOptions: { algorithms: ['HS256' as const] },
      }),
    }),
  ],
  providers: [
    AccountLetters,
    AccountsRepository,
    AccountsService,
    AddressService,
    LinksRepository,
    LinksService,
    OwnAccountService,
    RecoveryService,
    SignInsRepository,
    SignInsService,
  ],
  exports: [AccountsService, AddressService, OwnAccountService, RecoveryService, SignInsService],
})
export class AccountsModule {}
