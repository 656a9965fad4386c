import { Module } from '@nestjs/common';
import { CirclesModule } from '../circles/circles.module';
import { SessionsModule } from '../sessions/sessions.module';
import { AccountsController } from './accounts.controller';
import { AccountsModule } from './accounts.module';
import { LeavingService } from './leaving.service';
import { LinksController } from './links.controller';
import { OwnAccountController } from './own-account.controller';
import { OwnDataService } from './own-data.service';

/** The account routes stand above circles (`me` lists them); the account rules stand below. */
@Module({
  imports: [AccountsModule, CirclesModule, SessionsModule],
  controllers: [AccountsController, LinksController, OwnAccountController],
  providers: [LeavingService, OwnDataService],
})
export class AccountsRoutesModule {}
