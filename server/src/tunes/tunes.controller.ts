import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Page } from '@pegwell/shared/contract/page';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { AsMember, ForMembers, type Member } from '../common/access';
import { PathIdPipe } from '../common/path-id.pipe';
import { CreateTuneDto, TuneDto, TunePageDto, TuneQueryDto, UpdateTuneDto } from './tunes.dto';
import { TunesService } from './tunes.service';

@ApiTags('tunes')
@ApiParam({ name: 'circleId', format: 'uuid' })
@Controller('circles/:circleId/tunes')
export class TunesController {
  constructor(private readonly tunes: TunesService) {}

  @Get()
  @ForMembers('tunes.read')
  @ApiResponse({ status: 200, type: TunePageDto.Output })
  list(@AsMember() member: Member, @Query() query: TuneQueryDto): Promise<Page<Tune>> {
    return this.tunes.list(member, query);
  }

  @Post()
  @ForMembers('tunes.change')
  @ApiResponse({ status: 201, type: TuneDto.Output })
  create(@AsMember() member: Member, @Body() body: CreateTuneDto): Promise<Tune> {
    return this.tunes.create(member, body);
  }

  @Get(':tuneId')
  @ForMembers('tunes.read')
  @ApiParam({ name: 'tuneId', format: 'uuid' })
  @ApiResponse({ status: 200, type: TuneDto.Output })
  get(@AsMember() member: Member, @Param('tuneId', PathIdPipe) tuneId: string): Promise<Tune> {
    return this.tunes.get(member, tuneId);
  }

  @Patch(':tuneId')
  @ForMembers('tunes.change')
  @ApiParam({ name: 'tuneId', format: 'uuid' })
  @ApiResponse({ status: 200, type: TuneDto.Output })
  change(
    @AsMember() member: Member,
    @Param('tuneId', PathIdPipe) tuneId: string,
    @Body() body: UpdateTuneDto,
  ): Promise<Tune> {
    return this.tunes.change(member, tuneId, body);
  }

  @Delete(':tuneId')
  @HttpCode(204)
  @ForMembers('tunes.change')
  @ApiParam({ name: 'tuneId', format: 'uuid' })
  @ApiResponse({ status: 204 })
  remove(@AsMember() member: Member, @Param('tuneId', PathIdPipe) tuneId: string): Promise<void> {
    return this.tunes.remove(member, tuneId);
  }

  @Post(':tuneId/restore')
  @HttpCode(200)
  @ForMembers('tunes.change')
  @ApiParam({ name: 'tuneId', format: 'uuid' })
  @ApiResponse({ status: 200, type: TuneDto.Output })
  restore(@AsMember() member: Member, @Param('tuneId', PathIdPipe) tuneId: string): Promise<Tune> {
    return this.tunes.restore(member, tuneId);
  }
}
