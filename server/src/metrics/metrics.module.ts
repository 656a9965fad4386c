import { Module } from '@nestjs/common';
import type { Pool } from 'pg';
import { POOL } from '../database/database';
import { Metrics } from './metrics';
import { MetricsController } from './metrics.controller';

@Module({
  controllers: [MetricsController],
  providers: [{ provide: Metrics, inject: [POOL], useFactory: (pool: Pool) => new Metrics(pool) }],
})
export class MetricsModule {}
