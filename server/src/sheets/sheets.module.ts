import { Module } from '@nestjs/common';
import { SessionsModule } from '../sessions/sessions.module';
import { TunesModule } from '../tunes/tunes.module';
import { Press } from './press/press';
import { SheetsController } from './sheets.controller';
import { SheetsService } from './sheets.service';

@Module({
  imports: [SessionsModule, TunesModule],
  controllers: [SheetsController],
  providers: [{ provide: Press, useFactory: () => new Press() }, SheetsService],
})
export class SheetsModule {}
