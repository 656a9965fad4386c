import { Module } from '@nestjs/common';
import { CirclesModule } from '../circles/circles.module';
import { PlayableRepository } from './playable.repository';
import { PlayableService } from './playable.service';
import { TuneWritesRepository } from './tune-writes.repository';
import { TunesController } from './tunes.controller';
import { TunesRepository } from './tunes.repository';
import { TunesService } from './tunes.service';

@Module({
  imports: [CirclesModule],
  controllers: [TunesController],
  providers: [PlayableRepository, PlayableService, TunesRepository, TuneWritesRepository, TunesService],
  exports: [PlayableService, TunesService],
})
export class TunesModule {}
