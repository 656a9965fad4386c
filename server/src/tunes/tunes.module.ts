import { Module } from '@nestjs/common';
import { CirclesModule } from '../circles/circles.module';
import { ExportService } from './files/export.service';
import { ImportProgressRepository } from './files/import-progress.repository';
import { ImportService } from './files/import.service';
import { ImportThread } from './files/import-thread';
import { ImportUndoService } from './files/import-undo.service';
import { TuneFilesController } from './files/tune-files.controller';
import { PlayableRepository } from './playable.repository';
import { PlayableService } from './playable.service';
import { TuneWritesRepository } from './tune-writes.repository';
import { TunesController } from './tunes.controller';
import { TunesRepository } from './tunes.repository';
import { TunesService } from './tunes.service';

@Module({
  imports: [CirclesModule],
  // Files first: `export` is not the id of a tune.
  controllers: [TuneFilesController, TunesController],
  providers: [
    ExportService,
    ImportProgressRepository,
    ImportService,
    ImportThread,
    ImportUndoService,
    PlayableRepository,
    PlayableService,
    TuneWritesRepository,
    TunesRepository,
    TunesService,
  ],
  exports: [ImportService, PlayableService, TunesService],
})
export class TunesModule {}
