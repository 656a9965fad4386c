import { Module } from '@nestjs/common';
import { APP_INTERCEPTOR } from '@nestjs/core';
import { CirclesModule } from '../circles/circles.module';
import { SessionsModule } from '../sessions/sessions.module';
import { CaughtUpInterceptor } from './caught-up.interceptor';
import { FollowController } from './follow.controller';
import { FollowListener } from './follow-listener';
import { FollowService } from './follow.service';
import { LiveController } from './live.controller';
import { LiveRepository } from './live.repository';
import { LiveService } from './live.service';
import { PlaysRepository } from './plays.repository';
import { RecordController } from './record.controller';
import { RecordService } from './record.service';

@Module({
  imports: [CirclesModule, SessionsModule],
  controllers: [LiveController, FollowController, RecordController],
  providers: [
    { provide: APP_INTERCEPTOR, useClass: CaughtUpInterceptor },
    FollowListener,
    FollowService,
    LiveRepository,
    LiveService,
    PlaysRepository,
    RecordService,
  ],
})
export class LiveModule {}
