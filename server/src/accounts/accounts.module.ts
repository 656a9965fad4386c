import { Module } from '@nestjs/common';
import { JwtModule } from '@nestjs/jwt';
import { ENV, type Env } from '../env';
import { AccountsRepository } from './accounts.repository';
import { AccountsService } from './accounts.service';
import { SignInsService } from './sign-ins.service';

@Module({
  imports: [
    JwtModule.registerAsync({
      inject: [ENV],
      useFactory: (env: Env) => ({
        secret: env.PEGWELL_SECRET,
        // Named, so that a token signed in any other way (or not at all) is none.
        signOptions: { algorithm: 'HS256' as const },
        verifyOptions: { algorithms: ['HS256' as const] },
      }),
    }),
  ],
  providers: [AccountsRepository, AccountsService, SignInsService],
  exports: [AccountsService, SignInsService],
})
export class AccountsModule {}
