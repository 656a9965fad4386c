import { Module } from '@nestjs/common';
import { SessionsModule } from '../sessions/sessions.module';
import { RacksController } from './racks.controller';
import { RacksRepository } from './racks.repository';
import { RacksService } from './racks.service';

@Module({
  imports: [SessionsModule],
  controllers: [RacksController],
  providers: [RacksRepository, RacksService],
  exports: [RacksService],
})
export class RacksModule {}
