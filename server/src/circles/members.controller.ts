import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { CircleMember } from '@pegwell/shared/contract/circles';
import type { Page } from '@pegwell/shared/contract/page';
import { AsMember, ForMembers, type Member } from '../common/access';
import { PageQueryDto } from '../common/page.dto';
import { PathIdPipe } from '../common/path-id.pipe';
import { AddMemberDto, ChangeMemberDto, MemberDto, MemberPageDto } from './circles.dto';
import { MembersService } from './members.service';

@ApiTags('circles')
@ApiParam({ name: 'circleId', format: 'uuid' })
@Controller('circles/:circleId')
export class MembersController {
  constructor(private readonly members: MembersService) {}

  @Get('members')
  @ForMembers('members.read')
  @ApiResponse({ status: 200, type: MemberPageDto.Output })
  list(@AsMember() member: Member, @Query() query: PageQueryDto): Promise<Page<CircleMember>> {
    return this.members.list(member, query);
  }

  @Post('members')
  @ForMembers('members.change')
  @ApiResponse({ status: 201, type: MemberDto.Output })
  add(@AsMember() member: Member, @Body() body: AddMemberDto): Promise<CircleMember> {
    return this.members.add(member, body);
  }

  @Patch('members/:accountId')
  @ForMembers('members.change')
  @ApiParam({ name: 'accountId', format: 'uuid' })
  @ApiResponse({ status: 200, type: MemberDto.Output })
  @ApiResponse({ status: 422, description: 'A circle keeps at least one host.' })
  change(
    @AsMember() member: Member,
    @Param('accountId', PathIdPipe) accountId: string,
    @Body() { role }: ChangeMemberDto,
  ): Promise<CircleMember> {
    return this.members.changeRole(member, accountId, role);
  }

  @Delete('members/:accountId')
  @HttpCode(204)
  @ForMembers('members.change')
  @ApiParam({ name: 'accountId', format: 'uuid' })
  @ApiResponse({ status: 204, description: 'Out of the circle: the next request finds nothing here.' })
  remove(@AsMember() member: Member, @Param('accountId', PathIdPipe) accountId: string): Promise<void> {
    return this.members.remove(member, accountId);
  }

  @Delete('membership')
  @HttpCode(204)
  @ForMembers('circle.leave')
  @ApiResponse({ status: 204, description: 'The caller has left the circle.' })
  leave(@AsMember() member: Member): Promise<void> {
    return this.members.remove(member, member.account.id);
  }
}
