import { Global, Inject, Module, type OnApplicationShutdown } from '@nestjs/common';
import type { Pool } from 'pg';
import { ENV, type Env } from '../env';
import { createDatabase, createPool, DATABASE, POOL } from './database';

@Global()
@Module({
  providers: [
    { provide: POOL, inject: [ENV], useFactory: (env: Env) => createPool(env.DATABASE_URL) },
    { provide: DATABASE, inject: [POOL], useFactory: createDatabase },
  ],
  exports: [POOL, DATABASE],
})
export class DatabaseModule implements OnApplicationShutdown {
  constructor(@Inject(POOL) private readonly pool: Pool) {}

  async onApplicationShutdown(): Promise<void> {
    await this.pool.end();
  }
}
