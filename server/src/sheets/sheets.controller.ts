import { Controller, Get, Param, Query, Res } from '@nestjs/common';
import { ApiProduces, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Response } from 'express';
import { ForSessionMembers } from '../common/access';
import { contentDisposition } from '../common/content-disposition';
import { fileName } from './file-name';
import { SheetQueryDto } from './sheets.dto';
import { SheetsService, type NamedFile } from './sheets.service';

const FILE = { schema: { type: 'string', format: 'binary' } } as const;

@ApiTags('sheets')
@Controller('sessions/:id')
export class SheetsController {
  constructor(private readonly sheets: SheetsService) {}

  @Get('sheet.pdf')
  @ForSessionMembers('sessions.read')
  @ApiProduces('application/pdf')
  @ApiResponse({ status: 200, description: 'The set sheet.', ...FILE })
  async sheet(
    @Param('id') id: string,
    @Query() { paper }: SheetQueryDto,
    @Res() response: Response,
  ): Promise<void> {
    send(response, await this.sheets.sheet(id, paper), 'application/pdf', 'pdf');
  }

  @Get('calendar.ics')
  @ForSessionMembers('sessions.read')
  @ApiProduces('text/calendar')
  @ApiResponse({ status: 200, description: 'The evening as an event (RFC 5545).', ...FILE })
  async calendar(@Param('id') id: string, @Res() response: Response): Promise<void> {
    send(response, await this.sheets.calendar(id), 'text/calendar; charset=utf-8', 'ics');
  }
}

function send(response: Response, { title, bytes }: NamedFile, type: string, extension: string): void {
  response
    .set({
      'Content-Type': type,
      'Content-Disposition': contentDisposition(fileName(title, extension)),
    })
    .send(bytes);
}
