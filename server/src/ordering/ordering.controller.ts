import { Body, Controller, HttpCode, Param, Post, Res } from '@nestjs/common';
import { ApiResponse, ApiTags } from '@nestjs/swagger';
import type { ScoreAnswer, SessionSuggestion, SuggestAnswer } from '@pegwell/shared/contract/ordering';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { Response } from 'express';
import {
  AsMember,
  Caller,
  ForAccounts,
  ForSessionMembers,
  type Account,
  type Member,
} from '../common/access';
import { AtOnce } from '../limits/at-once';
import { SessionDto } from '../sessions/sessions.dto';
import {
  AcceptSuggestionDto,
  ScoreAnswerDto,
  ScoreRequestDto,
  SessionSuggestionDto,
  SessionSuggestionRequestDto,
  SuggestAnswerDto,
  SuggestRequestDto,
} from './ordering.dto';
import { goneAway } from './gone-away';
import { OrderingService } from './ordering.service';

@ApiTags('ordering')
@Controller()
export class OrderingController {
  constructor(private readonly ordering: OrderingService) {}

  @Post('score')
  @HttpCode(200)
  @ForAccounts()
  @ApiResponse({ status: 200, type: ScoreAnswerDto.Output })
  score(@Body() body: ScoreRequestDto): ScoreAnswer {
    return this.ordering.score(body);
  }

  @Post('suggest')
  @HttpCode(200)
  @ForAccounts()
  @AtOnce('suggest')
  @ApiResponse({ status: 200, type: SuggestAnswerDto.Output })
  suggest(
    @Caller() account: Account,
    @Body() body: SuggestRequestDto,
    @Res({ passthrough: true }) response: Response,
  ): Promise<SuggestAnswer> {
    return this.ordering.suggest(account, body, goneAway(response));
  }

  @Post('sessions/:id/suggestion')
  @HttpCode(200)
  @ForSessionMembers('sessions.change')
  @AtOnce('suggest')
  @ApiResponse({ status: 200, type: SessionSuggestionDto.Output })
  suggestFor(
    @AsMember() member: Member,
    @Param('id') id: string,
    @Body() body: SessionSuggestionRequestDto,
    @Res({ passthrough: true }) response: Response,
  ): Promise<SessionSuggestion> {
    return this.ordering.suggestFor(member, id, body, goneAway(response));
  }

  @Post('sessions/:id/suggestion/accept')
  @HttpCode(200)
  @ForSessionMembers('sessions.change')
  @ApiResponse({ status: 200, type: SessionDto.Output })
  accept(
    @AsMember() member: Member,
    @Param('id') id: string,
    @Body() body: AcceptSuggestionDto,
  ): Promise<Session> {
    return this.ordering.accept(member, id, body);
  }
}
