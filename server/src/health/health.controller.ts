import { Controller, Get, Inject } from '@nestjs/common';
import { ApiResponse, ApiTags } from '@nestjs/swagger';
import { sql } from 'drizzle-orm';
import { ForAnyone } from '../common/access';
import { ProblemException } from '../common/problem';
import { DATABASE, type RootDatabase } from '../database/database';

@ApiTags('health')
@Controller('health')
export class HealthController {
  constructor(@Inject(DATABASE) private readonly db: RootDatabase) {}

  @Get()
  @ForAnyone()
  @ApiResponse({
    status: 200,
    schema: { type: 'object', properties: { status: { type: 'string' }, database: { type: 'string' } } },
  })
  async health(): Promise<{ status: 'ok'; database: 'ok' }> {
    try {
      await this.db.execute(sql`select 1`);
    } catch {
      throw new ProblemException('unavailable');
    }
    return { status: 'ok', database: 'ok' };
  }
}
