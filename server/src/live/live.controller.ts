import { Body, Controller, Get, HttpCode, Param, Post } from '@nestjs/common';
import { ApiResponse, ApiTags } from '@nestjs/swagger';
import type { LiveState } from '@pegwell/shared/contract/live';
import { AsMember, ForSessionMembers, type Member } from '../common/access';
import { LiveStateDto, LiveStepDto } from './live.dto';
import { LiveService } from './live.service';

@ApiTags('live')
@Controller('sessions/:id/live')
export class LiveController {
  constructor(private readonly live: LiveService) {}

  @Get()
  @ForSessionMembers('sessions.read')
  @ApiResponse({ status: 200, type: LiveStateDto.Output })
  get(@Param('id') id: string): Promise<LiveState> {
    return this.live.get(id);
  }

  @Post()
  @HttpCode(200)
  @ForSessionMembers('live.run')
  @ApiResponse({ status: 200, type: LiveStateDto.Output })
  @ApiResponse({ status: 409, description: 'Another host took a step meanwhile; `current` is the state.' })
  @ApiResponse({ status: 422, description: 'This step cannot be taken from where the evening stands.' })
  step(@AsMember() member: Member, @Param('id') id: string, @Body() body: LiveStepDto): Promise<LiveState> {
    return this.live.step(member, id, body);
  }
}
