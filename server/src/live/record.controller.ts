import { Controller, Get, Param, Query } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { CirclePlay, Play } from '@pegwell/shared/contract/live';
import type { Page } from '@pegwell/shared/contract/page';
import { AsMember, ForMembers, ForSessionMembers, type Member } from '../common/access';
import { PageQueryDto } from '../common/page.dto';
import { CirclePlayPageDto, PlaysDto } from './live.dto';
import { RecordService } from './record.service';

@ApiTags('record')
@Controller()
export class RecordController {
  constructor(private readonly record: RecordService) {}

  @Get('sessions/:id/plays')
  @ForSessionMembers('record.read')
  @ApiResponse({ status: 200, type: PlaysDto.Output, description: 'In the order of playing.' })
  ofSession(@Param('id') id: string): Promise<{ items: Play[] }> {
    return this.record.ofSession(id);
  }

  @Get('circles/:circleId/plays')
  @ForMembers('record.read')
  @ApiParam({ name: 'circleId', format: 'uuid' })
  @ApiResponse({ status: 200, type: CirclePlayPageDto.Output, description: 'Newest first.' })
  ofCircle(@AsMember() member: Member, @Query() query: PageQueryDto): Promise<Page<CirclePlay>> {
    return this.record.ofCircle(member, query);
  }
}
