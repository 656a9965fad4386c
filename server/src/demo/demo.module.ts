import { Module } from '@nestjs/common';
import { AccountsModule } from '../accounts/accounts.module';
import { CirclesModule } from '../circles/circles.module';
import { RacksModule } from '../racks/racks.module';
import { SessionsModule } from '../sessions/sessions.module';
import { TunesModule } from '../tunes/tunes.module';
import { DemoRepository } from './demo.repository';
import { DemoService } from './demo.service';

@Module({
  imports: [AccountsModule, CirclesModule, RacksModule, SessionsModule, TunesModule],
  providers: [DemoRepository, DemoService],
})
export class DemoModule {}
