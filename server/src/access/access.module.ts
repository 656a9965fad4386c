import { Module } from '@nestjs/common';
import { APP_GUARD } from '@nestjs/core';
import { AccountsModule } from '../accounts/accounts.module';
import { CirclesModule } from '../circles/circles.module';
import { SessionsModule } from '../sessions/sessions.module';
import { AccessGuard } from './access.guard';

@Module({
  imports: [AccountsModule, CirclesModule, SessionsModule],
  providers: [{ provide: APP_GUARD, useClass: AccessGuard }],
})
export class AccessModule {}
