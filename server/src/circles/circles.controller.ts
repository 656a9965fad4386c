import { Body, Controller, Get, Post, Put } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Circle } from '@pegwell/shared/contract/circles';
import { AsMember, Caller, ForAccounts, ForMembers, type Account, type Member } from '../common/access';
import { CircleDto, CreateCircleDto, SetUsualTuningsDto, UsualTuningsDto } from './circles.dto';
import { CirclesService } from './circles.service';
import { UsualTuningsService } from './usual-tunings.service';

@ApiTags('circles')
@Controller('circles')
export class CirclesController {
  constructor(
    private readonly circles: CirclesService,
    private readonly usual: UsualTuningsService,
  ) {}

  @Post()
  @ForAccounts()
  @ApiResponse({ status: 201, type: CircleDto.Output })
  create(@Caller() account: Account, @Body() body: CreateCircleDto): Promise<Circle> {
    return this.circles.create(account, body);
  }

  @Get(':circleId')
  @ForMembers('circle.read')
  @ApiParam({ name: 'circleId', format: 'uuid' })
  @ApiResponse({ status: 200, type: CircleDto.Output })
  get(@AsMember() member: Member): Promise<Circle> {
    return this.circles.get(member);
  }

  @Get(':circleId/usual-tunings')
  @ForMembers('circle.read')
  @ApiParam({ name: 'circleId', format: 'uuid' })
  @ApiResponse({ status: 200, type: UsualTuningsDto.Output })
  usualTunings(@AsMember() member: Member) {
    return this.usual.list(member);
  }

  @Put(':circleId/usual-tunings')
  @ForMembers('circle.change')
  @ApiParam({ name: 'circleId', format: 'uuid' })
  @ApiResponse({ status: 200, type: UsualTuningsDto.Output })
  setUsualTunings(@AsMember() member: Member, @Body() body: SetUsualTuningsDto) {
    return this.usual.replace(member, body);
  }
}
