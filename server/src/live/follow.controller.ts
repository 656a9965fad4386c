import { Controller, Get, Headers, Ip, Param, Query, Res } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Response } from 'express';
import { ForAnyone } from '../common/access';
import { matchesTag } from './etag';
import { FollowService } from './follow.service';
import { FollowDto, FollowQueryDto } from './live.dto';

@ApiTags('live')
@Controller('follow')
export class FollowController {
  constructor(private readonly follow: FollowService) {}

  @Get(':code')
  @ForAnyone()
  @ApiParam({ name: 'code', description: 'As typed: any case, with spaces or hyphens.' })
  @ApiResponse({ status: 200, type: FollowDto.Output, description: 'With an ETag.' })
  @ApiResponse({
    status: 304,
    description: 'Nothing changed since the answer with the ETag of If-None-Match.',
  })
  @ApiResponse({
    status: 429,
    description: 'Too many codes of this network opened nothing; never for who follows.',
  })
  @ApiResponse({ status: 404, description: 'No evening has this code, or it ended more than 24 hours ago.' })
  async get(
    @Param('code') code: string,
    @Query() { kind }: FollowQueryDto,
    @Headers('if-none-match') known: string | undefined,
    @Ip() ip: string | undefined,
    @Res() response: Response,
  ): Promise<void> {
    const { etag, body } = await this.follow.answer(code, kind, { ip, known });
    // Always asked again, never taken from a cache unasked.
    response.set({ ETag: etag, 'Cache-Control': 'no-cache' });
    if (matchesTag(known, etag)) response.status(304).end();
    else response.type('application/json').send(body);
  }
}
