import { Inject, Injectable } from '@nestjs/common';
import type { TuneFileFormat } from '@pegwell/shared/contract/tunes';
import { CirclesService } from '../../circles/circles.service';
import type { Member } from '../../common/access';
import { DATABASE, type RootDatabase } from '../../database/database';
import { TunesRepository } from '../tunes.repository';
import { writeAbc } from './write-abc';
import { writeCsv } from './write-csv';

export interface Download {
  readonly fileName: string;
  readonly mediaType: string;
  readonly text: string;
}

/** `text/csv`: RFC 7111; `text/vnd.abc`: IANA. */
const MEDIA_TYPES: Readonly<Record<TuneFileFormat, string>> = {
  csv: 'text/csv; charset=utf-8; header=present',
  abc: 'text/vnd.abc; charset=utf-8',
};

@Injectable()
export class ExportService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly tunes: TunesRepository,
    private readonly circles: CirclesService,
  ) {}

  async export(member: Member, format: TuneFileFormat): Promise<Download> {
    const { name } = await this.circles.row(this.db, member.circleId);
    const library = await this.tunes.all(this.db, member.circleId);
    const text = format === 'csv' ? writeCsv(library) : writeAbc(library);
    return { fileName: `${name} tunes.${format}`, mediaType: MEDIA_TYPES[format], text };
  }
}
