import { Body, Controller, HttpCode, Param, Post, Res } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Explanation, HeldBack } from '@pegwell/shared/contract/explain';
import type { Response } from 'express';
import { AsMember, ForSessionMembers, type Member } from '../common/access';
import { AtOnce } from '../limits/at-once';
import { ExplanationDto, ExplanationRequestDto, HeldBackDto, HeldBackRequestDto } from './explain.dto';
import { ExplainService } from './explain.service';
import { goneAway } from './gone-away';

@ApiTags('ordering')
@ApiParam({ name: 'id', format: 'uuid' })
@Controller('sessions/:id')
export class ExplainController {
  constructor(private readonly explain: ExplainService) {}

  @Post('explanation')
  @HttpCode(200)
  @ForSessionMembers('sessions.read')
  @ApiResponse({ status: 200, type: ExplanationDto.Output })
  explanation(@Param('id') id: string, @Body() body: ExplanationRequestDto): Promise<Explanation> {
    return this.explain.explanation(id, body);
  }

  @Post('suggestion/held-back')
  @HttpCode(200)
  @ForSessionMembers('sessions.change')
  @AtOnce('suggest')
  @ApiResponse({ status: 200, type: HeldBackDto.Output })
  heldBack(
    @AsMember() member: Member,
    @Param('id') id: string,
    @Body() body: HeldBackRequestDto,
    @Res({ passthrough: true }) response: Response,
  ): Promise<HeldBack> {
    return this.explain.heldBack(member, id, body, goneAway(response));
  }
}
