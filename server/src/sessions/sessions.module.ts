import { Module } from '@nestjs/common';
import { AccountsModule } from '../accounts/accounts.module';
import { CirclesModule } from '../circles/circles.module';
import { TunesModule } from '../tunes/tunes.module';
import { BoardRepository } from './board.repository';
import { BoardService } from './board.service';
import { EveningTracesRepository } from './evening-traces.repository';
import { EveningTracesService } from './evening-traces.service';
import { EveningsService } from './evenings.service';
import { SessionsController } from './sessions.controller';
import { SessionsRepository } from './sessions.repository';
import { SessionsService } from './sessions.service';

@Module({
  imports: [AccountsModule, CirclesModule, TunesModule],
  controllers: [SessionsController],
  providers: [
    BoardRepository,
    BoardService,
    EveningTracesRepository,
    EveningTracesService,
    EveningsService,
    SessionsRepository,
    SessionsService,
  ],
  exports: [BoardService, EveningTracesService, EveningsService, SessionsService],
})
export class SessionsModule {}
