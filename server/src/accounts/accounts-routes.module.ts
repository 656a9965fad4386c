import { Module } from '@nestjs/common';
import { CirclesModule } from '../circles/circles.module';
import { AccountsController } from './accounts.controller';
import { AccountsModule } from './accounts.module';

/** The account routes stand above circles (`me` lists them); the account rules stand below. */
@Module({ imports: [AccountsModule, CirclesModule], controllers: [AccountsController] })
export class AccountsRoutesModule {}
