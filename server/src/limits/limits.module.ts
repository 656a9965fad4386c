import { Global, Module } from '@nestjs/common';
import { LimitsService } from './limits.service';

/** Global, like the database it counts in: any route may be limited. */
@Global()
@Module({ providers: [LimitsService], exports: [LimitsService] })
export class LimitsModule {}
