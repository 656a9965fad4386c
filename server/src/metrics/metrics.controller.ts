import { Controller, Get, Header, Inject, Req } from '@nestjs/common';
import { ApiProduces, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Request } from 'express';
import { ForAnyone } from '../common/access';
import { notFound } from '../common/problem';
import { ENV, type Env } from '../env';
import { Metrics } from './metrics';
import { isOperator } from './operator';

@ApiTags('health')
@Controller('metrics')
export class MetricsController {
  constructor(
    private readonly metrics: Metrics,
    @Inject(ENV) private readonly env: Env,
  ) {}

  /** For anyone with the operator's token: nobody has an account for this. */
  @Get()
  @ForAnyone()
  @Header('Content-Type', 'text/plain; version=0.0.4; charset=utf-8')
  @ApiProduces('text/plain')
  @ApiResponse({ status: 200, schema: { type: 'string' }, description: 'Prometheus’ text format.' })
  @ApiResponse({ status: 404, description: 'To everybody but the operator there is nothing here.' })
  figures(@Req() request: Request): Promise<string> {
    if (!isOperator(request, this.env.PEGWELL_METRICS_TOKEN)) throw notFound();
    return this.metrics.registry.metrics();
  }
}
