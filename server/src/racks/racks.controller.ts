import { Body, Controller, Delete, Get, HttpCode, Param, Post, Put } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Rack, Racks } from '@pegwell/shared/contract/racks';
import { ForSessionMembers } from '../common/access';
import { PathIdPipe } from '../common/path-id.pipe';
import { CreateRackDto, PutRackDto, RackDto, RacksDto } from './racks.dto';
import { RacksService } from './racks.service';

@ApiTags('racks')
@Controller('sessions/:id/racks')
export class RacksController {
  constructor(private readonly racks: RacksService) {}

  @Get()
  @ForSessionMembers('sessions.read')
  @ApiResponse({ status: 200, type: RacksDto.Output, description: 'In the order of adding.' })
  list(@Param('id') id: string): Promise<Racks> {
    return this.racks.list(id);
  }

  @Post()
  @ForSessionMembers('sessions.change')
  @ApiResponse({ status: 201, type: RackDto.Output })
  create(@Param('id') id: string, @Body() body: CreateRackDto): Promise<Rack> {
    return this.racks.create(id, body);
  }

  @Put(':rackId')
  @ForSessionMembers('sessions.change')
  @ApiParam({ name: 'rackId', format: 'uuid' })
  @ApiResponse({ status: 200, type: RackDto.Output })
  @ApiResponse({ status: 409, description: 'Changed meanwhile; `current` is the rack.' })
  put(
    @Param('id') id: string,
    @Param('rackId', PathIdPipe) rackId: string,
    @Body() body: PutRackDto,
  ): Promise<Rack> {
    return this.racks.put(id, rackId, body);
  }

  @Delete(':rackId')
  @HttpCode(204)
  @ForSessionMembers('sessions.change')
  @ApiParam({ name: 'rackId', format: 'uuid' })
  @ApiResponse({ status: 204 })
  remove(@Param('id') id: string, @Param('rackId', PathIdPipe) rackId: string): Promise<void> {
    return this.racks.remove(id, rackId);
  }
}
