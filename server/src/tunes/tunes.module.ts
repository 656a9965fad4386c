import { Module } from '@nestjs/common';
import { CirclesModule } from '../circles/circles.module';
import { PlayableRepository } from './playable.repository';
import { PlayableService } from './playable.service';

@Module({
  imports: [CirclesModule],
  providers: [PlayableRepository, PlayableService],
  exports: [PlayableService],
})
export class TunesModule {}
