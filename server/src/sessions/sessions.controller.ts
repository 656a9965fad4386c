import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Put, Query } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Page } from '@pegwell/shared/contract/page';
import type { Session, SessionSummary } from '@pegwell/shared/contract/sessions';
import { AsMember, ForMembers, ForSessionMembers, type Member } from '../common/access';
import { PageQueryDto } from '../common/page.dto';
import { BoardService } from './board.service';
import { CreateSessionDto, PutBoardDto, SessionDto, SessionPageDto, UpdateSessionDto } from './sessions.dto';
import { SessionsService } from './sessions.service';

@ApiTags('sessions')
@Controller()
export class SessionsController {
  constructor(
    private readonly sessions: SessionsService,
    private readonly board: BoardService,
  ) {}

  @Get('circles/:circleId/sessions')
  @ForMembers('sessions.read')
  @ApiParam({ name: 'circleId', format: 'uuid' })
  @ApiResponse({ status: 200, type: SessionPageDto.Output })
  list(@AsMember() member: Member, @Query() query: PageQueryDto): Promise<Page<SessionSummary>> {
    return this.sessions.list(member, query);
  }

  @Post('circles/:circleId/sessions')
  @ForMembers('sessions.change')
  @ApiParam({ name: 'circleId', format: 'uuid' })
  @ApiResponse({ status: 201, type: SessionDto.Output })
  create(@AsMember() member: Member, @Body() body: CreateSessionDto): Promise<Session> {
    return this.sessions.create(member, body);
  }

  @Get('sessions/:id')
  @ForSessionMembers('sessions.read')
  @ApiResponse({ status: 200, type: SessionDto.Output })
  get(@AsMember() member: Member, @Param('id') id: string): Promise<Session> {
    return this.sessions.get(member, id);
  }

  @Patch('sessions/:id')
  @ForSessionMembers('sessions.change')
  @ApiResponse({ status: 200, type: SessionDto.Output })
  update(
    @AsMember() member: Member,
    @Param('id') id: string,
    @Body() body: UpdateSessionDto,
  ): Promise<Session> {
    return this.sessions.update(member, id, body);
  }

  @Delete('sessions/:id')
  @HttpCode(204)
  @ForSessionMembers('sessions.change')
  @ApiResponse({ status: 204, description: 'Removed; it goes for good after thirty days.' })
  remove(@AsMember() member: Member, @Param('id') id: string): Promise<void> {
    return this.sessions.remove(member, id);
  }

  @Post('sessions/:id/code')
  @HttpCode(200)
  @ForSessionMembers('sessions.change')
  @ApiResponse({ status: 200, type: SessionDto.Output, description: 'With a new code; the old one is void.' })
  changeCode(@AsMember() member: Member, @Param('id') id: string): Promise<Session> {
    return this.sessions.changeCode(member, id);
  }

  @Put('sessions/:id/board')
  @ForSessionMembers('sessions.change')
  @ApiResponse({ status: 200, type: SessionDto.Output })
  @ApiResponse({ status: 409, description: 'Changed meanwhile; `current` is the session.' })
  putBoard(@AsMember() member: Member, @Param('id') id: string, @Body() body: PutBoardDto): Promise<Session> {
    return this.board.put(member, id, body);
  }
}
