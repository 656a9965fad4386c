import { Module } from '@nestjs/common';
import { AccountsModule } from '../accounts/accounts.module';
import { CirclesController } from './circles.controller';
import { CirclesRepository } from './circles.repository';
import { CirclesService } from './circles.service';
import { DepartureRepository } from './departure.repository';
import { DepartureService } from './departure.service';
import { HistoryController } from './history.controller';
import { HistoryRepository } from './history.repository';
import { HistoryService } from './history.service';
import { MembersController } from './members.controller';
import { MembersService } from './members.service';
import { UsualTuningsService } from './usual-tunings.service';

@Module({
  imports: [AccountsModule],
  controllers: [CirclesController, MembersController, HistoryController],
  providers: [
    CirclesRepository,
    CirclesService,
    DepartureRepository,
    DepartureService,
    HistoryRepository,
    HistoryService,
    MembersService,
    UsualTuningsService,
  ],
  exports: [CirclesService, DepartureService, HistoryService, MembersService, UsualTuningsService],
})
export class CirclesModule {}
