import { Controller, Get, Query } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Happened } from '@pegwell/shared/contract/history';
import type { Page } from '@pegwell/shared/contract/page';
import { AsMember, ForMembers, type Member } from '../common/access';
import { PageQueryDto } from '../common/page.dto';
import { HappenedPageDto } from './circles.dto';
import { HistoryService } from './history.service';

@ApiTags('circles')
@ApiParam({ name: 'circleId', format: 'uuid' })
@Controller('circles/:circleId/history')
export class HistoryController {
  constructor(private readonly history: HistoryService) {}

  @Get()
  @ForMembers('history.read')
  @ApiResponse({ status: 200, type: HappenedPageDto.Output })
  page(@AsMember() member: Member, @Query() query: PageQueryDto): Promise<Page<Happened>> {
    return this.history.page(member, query);
  }
}
