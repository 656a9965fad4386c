import {
  Body,
  Controller,
  Get,
  HttpCode,
  Param,
  Post,
  Query,
  StreamableFile,
  UploadedFile,
  UseInterceptors,
} from '@nestjs/common';
import { ApiBody, ApiConsumes, ApiParam, ApiProduces, ApiResponse, ApiTags } from '@nestjs/swagger';
import type {
  ImportProgress,
  ImportReport,
  ImportUndone,
  RecentImports,
} from '@pegwell/shared/contract/tunes';
import { AsMember, ForMembers, type Member } from '../../common/access';
import { contentDisposition } from '../../common/content-disposition';
import { PathIdPipe } from '../../common/path-id.pipe';
import { ProblemException } from '../../common/problem';
import { AtOnce } from '../../limits/at-once';
import { Limited } from '../../limits/limited';
import {
  ExportQueryDto,
  ImportProgressDto,
  ImportQueryDto,
  ImportReportDto,
  ImportUndoneDto,
  RecentImportsDto,
} from '../tunes.dto';
import { ExportService } from './export.service';
import { readChoices } from './import-choices';
import { ImportService } from './import.service';
import { ImportUndoService } from './import-undo.service';
import { formatOf, TuneFileInterceptor, type UploadedTuneFile } from './tune-file.interceptor';

@ApiTags('tunes')
@ApiParam({ name: 'circleId', format: 'uuid' })
@Controller('circles/:circleId/tunes')
export class TuneFilesController {
  constructor(
    private readonly imports: ImportService,
    private readonly undoing: ImportUndoService,
    private readonly exports: ExportService,
  ) {}

  @Post('import')
  @HttpCode(200)
  @ForMembers('tunes.change')
  @Limited('import')
  @AtOnce('import')
  @UseInterceptors(TuneFileInterceptor)
  @ApiConsumes('multipart/form-data')
  @ApiBody({
    schema: {
      type: 'object',
      properties: {
        file: { type: 'string', format: 'binary' },
        choices: {
          type: 'string',
          description: 'What becomes of tunes of the file, as JSON (ImportChoice[]).',
        },
      },
      required: ['file'],
    },
  })
  @ApiResponse({ status: 200, type: ImportReportDto.Output })
  import(
    @AsMember() member: Member,
    @Query() query: ImportQueryDto,
    @UploadedFile() file: UploadedTuneFile | undefined,
    @Body('choices') choices: unknown,
  ): Promise<ImportReport> {
    if (!file) {
      const message = 'A file is missing: it comes as "file" in multipart/form-data.';
      throw new ProblemException('not-valid', message, { errors: [{ path: 'file', message }] });
    }
    const format = query.pasted ? null : formatOf(file.originalname);
    return this.imports.import(member, { format, bytes: file.buffer }, query, readChoices(choices));
  }

  @Get('imports')
  @ForMembers('tunes.change')
  @ApiResponse({ status: 200, type: RecentImportsDto.Output })
  recent(@AsMember() member: Member): Promise<RecentImports> {
    return this.undoing.recent(member);
  }

  @Get('imports/:importId')
  @ForMembers('tunes.change')
  @ApiParam({ name: 'importId', format: 'uuid' })
  @ApiResponse({ status: 200, type: ImportProgressDto.Output })
  watch(
    @AsMember() member: Member,
    @Param('importId', PathIdPipe) importId: string,
  ): Promise<ImportProgress> {
    return this.imports.watch(member, importId);
  }

  @Post('imports/:importId/undo')
  @HttpCode(200)
  @ForMembers('tunes.change')
  @ApiParam({ name: 'importId', format: 'uuid' })
  @ApiResponse({ status: 200, type: ImportUndoneDto.Output })
  undo(@AsMember() member: Member, @Param('importId', PathIdPipe) importId: string): Promise<ImportUndone> {
    return this.undoing.undo(member, importId);
  }

  @Get('export')
  @ForMembers('tunes.read')
  @ApiProduces('text/csv', 'text/vnd.abc')
  @ApiResponse({ status: 200, schema: { type: 'string' } })
  async export(@AsMember() member: Member, @Query() { format }: ExportQueryDto): Promise<StreamableFile> {
    const { text, mediaType, fileName } = await this.exports.export(member, format);
    return new StreamableFile(Buffer.from(text), {
      type: mediaType,
      disposition: contentDisposition(fileName),
    });
  }
}
