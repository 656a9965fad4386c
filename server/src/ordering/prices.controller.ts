import { Controller, Get, Param, Query } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { PricedTunePage, TunePrices } from '@pegwell/shared/contract/prices';
import { AsMember, ForSessionMembers, type Member } from '../common/access';
import { PathIdPipe } from '../common/path-id.pipe';
import { PricedTunePageDto, PriceQueryDto, TunePricesDto } from './prices.dto';
import { PricesService } from './prices.service';

@ApiTags('ordering')
@ApiParam({ name: 'id', format: 'uuid' })
@Controller('sessions/:id/prices')
export class PricesController {
  constructor(private readonly prices: PricesService) {}

  @Get()
  @ForSessionMembers('sessions.read')
  @ApiResponse({ status: 200, type: PricedTunePageDto.Output })
  library(
    @AsMember() member: Member,
    @Param('id') id: string,
    @Query() query: PriceQueryDto,
  ): Promise<PricedTunePage> {
    return this.prices.library(member, id, query);
  }

  @Get(':tuneId')
  @ForSessionMembers('sessions.read')
  @ApiParam({ name: 'tuneId', format: 'uuid' })
  @ApiResponse({ status: 200, type: TunePricesDto.Output })
  everywhere(
    @AsMember() member: Member,
    @Param('id') id: string,
    @Param('tuneId', PathIdPipe) tuneId: string,
  ): Promise<TunePrices> {
    return this.prices.everywhere(member, id, tuneId);
  }
}
